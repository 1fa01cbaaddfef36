import { contentWidth, inkOf, keep, margin } from './page';

export interface Curve {
  readonly colour: string;
  readonly points: readonly (readonly [number, number | null])[];
  readonly width?: number;
}

export interface Figure {
  readonly title: string;
  readonly curves: readonly Curve[];
  /** The limit's outline pieces; the forbidden side is hatched. */
  readonly limits: readonly {
    readonly outline: readonly (readonly [number, number])[];
    readonly forbidden: 'below' | 'above';
  }[];
  readonly toHz: number;
  readonly toDb: number;
}

const height = 150;
const left = 34;

/** Loss against frequency as vectors: 0 dB at the top, loss growing downwards. */
export function drawFigure(pdf: PDFKit.PDFDocument, figure: Figure): void {
  keep(pdf, height + 44);
  pdf
    .font('strong')
    .fontSize(9.5)
    .fillColor(inkOf.ink)
    .text(figure.title, margin, pdf.y, { continued: true });
  pdf.font('text').fillColor(inkOf.slate).text('   dB over GHz');
  const top = pdf.y + 4;
  const width = contentWidth - left;
  const x = (hz: number) => margin + left + (hz / figure.toHz) * width;
  const y = (db: number) => top + (Math.min(Math.max(db, 0), figure.toDb) / figure.toDb) * height;
  grid(pdf, figure, x, y, top, width);
  pdf
    .save()
    .rect(margin + left, top, width, height)
    .clip();
  for (const limit of figure.limits) drawLimit(pdf, limit, x, y, top);
  for (const curve of figure.curves) drawCurve(pdf, curve, x, y);
  pdf.restore();
  pdf.y = top + height + 18;
  pdf.x = margin;
}

function grid(
  pdf: PDFKit.PDFDocument,
  figure: Figure,
  x: (hz: number) => number,
  y: (db: number) => number,
  top: number,
  width: number,
): void {
  pdf.font('text').fontSize(7.5).lineWidth(0.4);
  const stepHz = niceStep(figure.toHz / 6);
  for (let hz = 0; hz <= figure.toHz * 1.0001; hz += stepHz) {
    pdf
      .moveTo(x(hz), top)
      .lineTo(x(hz), top + height)
      .strokeColor(inkOf.rule)
      .stroke();
    pdf.fillColor(inkOf.slate).text(String(Number((hz / 1e9).toPrecision(4))), x(hz) - 20, top + height + 3, {
      width: 40,
      align: 'center',
      lineBreak: false,
    });
  }
  const stepDb = niceStep(figure.toDb / 5);
  for (let db = 0; db <= figure.toDb * 1.0001; db += stepDb) {
    pdf
      .moveTo(margin + left, y(db))
      .lineTo(margin + left + width, y(db))
      .strokeColor(inkOf.rule)
      .stroke();
    pdf.fillColor(inkOf.slate).text(String(Number(db.toPrecision(4))), margin, y(db) - 4, {
      width: left - 6,
      align: 'right',
      lineBreak: false,
    });
  }
}

function drawLimit(
  pdf: PDFKit.PDFDocument,
  limit: Figure['limits'][number],
  x: (hz: number) => number,
  y: (db: number) => number,
  top: number,
): void {
  if (limit.outline.length === 0) return;
  const edge = limit.forbidden === 'below' ? top + height : top;
  const [first] = limit.outline;
  const last = limit.outline[limit.outline.length - 1]!;
  pdf.save();
  pdf.moveTo(x(first![0]), edge);
  for (const [hz, db] of limit.outline) pdf.lineTo(x(hz), y(db));
  pdf.lineTo(x(last[0]), edge).clip();
  pdf.lineWidth(0.35).strokeColor(inkOf.oxide).strokeOpacity(0.5);
  for (let at = x(first![0]) - height; at < x(last[0]) + height; at += 6)
    pdf
      .moveTo(at, top + height)
      .lineTo(at + height, top)
      .stroke();
  pdf.restore();
  pdf.moveTo(x(first![0]), y(first![1]));
  for (const [hz, db] of limit.outline) pdf.lineTo(x(hz), y(db));
  pdf.lineWidth(0.9).strokeColor(inkOf.oxide).stroke();
}

function drawCurve(
  pdf: PDFKit.PDFDocument,
  curve: Curve,
  x: (hz: number) => number,
  y: (db: number) => number,
): void {
  let drawing = false;
  for (const [hz, db] of curve.points) {
    if (db === null) drawing = false;
    else if (drawing) pdf.lineTo(x(hz), y(db));
    else {
      pdf.moveTo(x(hz), y(db));
      drawing = true;
    }
  }
  pdf
    .lineWidth(curve.width ?? 1.2)
    .strokeColor(curve.colour)
    .stroke();
}

/** 1, 2 or 5 times a power of ten, at least `wanted`. */
export function niceStep(wanted: number): number {
  const power = 10 ** Math.floor(Math.log10(wanted));
  return ([1, 2, 5, 10].find((factor) => factor * power >= wanted * 0.999) ?? 10) * power;
}
