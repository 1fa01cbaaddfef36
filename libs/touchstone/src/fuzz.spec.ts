import { brokenFile, probe, randomSource, soundFile } from './testing/broken-files';

describe('the reader under 2,000 broken files', () => {
  const random = randomSource(2000);
  const outcomes = Array.from({ length: 2000 }, () => {
    const { name, text } = brokenFile(random);
    return { name, text, outcome: probe(name, text) };
  });

  it('reads or refuses each: nothing else is thrown, nothing is taken silently in part', () => {
    expect(outcomes.filter(({ outcome }) => outcome !== 'read' && outcome !== 'refused').slice(0, 3)).toEqual(
      [],
    );
  });
  it('meets both outcomes often, so that the test can tell', () => {
    expect(outcomes.filter(({ outcome }) => outcome === 'read').length).toBeGreaterThan(200);
    expect(outcomes.filter(({ outcome }) => outcome === 'refused').length).toBeGreaterThan(500);
  });
  it('reads every file that is not broken', () => {
    for (let k = 0; k < 200; k++) {
      const { name, text } = soundFile(random);
      expect(probe(name, text)).toBe('read');
    }
  });
});
