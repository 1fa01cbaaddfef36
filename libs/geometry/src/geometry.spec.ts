import { pairLengthsM, polylineLengthM, turnsRad, type Point } from './index';

const corner: Point[] = [
  [0, 0],
  [3, 0],
  [3, 4],
];

describe('a polyline', () => {
  it('is as long as its pieces', () => {
    expect(polylineLengthM(corner)).toBe(7);
    expect(polylineLengthM([[1, 1]])).toBe(0);
  });

  it('turns by signed angles and passes over repeated vertices', () => {
    expect(turnsRad(corner)).toEqual([Math.PI / 2]);
    expect(
      turnsRad([
        [0, 0],
        [3, 0],
        [3, 0],
        [3, -4],
      ]),
    ).toEqual([-Math.PI / 2]);
  });
});

describe('the legs of a pair', () => {
  it('differ by twice the pitch at a right angle', () => {
    const legs = pairLengthsM(corner, 0.25);
    expect(legs.nM - legs.pM).toBeCloseTo(0.5, 12);
  });

  it('are the lengths of the offset lines themselves', () => {
    const half = 0.1;
    const right: Point[] = [
      [0, half],
      [3 - half, half],
      [3 - half, 4],
    ];
    expect(pairLengthsM(corner, 2 * half).pM).toBeCloseTo(polylineLengthM(right), 12);
  });

  it('are equal where left and right turns balance', () => {
    const jog: Point[] = [
      [0, 0],
      [1, 0],
      [2, 1],
      [3, 1],
    ];
    const legs = pairLengthsM(jog, 0.2);
    expect(legs.pM).toBeCloseTo(legs.nM, 12);
  });

  it('refuses a path that turns back on itself', () => {
    expect(() =>
      pairLengthsM(
        [
          [0, 0],
          [1, 0],
          [0, 0.01],
        ],
        0.1,
      ),
    ).toThrow('turns back on itself');
  });
});
