import { existsSync } from 'node:fs';
import { join } from 'node:path';
import {
  casesIn,
  checkDocument,
  ownReference,
  readCase,
  sharedReference,
  type Pairs,
  type ReferenceCase,
} from '../reference/load';
import { toResponse } from '@tollgate/budget';

const shared = join(sharedReference, 'cases');
const own = casesIn(ownReference).map((name) => [name, ownReference] as const);
const beside = casesIn(shared).map((name) => [name, shared] as const);

describe('a channel against values computed elsewhere', () => {
  it.each([...own, ...beside])('%s comes out within its tolerance', (name, folder) => {
    const reference = readCase(folder, name);
    const check = checkDocument(reference.channel, [folder, join(sharedReference, 'touchstone')]);
    const response = toResponse(check, '');
    const { expected, toleranceAbs } = reference;
    let compared = 0;
    if (expected.s && toleranceAbs) {
      expect(largestDifference(response.s, expected.s)).toBeLessThanOrEqual(toleranceAbs);
      compared++;
    }
    if (expected.mixedMode && toleranceAbs) {
      expect(largestDifference(response.mixedMode, expected.mixedMode)).toBeLessThanOrEqual(toleranceAbs);
      compared++;
    }
    compared += compareLimits(reference, response.limits);
    expect(compared).toBeGreaterThan(0);
  });

  it('knows its own five cases, and those beside the repository where they are', () => {
    expect(own.length).toBe(5);
    expect(beside.length > 20).toBe(existsSync(shared));
  });
});

function compareLimits(
  { expected, toleranceDb }: ReferenceCase,
  found: ReturnType<typeof toResponse>['limits'],
) {
  const limits = expected.limits ?? [];
  for (const limit of limits) {
    const judged = found.find(({ id }) => id === limit.id)!;
    expect(judged.holds).toBe(limit.holds);
    expect(judged.worst!.frequencyHz).toBeCloseTo(limit.worst.frequencyHz, 0);
    expect(Math.abs(judged.worst!.marginDb! - limit.worst.marginDb)).toBeLessThanOrEqual(toleranceDb!);
    expect(judged.exceedsHz.length).toBe(limit.exceedsHz.length);
    judged.exceedsHz.forEach((range, k) => {
      expect(range[0]).toBeCloseTo(limit.exceedsHz[k]![0], 0);
      expect(range[1]).toBeCloseTo(limit.exceedsHz[k]![1], 0);
    });
    expect(judged.worstRefined!.marginDb!).toBeLessThanOrEqual(judged.worst!.marginDb!);
    if (limit.worstBetweenSamples) {
      const gap = judged.worstRefined!.marginDb! - limit.worstBetweenSamples.marginDb;
      expect(Math.abs(gap)).toBeLessThanOrEqual(1e-4);
    }
  }
  return limits.length;
}

function largestDifference(a: Pairs, b: Pairs): number {
  const flat = (pairs: Pairs): number[] => pairs.flat(3);
  const [x, y] = [flat(a), flat(b)];
  expect(x.length).toBe(y.length);
  return x.reduce((largest, value, k) => Math.max(largest, Math.abs(value - y[k]!)), 0);
}
