import fc from 'fast-check';
import { distanceM, offsetPolyline, pairLengthsM, polylineLengthM, turnsRad, type Point } from './index';

const corner: Point[] = [
  [0, 0],
  [3, 0],
  [3, 4],
];

/** Paths whose pieces are long beside the offset and whose turns stay below 150 degrees. */
const paths = fc
  .array(
    fc.record({
      turn: fc.double({ min: -2.6, max: 2.6, noNaN: true }),
      length: fc.double({ min: 4, max: 20, noNaN: true }),
    }),
    {
      minLength: 1,
      maxLength: 12,
    },
  )
  .map((pieces) => {
    let heading = 0;
    const path: [number, number][] = [[0, 0]];
    for (const { turn, length } of pieces) {
      heading += turn;
      const [x, y] = path.at(-1)!;
      path.push([x + Math.cos(heading) * length, y + Math.sin(heading) * length]);
    }
    return path;
  });

describe('a line beside a path', () => {
  it('meets its corner where both shifted pieces do', () => {
    expect(offsetPolyline(corner, 0.5)).toEqual([
      [0, 0.5],
      [2.5, 0.5],
      [2.5, 4],
    ]);
    expect(offsetPolyline(corner, -0.5)[1]).toEqual([3.5, -0.5]);
  });

  it('of a pair is as long as the leg, whatever the path', () => {
    fc.assert(
      fc.property(paths, fc.double({ min: 0.01, max: 0.4, noNaN: true }), (path, pitch) => {
        const legs = pairLengthsM(path, pitch);
        const p = offsetPolyline(path, pitch / 2);
        const n = offsetPolyline(path, -pitch / 2);
        expect(polylineLengthM(p)).toBeCloseTo(legs.pM, 8);
        expect(polylineLengthM(n)).toBeCloseTo(legs.nM, 8);
      }),
    );
  });

  it('keeps its distance from every piece, and the turns of the path', () => {
    fc.assert(
      fc.property(paths, (path) => {
        const beside = offsetPolyline(path, 0.2);
        expect(beside).toHaveLength(path.length);
        turnsRad(beside).forEach((turn, i) => expect(turn).toBeCloseTo(turnsRad(path)[i]!, 6));
        expect(distanceM(beside[0]!, path[0]!)).toBeCloseTo(0.2, 12);
        expect(distanceM(beside.at(-1)!, path.at(-1)!)).toBeCloseTo(0.2, 12);
      }),
    );
  });

  it('is bevelled where a mitre would run far out', () => {
    const back: Point[] = [
      [0, 0],
      [10, 0],
      [0, 0.5],
    ];
    const beside = offsetPolyline(back, -0.2);
    expect(beside).toHaveLength(4);
    for (const point of beside) expect(point[0]).toBeLessThan(10.3);
  });

  it('of a single point is nothing, and repeated vertices are passed over', () => {
    expect(offsetPolyline([[1, 1]], 1)).toEqual([]);
    expect(offsetPolyline([corner[0]!, corner[0]!, corner[1]!], 1)).toEqual([
      [0, 1],
      [3, 1],
    ]);
  });
});
