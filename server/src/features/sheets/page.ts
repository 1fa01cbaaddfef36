import { createRequire } from 'node:module';
import { dirname, join } from 'node:path';
import PDFDocument from 'pdfkit';

const fonts = join(dirname(createRequire(import.meta.url).resolve('source-sans/package.json')), 'TTF');

/** The palette on paper: vellum's, on white. */
export const inkOf = {
  ink: '#1C2530',
  slate: '#5B6876',
  rule: '#D8D2C6',
  copper: '#9C5526',
  verdigris: '#2C7A70',
  oxide: '#A93A2C',
} as const;

export const margin = 48;
export const contentWidth = 595.28 - 2 * margin;

/** An A4 document, tagged, in the product's own type. */
export function newDocument(title: string, now: Date): PDFKit.PDFDocument {
  const pdf = new PDFDocument({
    size: 'A4',
    margin,
    bufferPages: true,
    tagged: true,
    lang: 'en',
    pdfVersion: '1.7',
    displayTitle: true,
    info: { Title: title, Creator: 'Tollgate', CreationDate: now, ModDate: now },
  });
  pdf.registerFont('text', join(fonts, 'SourceSans3-Regular.ttf'));
  pdf.registerFont('strong', join(fonts, 'SourceSans3-Semibold.ttf'));
  pdf.font('text').fontSize(9.5).fillColor(inkOf.ink);
  return pdf;
}

export function heading(pdf: PDFKit.PDFDocument, text: string): void {
  keep(pdf, 60);
  pdf.moveDown(0.8).font('strong').fontSize(12).fillColor(inkOf.ink).text(text, margin).moveDown(0.3);
  pdf.font('text').fontSize(9.5);
}

/** Begins a new page where less than this height is left. */
export function keep(pdf: PDFKit.PDFDocument, height: number): void {
  if (pdf.y + height > pdf.page.height - margin - 24) pdf.addPage();
}

/** Cells of one line: widths as shares of the content, numbers to the right. */
export interface ColumnSpec {
  readonly title: string;
  readonly share: number;
  readonly right?: boolean;
}

export function table(
  pdf: PDFKit.PDFDocument,
  columns: readonly ColumnSpec[],
  rows: readonly (readonly string[])[],
): void {
  row(
    pdf,
    columns,
    columns.map((column) => column.title),
    'text',
    inkOf.slate,
  );
  for (const cells of rows) row(pdf, columns, cells, 'text', inkOf.ink);
}

function row(
  pdf: PDFKit.PDFDocument,
  columns: readonly ColumnSpec[],
  cells: readonly string[],
  font: string,
  colour: string,
): void {
  pdf.font(font).fontSize(9);
  const heights = cells.map((cell, i) =>
    pdf.heightOfString(cell || ' ', { width: columns[i]!.share * contentWidth - 6 }),
  );
  const height = Math.max(...heights) + 4;
  keep(pdf, height);
  const top = pdf.y;
  let x = margin;
  columns.forEach((column, i) => {
    const width = column.share * contentWidth;
    pdf
      .fillColor(colour)
      .text(cells[i] || ' ', x, top + 2, { width: width - 6, align: column.right ? 'right' : 'left' });
    x += width;
  });
  pdf.y = top + height;
  pdf.x = margin;
  pdf
    .moveTo(margin, pdf.y)
    .lineTo(margin + contentWidth, pdf.y)
    .lineWidth(0.4)
    .strokeColor(inkOf.rule)
    .stroke();
}

/** The same line at the foot of every page, with its number. */
export function footers(pdf: PDFKit.PDFDocument, text: string): void {
  const { start, count } = pdf.bufferedPageRange();
  for (let page = start; page < start + count; page++) {
    pdf.switchToPage(page);
    // Writing below the margin would otherwise begin a page of its own.
    pdf.page.margins.bottom = 0;
    pdf.font('text').fontSize(8).fillColor(inkOf.slate);
    pdf.text(text, margin, pdf.page.height - 36, {
      width: contentWidth - 60,
      lineBreak: false,
      ellipsis: true,
    });
    pdf.text(`${page - start + 1} of ${count}`, margin + contentWidth - 60, pdf.page.height - 36, {
      width: 60,
      align: 'right',
    });
  }
}
