import fc from 'fast-check';
import { distanceM, snapped, type SnapGround } from './index';

const ground: SnapGround = { gridM: 0.5, pins: [[3.1, 2.2]], aligned: [[7.3, 9.1]], reachM: 0.2 };

describe('where a moved point comes to rest', () => {
  it('a pin within reach goes before everything, and is taken exactly', () => {
    expect(snapped([3.2, 2.1], ground)).toEqual({ point: [3.1, 2.2], to: 'pin', guides: [] });
  });

  it('out of reach of a pin each axis is taken from an aligned point, else from the grid', () => {
    const rest = snapped([7.2, 4.2], ground);
    expect(rest.point).toEqual([7.3, 4]);
    expect(rest.to).toBe('alignment');
    expect(rest.guides).toEqual([{ from: [7.3, 9.1], to: [7.3, 4] }]);
  });

  it('away from all of them the grid', () => {
    expect(snapped([1.26, 0.74], ground)).toEqual({ point: [1.5, 0.5], to: 'grid', guides: [] });
  });

  it('without a grid and within no reach the point itself', () => {
    expect(snapped([1.26, 0.74], { ...ground, gridM: 0 })).toEqual({
      point: [1.26, 0.74],
      to: 'nothing',
      guides: [],
    });
  });

  it('near 45 degrees from where the piece begins on that diagonal', () => {
    const rest = snapped([2.05, -1.95], { ...ground, from: [0, 0] });
    expect(rest.point).toEqual([2, -2]);
    expect(rest.guides).toEqual([{ from: [0, 0], to: [2, -2] }]);
  });

  it('is never farther off than half the grid and the reach, and rests where it rested', () => {
    const place = fc.tuple(
      fc.double({ min: -20, max: 20, noNaN: true }),
      fc.double({ min: -20, max: 20, noNaN: true }),
    );
    fc.assert(
      fc.property(place, fc.array(place, { maxLength: 6 }), (point, aligned) => {
        const around = { ...ground, aligned };
        const rest = snapped(point, around);
        expect(distanceM(rest.point, point)).toBeLessThanOrEqual(Math.hypot(0.25, 0.25) + 0.2);
        if (rest.to === 'grid')
          expect(snapped(rest.point, { ...around, aligned: [] }).point).toEqual(rest.point);
      }),
    );
  });
});
