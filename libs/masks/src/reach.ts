import type { Mask } from './mask';
import { rangesOf } from './mask';
import type { Subject } from './subject';

/** Ends closer than this share of their frequency count as the same: grids and files round. */
const roundingShare = 1e-9;

export interface Reach {
  /** The band in which everything answers, null where there is none. */
  readonly band: readonly [number, number] | null;
  /** Ranges asked for that lie outside it. */
  readonly missingHz: [number, number][];
  /** Who does not reach, in words; empty where nothing is missing. */
  readonly reason: string;
}

interface Holder {
  readonly fromHz: number;
  readonly toHz: number;
  readonly what: string;
}

/** How far the channel can answer for a mask: the grid and every part together. */
export function reachOfMask(mask: Mask, subject: Subject): Reach {
  const [fromHz, toHz] = subject.gridHz;
  return reachOf(rangesOf(mask), [{ fromHz, toHz, what: 'The grid' }, ...subject.parts], 'limit');
}

/** How far the parts can answer for the samples of a fit, which does not need the grid. */
export function reachOfFit(fromHz: number, toHz: number, subject: Subject): Reach {
  return reachOf([[fromHz, toHz]], subject.parts, 'fit');
}

function reachOf(ranges: readonly [number, number][], holders: readonly Holder[], of: string): Reach {
  const fromHz = holders.reduce((from, holder) => Math.max(from, holder.fromHz), 0);
  const toHz = holders.reduce((to, holder) => Math.min(to, holder.toHz), Infinity);
  const missingHz: [number, number][] = [];
  for (const [from, to] of ranges) {
    if (fromHz > toHz || toHz < from * (1 - roundingShare) || fromHz > to * (1 + roundingShare)) {
      missingHz.push([from, to]);
      continue;
    }
    if (fromHz > from * (1 + roundingShare)) missingHz.push([from, fromHz]);
    if (toHz < to * (1 - roundingShare)) missingHz.push([toHz, to]);
  }
  const band = fromHz <= toHz ? ([fromHz, toHz] as const) : null;
  return { band, missingHz, reason: missingHz.length ? reasonOf(missingHz, ranges, holders, of) : '' };
}

function reasonOf(
  missingHz: readonly [number, number][],
  ranges: readonly [number, number][],
  holders: readonly Holder[],
  of: string,
): string {
  const first = Math.min(...ranges.map(([from]) => from));
  const last = Math.max(...ranges.map(([, to]) => to));
  const short = holders.flatMap(({ fromHz, toHz, what }) => [
    ...(fromHz > first * (1 + roundingShare) ? [`${what} starts at ${spokenHz(fromHz)}`] : []),
    ...(toHz < last * (1 - roundingShare) ? [`${what} ends at ${spokenHz(toHz)}`] : []),
  ]);
  const gaps = missingHz.map(([from, to]) =>
    from === to ? spokenHz(from) : `${spokenHz(from)} to ${spokenHz(to)}`,
  );
  return `${short.join('; ')}: the ${of} is not covered at ${gaps.join(' and ')}.`;
}

const units = [
  [1e9, 'GHz'],
  [1e6, 'MHz'],
  [1e3, 'kHz'],
] as const;

/** A frequency as people say it: "25.78125 GHz". */
export function spokenHz(frequencyHz: number): string {
  const [scale, unit] = units.find(([size]) => frequencyHz >= size) ?? [1, 'Hz'];
  return `${Number((frequencyHz / scale).toPrecision(9))} ${unit}`;
}
