import { bounds, nyquistHz, type CompleteChannel, type Limit, type Warning } from '@tollgate/contracts';
import { spokenHz } from '@tollgate/masks';

/** The stated rule: never coarser than this, Hz ... */
const widestStepHz = 10e6;
/** ... and this many points on one turn of a wave over the channel's one-way delay. */
const pointsATurn = 16;
const usualBandHz = [10e6, 20e9] as const;

export interface ChosenGrid {
  readonly frequenciesHz: Float64Array;
  readonly warnings: Warning[];
}

/** The channel's own grid, or the one of the stated rule; a grid coarser than the rule's step is warned of. */
export function gridOf(channel: CompleteChannel, delayS: number): ChosenGrid {
  const stepHz = delayS > 0 ? Math.min(widestStepHz, 1 / (pointsATurn * delayS)) : widestStepHz;
  const frequenciesHz = channel.grid ? givenGrid(channel.grid) : ruledGrid(channel, stepHz);
  let widest = 0;
  for (let k = 1; k < frequenciesHz.length; k++) {
    widest = Math.max(widest, frequenciesHz[k]! - frequenciesHz[k - 1]!);
  }
  if (widest <= stepHz * (1 + 1e-6)) return { frequenciesHz, warnings: [] };
  const short = (hz: number): string => spokenHz(Number(hz.toPrecision(4)));
  const message = `The grid's widest step, ${short(widest)}, is coarser than ${short(stepHz)}: curves and sampled margins may miss narrow features. Refined margins are searched for between the points.`;
  return { frequenciesHz, warnings: [{ path: 'grid', message }] };
}

function givenGrid(grid: NonNullable<CompleteChannel['grid']>): Float64Array {
  if ('frequenciesHz' in grid) return Float64Array.from(grid.frequenciesHz);
  const { startHz, stopHz, points, spacing } = grid;
  if (spacing === 'linear') return linear(startHz, stopHz, points);
  const turns = Math.log(stopHz / startHz);
  const frequenciesHz = Float64Array.from(
    { length: points },
    (_, k) => startHz * Math.exp((turns * k) / (points - 1)),
  );
  frequenciesHz[points - 1] = stopHz;
  return frequenciesHz;
}

function ruledGrid(channel: CompleteChannel, stepHz: number): Float64Array {
  const ranges = channel.limits.flatMap(rangesOfLimit);
  const ends = [...ranges.map(([, to]) => to), nyquistHz(channel) ?? 0].filter((f) => f > 0);
  const stopHz = ends.length ? Math.max(...ends) : usualBandHz[1];
  const lowest = ranges.length ? Math.min(...ranges.map(([from]) => from)) : usualBandHz[0];
  const startHz = lowest < stopHz ? lowest : Math.min(usualBandHz[0], stopHz / 2);
  const steps = Math.ceil(((stopHz - startHz) / stepHz) * (1 - 1e-12));
  return linear(startHz, stopHz, Math.min(Math.max(steps + 1, bounds.gridPoints.min), bounds.gridPoints.max));
}

function rangesOfLimit(limit: Limit): [number, number][] {
  if (limit.atHz !== undefined) return [[limit.atHz, limit.atHz]];
  if (limit.points) return [[limit.points[0]![0], limit.points.at(-1)![0]]];
  return (limit.segments ?? []).map(({ fromHz, toHz }) => [fromHz, toHz]);
}

function linear(startHz: number, stopHz: number, points: number): Float64Array {
  const frequenciesHz = Float64Array.from(
    { length: points },
    (_, k) => startHz + ((stopHz - startHz) * k) / (points - 1),
  );
  frequenciesHz[points - 1] = stopHz;
  return frequenciesHz;
}
