import fc from 'fast-check';
import {
  areaM2,
  boxOf,
  contains,
  crossingSides,
  elbow,
  nearestPlace,
  polylineLengthM,
  rectangle,
  stepped,
  type Point,
} from './index';

const square = rectangle([1, 2], 4, 3);
const notched: Point[] = [
  [0, 0],
  [10, 0],
  [10, 6],
  [6, 6],
  [6, 4],
  [4, 4],
  [4, 6],
  [0, 6],
];

describe('an outline', () => {
  it('of a rectangle has its area and its box', () => {
    expect(areaM2(square)).toBe(12);
    expect(boxOf(square)).toEqual({ x0: 1, y0: 2, x1: 5, y1: 5 });
    expect(areaM2(square.slice().reverse())).toBe(12);
    expect(boxOf([])).toBeUndefined();
  });

  it('with a notch is simple, less in area by it, and does not contain it', () => {
    expect(crossingSides(notched)).toBeUndefined();
    expect(areaM2(notched)).toBe(56);
    expect(contains(notched, [5, 5])).toBe(false);
    expect(contains(notched, [5, 3])).toBe(true);
  });

  it('that crosses itself names the two sides', () => {
    const bow = [square[0]!, square[2]!, square[1]!, square[3]!];
    expect(crossingSides(bow)).toEqual([0, 2]);
  });

  it('that runs over a side of its own is not simple', () => {
    const over: Point[] = [
      [0, 0],
      [4, 0],
      [4, 2],
      [1, 0],
      [0, 2],
    ];
    expect(crossingSides(over)).toBeDefined();
  });

  it('whose corners lie on a circle in order is always simple', () => {
    const angles = fc.uniqueArray(fc.integer({ min: 0, max: 359 }), { minLength: 3, maxLength: 40 });
    fc.assert(
      fc.property(angles, (some) => {
        const corners = some.sort((a, b) => a - b).map((degrees) => stepped([0, 0], degrees, 1));
        expect(crossingSides(corners)).toBeUndefined();
      }),
    );
  });
});

describe('places on a path', () => {
  it('the nearest is found on the piece it lies beside', () => {
    const place = nearestPlace(
      [
        [0, 0],
        [10, 0],
        [10, 10],
      ],
      [9, 4],
    );
    expect(place).toEqual({ point: [10, 4], piece: 1, distanceM: 1 });
    expect(nearestPlace([[0, 0]], [1, 1])).toBeUndefined();
  });

  it('an elbow leads from one point to another at 45 degrees and straight', () => {
    expect(elbow([0, 0], [5, 2])).toEqual([
      [0, 0],
      [2, 2],
      [5, 2],
    ]);
    expect(elbow([0, 0], [3, -3])).toEqual([
      [0, 0],
      [3, -3],
    ]);
    expect(elbow([0, 0], [0, 4])).toEqual([
      [0, 0],
      [0, 4],
    ]);
    expect(polylineLengthM(elbow([0, 0], [5, 2]))).toBeCloseTo(2 * Math.SQRT2 + 3, 12);
  });
});
