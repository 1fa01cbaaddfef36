import { checkPositive, LineError } from '../line-error';

/** A trace's copper: a trapezoid, widest at its foot. */
export interface FieldTrace {
  /** At the foot. */
  readonly widthM: number;
  readonly thicknessM: number;
  /** Inside the copper, between foot and side wall; 90 is a rectangle. Default 90. */
  readonly etchAngleDeg?: number;
  /** Which way the foot looks. Default down. */
  readonly foot?: 'down' | 'up';
}

/** A cross-section over a plane at height 0: flat sheets, one trace or a symmetric pair, and what lies above. */
export interface FieldSection {
  /** From the plane's face upward, at least one. */
  readonly sheets: readonly { readonly thicknessM: number; readonly dk: number }[];
  /** A plane lies on top of the last sheet; else air follows. */
  readonly planeAbove: boolean;
  readonly trace: FieldTrace;
  /** Height of the trace's lower face; the copper displaces the dielectric it lies in. */
  readonly traceAtM: number;
  /** Pair: edge to edge at the foot. */
  readonly gapM?: number;
  /** Solder mask that follows laminate, side walls and top at its own thickness; the trace stands on the last sheet under air. */
  readonly mask?: { readonly thicknessM: number; readonly dk: number };
}

/** Two heights this close are one. */
export const sameHeightM = 1e-12;

/** A section's outer lengths, checked. */
export interface Shape {
  readonly section: FieldSection;
  /** Heights of the sheets' upper faces. */
  readonly topsM: readonly number[];
  readonly heightM: number;
  readonly lowerWidthM: number;
  readonly upperWidthM: number;
  /** Centre of the right-hand trace; 0 for a single one. */
  readonly centreM: number;
}

/**
 * @throws LineError for a length or permittivity that is none, a top etched away, a trace outside its dielectric, a mask
 * under a plane
 */
export function shapeOf(section: FieldSection): Shape {
  const { sheets, trace, traceAtM, gapM, mask, planeAbove } = section;
  if (sheets.length === 0) throw new LineError('The section has no dielectric.', 'Give a sheet.', 'sheets');
  for (const { thicknessM, dk } of [...sheets, ...(mask ? [mask] : [])]) {
    checkPositive(thicknessM, 'thicknessM');
    checkPermittivity(dk);
  }
  checkPositive(trace.widthM, 'widthM');
  checkPositive(trace.thicknessM, 'thicknessM');
  checkPositive(traceAtM, 'belowM');
  if (gapM !== undefined) checkPositive(gapM, 'gapM');
  const topsM: number[] = [];
  for (const { thicknessM } of sheets) topsM.push((topsM.at(-1) ?? 0) + thicknessM);
  const heightM = topsM.at(-1)!;
  const narrowM = topOf(trace);
  const footDown = (trace.foot ?? 'down') === 'down';
  checkPlace(section, heightM);
  if (mask && planeAbove) throw new LineError('A mask has no place under a plane.', 'Leave it out.', 'mask');
  return {
    section,
    topsM,
    heightM,
    lowerWidthM: footDown ? trace.widthM : narrowM,
    upperWidthM: footDown ? narrowM : trace.widthM,
    centreM: gapM === undefined ? 0 : (gapM + trace.widthM) / 2,
  };
}

function checkPermittivity(dk: number): void {
  if (dk >= 1 && Number.isFinite(dk)) return;
  throw new LineError(`The permittivity is ${dk}.`, 'Give a value from 1 up.', 'dk');
}

function topOf({ widthM, thicknessM, etchAngleDeg = 90 }: FieldTrace): number {
  if (etchAngleDeg === 90) return widthM;
  const top = widthM - (2 * thicknessM) / Math.tan((etchAngleDeg * Math.PI) / 180);
  if (etchAngleDeg > 0 && etchAngleDeg < 90 && top > 0) return top;
  throw new LineError(
    `At ${etchAngleDeg} degrees a trace of ${widthM} m has no top left.`,
    'Give a wider trace or a steeper angle up to 90 degrees.',
    'etchAngleDeg',
  );
}

function checkPlace({ trace, traceAtM, planeAbove, mask }: FieldSection, heightM: number): void {
  const upper = traceAtM + trace.thicknessM;
  if (planeAbove && upper > heightM - sameHeightM) {
    throw new LineError(
      'The trace reaches the plane above.',
      'Give more dielectric above it, or thinner copper.',
      'thicknessM',
    );
  }
  if (traceAtM > heightM + sameHeightM) {
    throw new LineError('The trace hangs in the air.', 'Let it stand on a sheet.', 'belowM');
  }
  if (mask && Math.abs(traceAtM - heightM) > sameHeightM) {
    throw new LineError(
      'A mask covers a trace on the last sheet.',
      'Leave it out, or move the trace.',
      'mask',
    );
  }
}

/** What tells one section from another, for a cache. */
export function sectionKey({ sheets, planeAbove, trace, traceAtM, gapM, mask }: FieldSection): string {
  const { widthM, thicknessM, etchAngleDeg = 90, foot = 'down' } = trace;
  return JSON.stringify([
    sheets.map((sheet) => [sheet.thicknessM, sheet.dk]),
    planeAbove,
    [widthM, thicknessM, etchAngleDeg, etchAngleDeg === 90 ? 'down' : foot],
    traceAtM,
    gapM ?? null,
    mask ? [mask.thicknessM, mask.dk] : null,
  ]);
}
