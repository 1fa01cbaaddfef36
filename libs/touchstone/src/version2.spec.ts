import { readTouchstone, TouchstoneError, type TouchstoneFile } from './index';

const read = (name: string, lines: readonly string[]): TouchstoneFile =>
  readTouchstone(name, new TextEncoder().encode(lines.join('\n')));
const refusal = (name: string, lines: readonly string[]): TouchstoneError => {
  try {
    read(name, lines);
  } catch (error) {
    if (error instanceof TouchstoneError) return error;
    throw error;
  }
  throw new Error('The file was read.');
};
const two = ['[Version] 2.0', '# Hz S RI R 50', '[Number of Ports] 2'];
const row = '1 1 0 2 0 3 0 4 0';

describe('version 2', () => {
  it.each([
    ['12_21', [1, 2, 3, 4]],
    ['21_12', [1, 3, 2, 4]],
  ])('reads two ports in the order %s', (order, wanted) => {
    const { network } = read('a.ts', [
      ...two,
      `[Two-Port Data Order] ${order}`,
      '[Network Data]',
      row,
      '[End]',
    ]);
    expect([0, 2, 4, 6].map((k) => network.s[k])).toEqual(wanted);
  });
  it('takes the references of [Reference], over several lines, before those of the option line', () => {
    const { network } = read('a.ts', [
      ...two,
      '[Two-Port Data Order] 12_21',
      '[Reference] 10 ! first',
      ' 20',
      '[Network Data]',
      row,
    ]);
    expect([...network.referenceOhm]).toEqual([10, 0, 20, 0]);
  });
  it.each([
    ['Lower', ['1 1 0', '2 0 3 0', '4 0 5 0 6 0']],
    ['Upper', ['1 1 0 2 0 4 0', '3 0 5 0', '6 0']],
  ])('fills a symmetric matrix from its %s triangle', (format, rows) => {
    const file = read('a.ts', [
      '[version] 2.1',
      '# Hz S RI R 50',
      '[number of ports] 3',
      `[matrix format] ${format}`,
      '[network data]',
      ...rows,
    ]);
    expect(file.version).toBe('2.1');
    expect([...file.network.s].filter((_, k) => k % 2 === 0)).toEqual([1, 2, 4, 2, 3, 5, 4, 5, 6]);
  });
  it('does not divide Z by the reference', () => {
    const file = read('a.ts', [
      '[Version] 2.0',
      '# Hz Z RI R 50',
      '[Number of Ports] 1',
      '[Network Data]',
      '1 150 0',
    ]);
    expect(file.network.s[0]).toBeCloseTo(0.5, 15);
  });
  it('turns mixed modes into single-ended ports, the sign by the order of the legs', () => {
    // One mode each, no coupling: differential reflects 0.4, common 0.2, so S11 = S22 = 0.3 and S12 = S21 = -0.1.
    const head = ['[Version] 2.0', '# Hz S RI R 50', '[Number of Ports] 2', '[Two-Port Data Order] 12_21'];
    const plain = read('a.ts', [
      ...head,
      '[Mixed-Mode Order] D1,2 C1,2',
      '[Network Data]',
      '1 0.4 0 0.05 0 0.05 0 0.2 0',
    ]);
    const turned = read('a.ts', [
      ...head,
      '[Mixed-Mode Order] D2,1 C1,2',
      '[Network Data]',
      '1 0.4 0 0.05 0 0.05 0 0.2 0',
    ]);
    const entries = (file: TouchstoneFile): number[] =>
      [0, 2, 4, 6].map((k) => Number(file.network.s[k]!.toFixed(12)));
    expect(entries(plain)).toEqual([0.35, -0.1, -0.1, 0.25]);
    expect(entries(turned)).toEqual([0.25, -0.1, -0.1, 0.35]);
    expect(plain.mixedModeOrder).toEqual(['D1,2', 'C1,2']);
    expect([...plain.network.referenceOhm]).toEqual([50, 0, 50, 0]);
  });
  it('reads the differential mode of Z data against twice the reference', () => {
    const file = read('a.ts', [
      '[Version] 2.0',
      '# Hz Z RI R 50',
      '[Number of Ports] 2',
      '[Two-Port Data Order] 12_21',
      '[Mixed-Mode Order] D1,2 C1,2',
      '[Network Data]',
      '1 100 0 0 0 0 0 25 0',
    ]);
    expect(Math.max(...file.network.s.map(Math.abs))).toBeLessThan(1e-15);
  });
  it('skips information and reads noise with its resistance in ohm', () => {
    const file = read('a.ts', [
      ...two,
      '[Two-Port Data Order] 12_21',
      '[Number of Noise Frequencies] 1',
      '[Begin Information]',
      'anything [Here] 1 2 3',
      '[End Information]',
      '[Network Data]',
      row,
      '[Noise Data]',
      '1 2.5 0.5 45 10',
      '[End]',
    ]);
    expect(file.noise[0]!.noiseResistanceOhm).toBe(10);
  });
  it.each([
    [
      'two ports without their data order',
      [...two, '[Network Data]', row],
      4,
      /Two-Port Data Order\] is missing/,
    ],
    [
      'no number of ports',
      ['[Version] 2.0', '# Hz', '[Network Data]', row],
      3,
      /Number of Ports\] is missing/,
    ],
    ['no option line', ['[Version] 2.0', '[Number of Ports] 1', '[Network Data]', '1 0 0'], 3, /option line/],
    ['a huge number of ports', ['[Version] 2.0', '# Hz', '[Number of Ports] 999999999'], 3, /999999999/],
    ['an unknown keyword', ['[Version] 2.0', '# Hz', '[Colour] red'], 3, /no keyword/],
    ['a keyword given twice', [...two, '[Number of Ports] 2'], 4, /stands twice/],
    ['an unknown version', ['[Version] 3.0'], 1, /Version\] is "3.0"/],
    ['a version that does not stand first', ['# Hz', '[Version] 2.0'], 2, /does not stand first/],
    [
      'fewer points than announced',
      [...two, '[Two-Port Data Order] 12_21', '[Number of Frequencies] 2', '[Network Data]', row],
      7,
      /is 2, but the file holds 1/,
    ],
    [
      'data behind [End]',
      [...two, '[Two-Port Data Order] 12_21', '[Network Data]', row, '[End]', '2 1 0 2 0 3 0 4 0'],
      8,
      /behind \[End\]/,
    ],
    [
      'too few references',
      [...two, '[Two-Port Data Order] 12_21', '[Reference] 50', '[Network Data]', row],
      6,
      /1 references for 2/,
    ],
    [
      'a mixed-mode order that names a port twice',
      [...two, '[Two-Port Data Order] 12_21', '[Mixed-Mode Order] S1 S1', '[Network Data]', row],
      0,
      /give port/,
    ],
    ['information that never ends', [...two, '[Begin Information]', row], 5, /never closed/],
  ])('refuses %s', (_, lines, line, reason) => {
    const error = refusal('a.ts', lines);
    expect(error.reason).toMatch(reason);
    expect(error.line).toBe(line);
  });
  it('refuses a number of ports that contradicts the name', () => {
    expect(refusal('a.s4p', [...two, '[Two-Port Data Order] 12_21', '[Network Data]', row]).reason).toMatch(
      /name says 4/,
    );
  });
});
