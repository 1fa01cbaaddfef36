import { LineError, checkPositive } from './line-error';

/** Section of one trace or of a symmetric pair, SI. */
export interface CrossSection {
  /** Finished width at the foot, the face that was bonded to its core. */
  readonly widthM: number;
  readonly thicknessM: number;
  /** Angle between foot and side wall inside the copper; 90 is a rectangle, less a narrower top. Default 90. */
  readonly etchAngleDeg?: number;
  /** Which way the foot looks. Default down. */
  readonly foot?: 'down' | 'up';
  /** Dielectric from the plane below to the lower face of the trace. */
  readonly belowM: number;
  /** From the upper face to the plane above; absent for a microstrip, whose other side is air. */
  readonly aboveM?: number;
  /** Edge to edge at the foot; present for a pair. */
  readonly gapM?: number;
}

/** Lengths that a model works with: the trapezoid is replaced by the rectangle of its mean width. */
export interface Rectangle {
  readonly widthM: number;
  readonly thicknessM: number;
  readonly belowM: number;
  readonly aboveM: number;
  readonly gapM: number;
}

export type SectionKind = 'stripline' | 'microstrip' | 'stripline-pair' | 'microstrip-pair';

export function sectionKind(section: CrossSection): SectionKind {
  const line = section.aboveM === undefined ? 'microstrip' : 'stripline';
  return section.gapM === undefined ? line : `${line}-pair`;
}

/**
 * The rectangle that stands for a section.
 * @throws LineError for a length that is not above zero, or an angle that leaves no top
 */
export function rectangleOf(section: CrossSection): Rectangle {
  const { widthM, thicknessM, belowM, aboveM, gapM, etchAngleDeg = 90 } = section;
  checkPositive(widthM, 'widthM');
  checkPositive(thicknessM, 'thicknessM');
  checkPositive(belowM, 'belowM');
  if (aboveM !== undefined) checkPositive(aboveM, 'aboveM');
  if (gapM !== undefined) checkPositive(gapM, 'gapM');
  if (!(etchAngleDeg > 0 && etchAngleDeg <= 90)) {
    throw new LineError(
      `The etch angle is ${etchAngleDeg} degrees.`,
      'Give an angle up to 90 degrees.',
      'etchAngleDeg',
    );
  }
  const slope = etchAngleDeg === 90 ? 0 : thicknessM / Math.tan((etchAngleDeg * Math.PI) / 180);
  if (widthM - 2 * slope <= 0) {
    throw new LineError(
      `At ${etchAngleDeg} degrees a trace of ${widthM} m has no top left.`,
      'Give a steeper angle or a wider trace.',
      'etchAngleDeg',
    );
  }
  return {
    widthM: widthM - slope,
    thicknessM,
    belowM,
    aboveM: aboveM ?? Infinity,
    gapM: gapM === undefined ? Infinity : gapM + slope,
  };
}
