import { pairInOpening } from './opening';
import { stepCapacitanceM } from './pad-step';
import { wireCapacitances } from './wires';

const wire = (xM: number, yM: number, diameterM: number) => ({ xM, yM, radiusM: diameterM / 2 });

describe('round wires', () => {
  it.each([0.26, 0.3, 0.5, 1, 20])(
    'of 0.25 mm at %d mm carry pi eps/acosh(distance/diameter)',
    (distance) => {
      const [c] = wireCapacitances([wire(0, 0, 0.25e-3), wire(distance * 1e-3, 0, 0.25e-3)], 1);
      expect(c! / (Math.PI / Math.acosh(distance / 0.25))).toBeCloseTo(1, 9);
    },
  );

  it('of unlike thickness carry 2 pi eps/acosh((D^2 - a^2 - b^2)/(2 a b))', () => {
    // Eccentric cylinders, outside one another (Smythe, Static and Dynamic Electricity, 4.14).
    const [a, b, d] = [0.3, 0.1, 0.55];
    const [c] = wireCapacitances([wire(0, 0, 2 * a), wire(0, d, 2 * b)], 1);
    expect(c! / ((2 * Math.PI) / Math.acosh((d * d - a * a - b * b) / (2 * a * b)))).toBeCloseTo(1, 7);
  });

  it('keep their capacitances when turned and moved, whichever way they are scaled', () => {
    const wires = [wire(-0.2, 0, 0.25), wire(0.2, 0.1, 0.3), wire(0.6, 0.5, 0.2)];
    const moved = wires.map(({ xM, yM, radiusM }) => ({
      xM: 1e-3 * (xM * Math.cos(1.1) - yM * Math.sin(1.1) + 7),
      yM: 1e-3 * (xM * Math.sin(1.1) + yM * Math.cos(1.1) - 3),
      radiusM: radiusM * 1e-3,
    }));
    const [one, other] = [wireCapacitances(wires, 2), wireCapacitances(moved, 2)];
    other.forEach((value, i) => expect(value / one[i]!).toBeCloseTo(1, 9));
    expect(one[1]).toBeCloseTo(one[2]!, 9);
  });

  it('in a closed ring of thin wires tend to a coaxial line', () => {
    const [n, ringM, thinM] = [24, 1, 0.02];
    const ring = Array.from({ length: n }, (_, k) =>
      wire(ringM * Math.cos((2 * Math.PI * k) / n), ringM * Math.sin((2 * Math.PI * k) / n), thinM),
    );
    const [c] = wireCapacitances([wire(0, 0, 0.3), ...ring], 1);
    // A cage of n thin wires r on a circle R: ln(R/a) + ln(R/(n r))/n in place of ln(R/a), from the potential of n like charges.
    const expected = (2 * Math.PI) / (Math.log(ringM / 0.15) + Math.log(ringM / (n * (thinM / 2))) / n);
    expect(Math.abs(c! / expected - 1)).toBeLessThan(1e-3);
  });
});

describe('two rods in their antipads', () => {
  const acosh = (pitch: number, rod: number): number => (2 * Math.PI) / Math.acosh(pitch / rod);

  it("are two coaxial lines where the antipads don't overlap", () => {
    const coaxial = (2 * Math.PI) / Math.log(0.9 / 0.25);
    expect(pairInOpening(0.25, 0.9, 0.9)).toEqual({ even: coaxial, odd: coaxial, meshErrorShare: 0 });
  });

  it('tend to those as the antipads come to touch', () => {
    const coaxial = (2 * Math.PI) / Math.log(0.9 / 0.25);
    const { even, odd } = pairInOpening(0.25, 0.9, 0.8999);
    expect(even / coaxial).toBeCloseTo(1, 3);
    expect(odd / coaxial).toBeCloseTo(1, 3);
  });

  it.each([
    [0.25, 0.252],
    [0.25, 0.3],
    [0.25, 0.5],
    [0.25, 0.8],
  ])('of %d in a wide opening at %d see each other as a two-wire line in odd mode', (rod, pitch) => {
    const { odd } = pairInOpening(rod, 100, pitch);
    expect(Math.abs(odd / acosh(pitch, rod) - 1)).toBeLessThan(1e-3);
  });

  it.each([
    [0.25, 0.9, 0.5],
    [0.25, 0.8, 0.75],
    [0.4, 0.9, 0.6],
  ])(
    'of %d in antipads of %d at %d agree with a cage of wires in place of the edge',
    (rod, antipad, pitch) => {
      const wall = cage(antipad, pitch);
      const c = wireCapacitances([wire(-pitch / 2, 0, rod), wire(pitch / 2, 0, rod), ...wall], 2);
      const pair = pairInOpening(rod, antipad, pitch);
      // A cage lets a little of the field through; it is a check of another kind, not of the last digit.
      expect(Math.abs((c[0]! + c[1]!) / pair.even - 1)).toBeLessThan(0.01);
      expect(Math.abs((c[0]! - c[1]!) / pair.odd - 1)).toBeLessThan(0.01);
    },
  );

  it.each([
    [0.25, 0.9, 0.5],
    [0.5, 0.9, 0.6],
    [0.6, 0.62, 0.61],
    [0.25, 100, 0.3],
  ])(
    'of %d in antipads of %d at %d are solved to 0.1 percent by their own estimate',
    (rod, antipad, pitch) => {
      const pair = pairInOpening(rod, antipad, pitch);
      expect(pair.meshErrorShare).toBeGreaterThan(0);
      expect(pair.meshErrorShare).toBeLessThan(1e-3);
      expect(pair.odd).toBeGreaterThan(pair.even);
    },
  );

  /** Wires so thick and so close that they act as a tube of the circle's radius: n r = R (see the ring above). */
  function cage(antipad: number, pitch: number) {
    const n = 30;
    const radius = antipad / 2;
    const end = Math.PI - Math.acos(pitch / antipad);
    const thin = (2 * radius * end) / (Math.PI * n);
    return Array.from({ length: n }, (_, k) => {
      const angle = end * ((2 * k + 1) / n - 1);
      const x = pitch / 2 + radius * Math.cos(angle);
      return [wire(x, radius * Math.sin(angle), thin), wire(-x, radius * Math.sin(angle), thin)];
    }).flat();
  }
});

describe('the face of a pad', () => {
  it('is nothing where the pad is no wider than the barrel', () => {
    expect(stepCapacitanceM(1, 1, 3)).toBe(0);
    expect(stepCapacitanceM(1, 1.0001, 3)).toBeLessThan(1e-4);
  });

  it('is that of a step between parallel plates where the radii are large', () => {
    // Plates 2 and 1 apart on a circle of radius 1000: 2 pi 1000 (eps/pi)(2.5 ln 3 - 2 ln(8/3)).
    const plane = 2 * 1000 * (2.5 * Math.log(3) - 2 * Math.log(8 / 3));
    expect(stepCapacitanceM(998, 999, 1000) / plane).toBeCloseTo(1, 3);
  });

  it('grows with the pad', () => {
    const sizes = [1.2, 1.5, 2, 2.5, 2.9].map((pad) => stepCapacitanceM(1, pad, 3));
    expect(sizes).toEqual([...sizes].sort((a, b) => a - b));
  });
});
