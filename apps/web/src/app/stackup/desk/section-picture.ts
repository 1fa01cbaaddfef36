import type { SectionDrawing } from '@tollgate/contracts';

export interface Picture {
  readonly widthPx: number;
  readonly heightPx: number;
  readonly sheets: readonly {
    readonly yPx: number;
    readonly heightPx: number;
    readonly words: string;
    readonly labelled: boolean;
  }[];
  readonly planes: readonly { readonly layer: string; readonly yPx: number; readonly heightPx: number }[];
  /** Points of polygons, as SVG takes them. */
  readonly traces: readonly string[];
  readonly mask: { readonly layer: string; readonly outline: string } | undefined;
  /** Ends of the width, the gap and the height below the copper, in pixels. */
  readonly width: readonly [number, number];
  readonly gap: readonly [number, number] | undefined;
  readonly traceTopPx: number;
}

const widthPx = 560;
const mostHeightPx = 250;
/** Room above the picture for the figures of width and gap. */
const headPx = 30;
const labelPx = 15;

/** A section in pixels, in one scale for both directions; sheets and planes run through the whole width. */
export function pictureOf({ drawing }: { readonly drawing: SectionDrawing }): Picture {
  const pxPerM = Math.min(widthPx / drawing.widthM, mostHeightPx / drawing.heightM);
  const heightPx = headPx + drawing.heightM * pxPerM;
  const x = (xM: number) => widthPx / 2 + xM * pxPerM;
  const y = (yM: number) => heightPx - yM * pxPerM;
  const span = ({ fromM, toM }: { fromM: number; toM: number }) => ({
    yPx: y(toM),
    heightPx: (toM - fromM) * pxPerM,
  });
  const points = (outline: readonly (readonly [number, number])[]) =>
    outline.map(([px, py]) => `${px.toFixed(2)},${py.toFixed(2)}`).join(' ');
  const corners = drawing.traces.map((trace) => trace.map(([xM, yM]) => [x(xM), y(yM)] as const));
  const spans = corners.map((trace) => {
    const xs = trace.map(([px]) => px);
    return [Math.min(...xs), Math.max(...xs)] as const;
  });
  const [first, second] = spans;
  return {
    widthPx,
    heightPx,
    sheets: drawing.sheets.map((sheet) => ({
      ...span(sheet),
      words: `${shortened(sheet.layer)}, Dk ${sheet.dk}`,
      labelled: (sheet.toM - sheet.fromM) * pxPerM >= labelPx,
    })),
    planes: drawing.planes.map(({ layer, ...plane }) => ({ layer, ...span(plane) })),
    traces: corners.map(points),
    mask: drawing.mask
      ? { layer: drawing.mask.layer, outline: points(maskOutline(drawing.mask.outline, x, y)) }
      : undefined,
    width: (second ?? first)!,
    gap: second ? [first![1], second[0]] : undefined,
    traceTopPx: Math.min(...corners.flat().map(([, py]) => py)),
  };
}

const mostCharacters = 40;

function shortened(name: string): string {
  return name.length > mostCharacters ? `${name.slice(0, mostCharacters - 1).trimEnd()}\u2026` : name;
}

/** The mask goes on to both edges of the picture. */
function maskOutline(
  outline: readonly (readonly [number, number])[],
  x: (xM: number) => number,
  y: (yM: number) => number,
): (readonly [number, number])[] {
  return outline.map(([xM, yM], i) => {
    const edge = i < 2 ? 0 : i >= outline.length - 2 ? widthPx : undefined;
    return [edge ?? x(xM), y(yM)] as const;
  });
}
