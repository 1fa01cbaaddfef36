import type { TraceSection } from '../trace/section';

/** Lengths in metres; heights from the plane that is drawn below, which is the upper one where the section is turned. */
export interface SectionDrawing {
  /** Seen from below the board: the plane drawn below is the one above. */
  readonly turned: boolean;
  readonly sheets: readonly {
    readonly layer: string;
    readonly fromM: number;
    readonly toM: number;
    readonly dk: number;
  }[];
  readonly planeAboveAtM?: number;
  /** Four corners of each trace: lower left, lower right, upper right, upper left. */
  readonly traces: readonly (readonly (readonly [number, number])[])[];
  readonly mask?: { readonly layer: string; readonly thicknessM: number; readonly dk: number };
}

export function drawingOf(section: TraceSection): SectionDrawing {
  const { sheets, mask, planeAbove, turned, gapM, widthM } = section;
  let atM = 0;
  const drawn = sheets.map(({ layer, thicknessM, material }) => {
    const fromM = atM;
    atM += thicknessM;
    return { layer, fromM, toM: atM, dk: material.dk };
  });
  const centres = gapM === undefined ? [0] : [-(gapM + widthM) / 2, (gapM + widthM) / 2];
  return {
    turned,
    sheets: drawn,
    ...(planeAbove ? { planeAboveAtM: atM } : {}),
    traces: centres.map((centreM) => cornersOf(section, centreM)),
    ...(mask ? { mask: { layer: mask.layer, thicknessM: mask.thicknessM, dk: mask.material.dk } } : {}),
  };
}

function cornersOf(section: TraceSection, centreM: number): [number, number][] {
  const { widthM, thicknessM, etchAngleDeg, foot, traceAtM } = section;
  const slopeM = etchAngleDeg === 90 ? 0 : thicknessM / Math.tan((etchAngleDeg * Math.PI) / 180);
  const [wide, narrow] = [widthM / 2, widthM / 2 - slopeM];
  const [lower, upper] = foot === 'down' ? [wide, narrow] : [narrow, wide];
  const topM = traceAtM + thicknessM;
  return [
    [centreM - lower, traceAtM],
    [centreM + lower, traceAtM],
    [centreM + upper, topM],
    [centreM - upper, topM],
  ];
}
