import { readPoints, writePoints } from './csv-points';

describe('points pasted as text', () => {
  it('reads commas, semicolons, tabs and spaces, a head and units', () => {
    const text = 'GHz, dB\n1, 2\n2;3.5\n3\t4\n4 5\n5000 MHz, 6 dB\n\n# end\n';
    expect(readPoints(text)).toEqual({
      points: [
        [1e9, 2],
        [2e9, 3.5],
        [3e9, 4],
        [4e9, 5],
        [5e9, 6],
      ],
      problems: [],
    });
  });

  it('names each wrong line by its number and keeps the right ones', () => {
    const { points, problems } = readPoints('1, 2\nwide, 3\n3\n4, 5');
    expect(points).toEqual([
      [1e9, 2],
      [4e9, 5],
    ]);
    expect(problems.map(({ line }) => line)).toEqual([2, 3]);
    expect(problems[0]!.message).toContain('is not a frequency');
    expect(problems[1]!.message).toContain('Write a frequency and a loss');
  });

  it('says where the frequencies stop ascending', () => {
    expect(readPoints('2, 1\n1, 2').problems).toEqual([
      { line: 2, message: 'The frequency is below the one before: points ascend.' },
    ]);
  });

  it('allows a step, two points of one frequency', () => {
    expect(readPoints('1, 2\n1, 4').problems).toEqual([]);
  });

  it('writes what it reads', () => {
    const { points } = readPoints('0.05, 1.5\n12.890625, 35');
    expect(writePoints(points)).toBe('0.05, 1.5\n12.890625, 35');
  });
});
