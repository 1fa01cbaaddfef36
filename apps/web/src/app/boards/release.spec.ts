import { daysTo, daysWords } from './release';

describe('days to a release', () => {
  const evening = new Date(2026, 4, 30, 23, 59);

  it('count calendar days, whatever the hour', () => {
    expect(daysTo('2026-05-31', evening)).toBe(1);
    expect(daysTo('2026-05-30', evening)).toBe(0);
    expect(daysTo('2026-05-29', evening)).toBe(-1);
  });

  it('count across a change of the clocks', () => {
    expect(daysTo('2026-11-02', new Date(2026, 9, 24, 12))).toBe(9);
  });

  it('are told in words', () => {
    expect([13, 1, 0, -1, -4].map((days) => daysWords(days))).toEqual([
      '13 days to go',
      '1 day to go',
      'today',
      '1 day over',
      '4 days over',
    ]);
  });

  it('are no delay once a later revision has taken its place', () => {
    expect(daysWords(-90, true)).toBe('90 days ago');
  });
});
