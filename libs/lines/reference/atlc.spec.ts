import { atlc, describeWith } from '../../../test/support/needs';
import type { FieldSection } from '../src/field/section';
import { solveSection } from '../src/field/solve';
import { outer, share, strip, um } from '../src/field/testing/sections';
import { atlcImpedances, type Pixel } from './atlc';

/** Impedances at two pixel sizes, the finer half the coarser, drawn out to none: their error falls as the size to the power 4/3. */
function drawnOut(
  widthM: number,
  heightM: number,
  pixelM: number,
  at: (xM: number, yM: number) => Pixel,
): Record<'single' | 'even' | 'odd', number> {
  const [coarse, fine] = [pixelM, pixelM / 2].map((size) => {
    const columns = Math.round(widthM / size);
    // A row of ground below and above, the plane's faces at its inner edges.
    const rows = Math.round(heightM / size) + 2;
    return atlcImpedances(columns, rows, (x, y) =>
      y === 0 || y === rows - 1 ? 'ground' : at((x + 0.5 - columns / 2) * size, (y - 0.5) * size),
    );
  });
  const of = (mode: 'single' | 'even' | 'odd') =>
    fine![mode] + (fine![mode] - coarse![mode]) / (2 ** (4 / 3) - 1);
  return { single: of('single'), even: of('even'), odd: of('odd') };
}

describeWith(atlc, "Debian's atlc, finite differences, draws out to the same impedance", () => {
  const z0 = (section: FieldSection, mode: 'single' | 'even' | 'odd') =>
    solveSection(section).modes[mode]!.z0Ohm;

  it('of a strip off the middle, to 0.2 %', () => {
    const drawn = drawnOut(1000 * um, 365 * um, 5 * um, (x, y) =>
      Math.abs(x) < 60 * um && y > 100 * um && y < 115 * um ? 'trace' : 3.3,
    );
    const section = strip(120 * um, 15 * um, 100 * um, 250 * um, 3.3);
    expect(share(z0(section, 'single'), drawn.single)).toBeLessThan(2e-3);
  });

  it('of a trapezoid with walls of two to one, to 0.2 %', () => {
    const drawn = drawnOut(1000 * um, 320 * um, 5 * um, (x, y) =>
      Math.abs(x) < 80 * um - (y - 140 * um) / 2 && y > 140 * um && y < 180 * um ? 'trace' : 3.6,
    );
    const square = strip(160 * um, 40 * um, 140 * um, 140 * um, 3.6);
    const etchAngleDeg = (Math.atan(2) * 180) / Math.PI;
    const etched = { ...square, trace: { ...square.trace, etchAngleDeg } };
    expect(share(z0(etched, 'single'), drawn.single)).toBeLessThan(2e-3);
    // So a rectangle of the foot's width is far outside.
    expect(share(z0(square, 'single'), drawn.single)).toBeGreaterThan(0.02);
  });

  it('of a pair of strips, even and odd, to 0.2 %', () => {
    const drawn = drawnOut(1200 * um, 320 * um, 5 * um, (x, y) => {
      const onTrace = Math.abs(Math.abs(x) - 125 * um) < 50 * um && y > 150 * um && y < 170 * um;
      return onTrace ? (x > 0 ? 'trace' : 'other') : 3.6;
    });
    const section = strip(100 * um, 20 * um, 150 * um, 150 * um, 3.6, 150 * um);
    expect(share(z0(section, 'even'), drawn.even)).toBeLessThan(2e-3);
    expect(share(z0(section, 'odd'), drawn.odd)).toBeLessThan(2e-3);
  });

  it('of a microstrip, to 2 %: a pixel between two dielectrics takes one of them', () => {
    const drawn = drawnOut(1400 * um, 800 * um, 10 * um, (x, y) => {
      if (Math.abs(x) < 100 * um && y > 100 * um && y < 140 * um) return 'trace';
      return y < 100 * um ? 4.2 : 1;
    });
    expect(share(z0(outer(200 * um, 40 * um, 100 * um, 4.2), 'single'), drawn.single)).toBeLessThan(0.02);
  });
});
