import { checkDocument } from '../reference/load';

const fields = { lossSqrtDbPerM: 5, lossLinearDbPerM: 8, effectivePermittivity: 3.8 };
const low = { kind: 'line', z0Ohm: 38, lengthM: 0.06, ...fields };
const high = { kind: 'line', z0Ohm: 56, lengthM: 0.05, ...fields };
const stub = { kind: 'stub', end: 'open', z0Ohm: 50, lengthM: 0.004, effectivePermittivity: 4 };

function check(elements: object[], more: object = {}) {
  return checkDocument({
    ...{ format: 'tollgate.channel/1', name: 'Test', signaling: 'single-ended', elements },
    grid: { startHz: 1e8, stopHz: 1e10, points: 100 },
    limits: [
      {
        ...{ id: 'rl', title: 'Return loss', quantity: 'return-loss-near', sense: 'min' },
        points: [
          [1e9, 10],
          [8e9, 8],
        ],
        interpolation: 'linear',
      },
    ],
    ...more,
  });
}

describe('what an element spoils of the return loss', () => {
  it('is what the return loss would gain without it, at the worst point of the limit', () => {
    const [spoiled] = check([low, stub, high]).spoils;
    const at = { grid: { frequenciesHz: [spoiled!.atHz, 1.1e10] } };
    const [all, without] = [
      [low, stub, high],
      [low, high],
    ].map((elements) => {
      const { s } = check(elements, at).network;
      return -20 * Math.log10(Math.hypot(s[0]!, s[1]!));
    });
    expect(spoiled!.limitId).toBe('rl');
    expect(spoiled!.returnLossDb!).toBeCloseTo(all!, 9);
    expect(spoiled!.rows[1]!.spoilsDb!).toBeCloseTo(without! - all!, 9);
    const [least, most] = spoiled!.rows[1]!.rangeDb;
    expect(least!).toBeLessThanOrEqual(spoiled!.rows[1]!.spoilsDb!);
    expect(most!).toBeGreaterThanOrEqual(spoiled!.rows[1]!.spoilsDb!);
    expect(most!).toBeGreaterThan(least! + 0.1);
  });

  it('of a pair of equal legs is what it is of one leg', () => {
    const one = check([low, stub, high]).spoils[0]!;
    const skewless = { kind: 'line-pair', p: { ...high, kind: undefined }, n: { ...high, kind: undefined } };
    const clean = JSON.parse(JSON.stringify(skewless)) as object;
    const pair = check([low, stub, clean], { signaling: 'differential' }).spoils[0]!;
    expect(pair.atHz).toBeCloseTo(one.atHz, -3);
    pair.rows.forEach(({ spoilsDb }, i) => expect(spoilsDb!).toBeCloseTo(one.rows[i]!.spoilsDb!, 4));
  });

  it('is told of limits on return loss only', () => {
    expect(check([low], { limits: [] }).spoils).toEqual([]);
  });
});
