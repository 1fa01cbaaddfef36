import type { FieldSection } from '../section';
import type { FieldMode } from '../solve';

/** A micrometre. */
export const um = 1e-6;
/** How far a value is off, relative. */
export const share = (value: number, reference: number) => Math.abs(value / reference - 1);

/** One dielectric between two planes. */
export const strip = (
  w: number,
  t: number,
  below: number,
  above: number,
  dk: number,
  gap?: number,
): FieldSection => ({
  sheets: [{ thicknessM: below + t + above, dk }],
  planeAbove: true,
  trace: { widthM: w, thicknessM: t },
  traceAtM: below,
  gapM: gap,
});
/** A trace, or a pair, on its dielectric under air. */
export const outer = (w: number, t: number, h: number, dk: number, gap?: number): FieldSection => ({
  sheets: [{ thicknessM: h, dk }],
  planeAbove: false,
  trace: { widthM: w, thicknessM: t },
  traceAtM: h,
  gapM: gap,
});

/** Smooth copper of 5.8e7 S/m at 10 GHz by the incremental inductance rule. */
export function copperLossDbPerM({ shares, z0Ohm }: FieldMode): number {
  const sum = shares.lower + shares.upper + shares.sides + shares.planeBelow + shares.planeAbove;
  const sheet = Math.sqrt((Math.PI * 1e10 * 4e-7 * Math.PI) / 5.8e7);
  return (20 * Math.LOG10E * ((sheet / 376.730313) * sum)) / (2 * z0Ohm);
}
