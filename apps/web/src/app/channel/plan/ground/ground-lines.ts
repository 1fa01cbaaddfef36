import type { Point } from '@tollgate/geometry';
import type { PlanUnit } from '../view/plan-view';

const milM = 25.4e-6;
const steps: Readonly<Record<PlanUnit, readonly number[]>> = {
  mm: [0.01, 0.02, 0.05, 0.1, 0.2, 0.5, 1, 2, 5, 10, 20, 50, 100, 200, 500, 1000].map((each) => each / 1e3),
  mil: [1, 2, 5, 10, 20, 50, 100, 200, 500, 1000, 2000, 5000, 10000, 20000, 50000].map((each) => each * milM),
};

/** The finest round distance that is at least so many px long. */
export function roundStep(unit: PlanUnit, pxPerM: number, leastPx: number): number {
  return steps[unit].find((step) => step * pxPerM >= leastPx) ?? steps[unit].at(-1)!;
}

export interface Tick {
  readonly px: number;
  readonly text: string;
}

/** Marks of a ruler: where they lie on the screen, and the coordinate in the unit. */
export function ticks(startM: number, lengthPx: number, pxPerM: number, unit: PlanUnit): Tick[] {
  const step = roundStep(unit, pxPerM, 56);
  const unitM = unit === 'mm' ? 1e-3 : milM;
  const first = Math.ceil(startM / step);
  const count = Math.floor(lengthPx / pxPerM / step) + 1;
  return Array.from({ length: count + 1 }, (_, i) => {
    const at = (first + i) * step;
    return { px: (at - startM) * pxPerM, text: String(Number((at / unitM).toFixed(4)) + 0) };
  }).filter(({ px }) => px <= lengthPx);
}

/** Upright and level lines of a grid over the screen, as path data in px. */
export function gridLines(
  origin: Point,
  size: readonly [number, number],
  pxPerM: number,
  stepM: number,
): string {
  const line = (axis: 0 | 1) => {
    const first = Math.ceil(origin[axis] / stepM);
    const count = Math.floor(size[axis] / pxPerM / stepM) + 1;
    return Array.from({ length: count }, (_, i) => ((first + i) * stepM - origin[axis]) * pxPerM)
      .map((px) => Math.round(px) + 0.5)
      .map((px) => (axis === 0 ? `M${px} 0V${size[1]}` : `M0 ${px}H${size[0]}`))
      .join('');
  };
  return line(0) + line(1);
}
