import type { Channel, CheckView, LimitView } from '@tollgate/contracts';
import { formatDb, formatQuantity } from '@tollgate/quantities';
import { drawFigure, niceStep, type Curve, type Figure } from './curve-figure';
import { footers, heading, inkOf, margin, newDocument, table, contentWidth } from './page';

const cautions =
  'Estimates from models: no compliance test and no substitute for measurement. Stackup and tolerances are to be confirmed with the fabricator; the responsible engineer decides.';

const verdictWords = {
  holds: 'Holds',
  exceeds: 'Exceeds',
  'not-judged': 'Not judged',
  'not-checked': 'Not checked',
  'inside-guard-band': 'Inside the guard band',
} as const;

/** A channel's check on paper: unsigned, as it stood when it was printed. */
export function checkSheet(
  channel: Channel,
  view: CheckView,
  now: Date,
  demonstration: boolean,
): PDFKit.PDFDocument {
  const place = `${channel.boardName}, revision ${channel.revisionLetter}`;
  const pdf = newDocument(`Check sheet: ${channel.name}`, now);
  pdf.font('text').fontSize(9.5).fillColor(inkOf.slate).text(place, margin);
  pdf.font('strong').fontSize(17).fillColor(inkOf.ink).text(channel.name).moveDown(0.2);
  pdf
    .font('text')
    .fontSize(9.5)
    .fillColor(inkOf.slate)
    .text(
      `Check sheet, unsigned. Version ${channel.version}, printed ${now.toISOString().slice(0, 16).replace('T', ' ')} UTC.`,
    );
  if (demonstration) pdf.fillColor(inkOf.oxide).text('Demonstration: everything in it is invented.');
  verdict(pdf, view);
  heading(pdf, 'Limits');
  table(
    pdf,
    [
      { title: 'limit', share: 0.4 },
      { title: 'verdict', share: 0.24 },
      { title: 'worst at', share: 0.18, right: true },
      { title: 'margin', share: 0.18, right: true },
    ],
    view.limits.map(limitRow),
  );
  const beyond = [...new Set(view.limits.flatMap((limit) => limit.beyond))];
  if (beyond.length)
    pdf
      .moveDown(0.4)
      .fillColor(inkOf.slate)
      .text(`Not judged here: ${beyond.join('; ')}.`, margin, pdf.y, { width: contentWidth });
  heading(pdf, 'Response');
  drawFigure(pdf, insertionFigure(view));
  drawFigure(pdf, returnFigure(view));
  ledger(pdf, view, channel);
  record(pdf, view);
  footers(pdf, `${place} · ${channel.name} · ${view.fingerprint.slice(0, 16)}`);
  return pdf;
}

function verdict(pdf: PDFKit.PDFDocument, view: CheckView): void {
  const colour =
    view.verdict === 'holds' ? inkOf.verdigris : view.verdict === 'exceeds' ? inkOf.oxide : inkOf.slate;
  const at =
    view.worstFrequencyHz === null
      ? ''
      : ` at ${formatQuantity(view.worstFrequencyHz, 'frequency', { digits: 5 })}`;
  const words = view.worstMarginDb === null ? '' : `, worst margin ${formatDb(view.worstMarginDb)}${at}`;
  pdf
    .moveDown(0.6)
    .font('strong')
    .fontSize(13)
    .fillColor(colour)
    .text(`${verdictWords[view.verdict]}${words}`, margin);
  pdf
    .font('text')
    .fontSize(9)
    .fillColor(inkOf.slate)
    .text(cautions, margin, pdf.y + 4, { width: contentWidth });
}

function limitRow(limit: LimitView): string[] {
  const worst = limit.corner ?? limit.worstRefined;
  const status = limit.status && limit.status !== 'normative' ? `, ${limit.status} limit` : '';
  return [
    [limit.title, limit.source].filter(Boolean).join('\n'),
    limit.verdict === 'not-judged'
      ? `Not judged: ${limit.reason}`
      : `${verdictWords[limit.verdict]}${status}\n${limit.corner ? `worst corner: ${limit.corner.name}` : 'nominal'}`,
    worst ? formatQuantity(worst.frequencyHz, 'frequency', { digits: 5 }) : '',
    worst ? formatDb(worst.marginDb) : '',
  ];
}

function pointsOf(view: CheckView, curve: readonly (number | null)[]): Curve['points'] {
  return view.frequenciesHz.map((hz, i) => [hz, curve[i] ?? null] as const);
}

function extentOf(
  view: CheckView,
  curves: readonly (readonly (number | null)[])[],
  limits: readonly LimitView[],
  mostDb: number,
): Pick<Figure, 'toHz' | 'toDb'> {
  const outlines = limits.flatMap((limit) => limit.outline.flat());
  const toHz = Math.max(
    view.frequenciesHz[view.frequenciesHz.length - 1] ?? 1e9,
    ...outlines.map(([hz]) => hz),
  );
  const highest = Math.max(1, ...curves.flat().map((db) => db ?? 0), ...outlines.map(([, db]) => db));
  const toDb = Math.min(highest, mostDb);
  return { toHz, toDb: niceStep(toDb / 5) * 5 };
}

function limitsOf(view: CheckView, quantities: readonly LimitView['quantity'][]): LimitView[] {
  return view.limits.filter((limit) => quantities.includes(limit.quantity));
}

function outlined(limits: readonly LimitView[]): Figure['limits'] {
  return limits.flatMap((limit) =>
    limit.outline.map((outline) => ({
      outline,
      forbidden: limit.sense === 'max' ? ('below' as const) : ('above' as const),
    })),
  );
}

function insertionFigure(view: CheckView): Figure {
  const limits = limitsOf(view, ['insertion-loss']);
  const { insertionLossDb } = view.curves;
  return {
    title: 'Insertion loss',
    curves: [{ colour: inkOf.copper, points: pointsOf(view, insertionLossDb) }],
    limits: outlined(limits),
    ...extentOf(view, [insertionLossDb], limits, 100),
  };
}

function returnFigure(view: CheckView): Figure {
  const limits = limitsOf(view, ['return-loss-near', 'return-loss-far']);
  const { returnLossNearDb, returnLossFarDb } = view.curves;
  return {
    title: 'Return loss, near end in copper, far end in slate',
    curves: [
      { colour: inkOf.slate, points: pointsOf(view, returnLossFarDb), width: 0.7 },
      { colour: inkOf.copper, points: pointsOf(view, returnLossNearDb), width: 0.9 },
    ],
    limits: outlined(limits),
    ...extentOf(view, [returnLossNearDb, returnLossFarDb], limits, 40),
  };
}

function ledger(pdf: PDFKit.PDFDocument, view: CheckView, channel: Channel): void {
  const [main] = view.ledger;
  if (!main) return;
  const labels = new Map(
    channel.document.elements.map((element) => [element.id, element.label ?? element.kind]),
  );
  const standings = new Map(view.elementStandings.map((entry) => [entry.element, entry.standing]));
  heading(pdf, `Ledger at ${formatQuantity(main.atHz, 'frequency', { digits: 5 })}`);
  const rows = main.rows.map((row) => [
    row.element,
    labels.get(row.element) ?? '',
    standings.get(row.element) ?? '',
    formatDb(row.tollDb, false),
    formatDb(row.savedIfIdealDb, false),
    row.allotmentDb === undefined ? '' : formatDb(row.allotmentDb, false),
  ]);
  table(
    pdf,
    [
      { title: 'id', share: 0.1 },
      { title: 'element', share: 0.34 },
      { title: 'standing', share: 0.16 },
      { title: 'toll, dB', share: 0.12, right: true },
      { title: 'saved if ideal, dB', share: 0.16, right: true },
      { title: 'allotted, dB', share: 0.12, right: true },
    ],
    [
      ...rows,
      ['', 'reflection', '', formatDb(main.reflectionDb, false), '', ''],
      ['', 'total', '', formatDb(main.totalDb, false), '', ''],
    ],
  );
  pdf
    .moveDown(0.3)
    .fontSize(8.5)
    .fillColor(inkOf.slate)
    .text(
      'Saved if ideal is what the channel would lose less without the element; the column does not add up.',
      margin,
    );
}

function record(pdf: PDFKit.PDFDocument, view: CheckView): void {
  heading(pdf, 'Record');
  const facts = [
    `Fingerprint ${view.fingerprint}`,
    `Engine ${view.engine}; power waves; ${view.frequenciesHz.length} frequencies`,
    `Weakest model: ${view.weakestStanding} (${view.weakestElement})`,
    ...(view.temperatureC === undefined ? [] : [`Board at ${view.temperatureC} °C`]),
    ...view.warnings.map((each) => each.message),
  ];
  pdf.fontSize(9).fillColor(inkOf.ink);
  for (const fact of facts) pdf.text(fact, margin, pdf.y, { width: contentWidth });
}
