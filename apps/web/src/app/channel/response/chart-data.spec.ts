import type { CheckView, LimitView } from '@tollgate/contracts';
import { curvePoints, frequencyRange, limitPoints, lossRange, nearestPoint } from './chart-data';

const view = {
  frequenciesHz: [0, 1e9, 2e9],
  curves: { insertionLossDb: [0, 1, null], returnLossNearDb: [], returnLossFarDb: [] },
} as unknown as CheckView;

function limit(outline: LimitView['outline']): LimitView {
  return { id: 'limit-1', sense: 'max', quantity: 'insertion-loss', outline } as unknown as LimitView;
}

describe('what the charts are given', () => {
  it('draws in GHz, with a gap where nothing is transmitted', () => {
    expect(curvePoints(view, 'insertionLossDb', false)).toEqual([
      { x: 0, y: 0 },
      { x: 1, y: 1 },
      { x: 2, y: null },
    ]);
  });

  it('leaves 0 Hz away on a logarithmic axis', () => {
    expect(curvePoints(view, 'insertionLossDb', true).map(({ x }) => x)).toEqual([1, 2]);
    expect(frequencyRange(view, [], true)).toEqual([1, 2]);
  });

  it('joins segments that meet, steps included, and parts those that do not', () => {
    const meeting = limit([
      [
        [1e9, 2],
        [2e9, 3],
      ],
      [
        [2e9, 5],
        [3e9, 6],
      ],
    ]);
    expect(limitPoints(meeting, false).map(({ y }) => y)).toEqual([2, 3, 5, 6]);
    const apart = limit([
      [
        [1e9, 2],
        [2e9, 3],
      ],
      [
        [4e9, 5],
        [5e9, 6],
      ],
    ]);
    expect(limitPoints(apart, false).map(({ y }) => y)).toEqual([2, 3, null, 5, 6]);
  });

  it('holds the curve and the limit in round numbers, a limit only up to Nyquist', () => {
    const steep = limit([
      [
        [1e9, 5],
        [10e9, 30],
        [20e9, 90],
      ],
    ]);
    expect(lossRange([0, 5, 8], [steep], 4, 10e9)).toBe(40);
    expect(lossRange([0, 5, 8], [steep], 4)).toBe(120);
    expect(lossRange([0, 1], [], 4)).toBe(4);
  });

  it('leaves room behind a limit at the last frequency', () => {
    expect(frequencyRange(view, [limit([[[2e9, 3]]])], false)).toEqual([0, 2.06]);
  });

  it('finds the grid point next to the pointer', () => {
    expect(nearestPoint(view, 0.4)).toBe(0);
    expect(nearestPoint(view, 0.6)).toBe(1);
    expect(nearestPoint(view, 9)).toBe(2);
  });
});
