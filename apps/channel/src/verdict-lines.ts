import type { CheckView, Ledger, LimitView } from '@tollgate/contracts';

const verdictWords: Record<string, string> = {
  holds: 'holds',
  exceeds: 'exceeds',
  'not-judged': 'not judged',
};
/** Warnings shown in full; a script finds all of them by what they are about in the channel file. */
const mostNotes = 6;

/** The verdict in a few lines for a person. */
export function verdictLines(name: string, view: CheckView): string[] {
  return [
    `${name}: ${overall(view)}`,
    ...view.limits.map((limit) => `  ${limitLine(limit)}`),
    ...view.ledger.slice(0, 1).map((ledger) => `  ${ledgerLine(ledger)}`),
    `  Weakest model: ${view.weakestStanding} (${view.weakestElement}).`,
    ...noteLines(view),
    '  An estimate, not a compliance test: confirm the stackup with the fabricator.',
  ];
}

function overall(view: CheckView): string {
  if (view.limits.length === 0) return 'no limit to judge.';
  const deciding = view.limits.filter(({ verdict }) => verdict === view.verdict);
  const [status, ...others] = new Set(deciding.map((limit) => limit.status));
  const told = status && others.length === 0 ? `, ${status} limit` : '';
  return `${wordsOf(view.verdict)}${told}.`;
}

/** The verdict of a limit always carries its status: an informative limit that holds binds nobody. */
function limitLine(limit: LimitView): string {
  const status = limit.status ? `, ${limit.status} limit` : '';
  const head = `${limit.title} (${limit.quantity}): ${wordsOf(limit.verdict)}${status}`;
  const worst = limit.corner ?? limit.worstRefined;
  const margin =
    worst === null || worst.marginDb === null
      ? ''
      : `worst margin ${marginWords(limit, worst.marginDb)} at ${ghz(worst.frequencyHz)}`;
  const basis = limit.corner ? cornerWords(limit, limit.corner) : ', nominal';
  if (limit.verdict !== 'not-judged') return margin ? `${head}, ${margin}${basis}.` : `${head}.`;
  return `${head}. ${limit.reason}${margin ? ` Over what is covered: ${margin}.` : ''}`;
}

/** Where the stackup has tolerances: the corner the verdict stands on, and the nominal margin beside it. */
function cornerWords(limit: LimitView, { name, drivenBy }: NonNullable<LimitView['corner']>): string {
  const nominal = limit.worstRefined?.marginDb ?? null;
  const driven = drivenBy ? `, driven by ${drivenBy}` : '';
  const beside = nominal === null ? '' : ` (nominal ${marginWords(limit, nominal)})`;
  return ` in the corner ${name}${driven}${beside}`;
}

function marginWords({ quantity }: LimitView, margin: number): string {
  const inTime = quantity === 'delay' || quantity === 'pair-skew';
  return inTime ? `${fixed(margin * 1e12)} ps` : `${fixed(margin)} dB`;
}

function ledgerLine({ atHz, totalDb, reflectionDb, rows, reserveDb }: Ledger): string {
  const tolls = rows.some(({ tollDb }) => tollDb === null)
    ? null
    : rows.reduce((sum, { tollDb }) => sum + (tollDb ?? 0), 0);
  const reserve = reserveDb === undefined || reserveDb === null ? '' : `; reserve ${fixed(reserveDb)} dB`;
  return `At ${ghz(atHz)}: insertion loss ${decibels(totalDb)} = tolls ${decibels(tolls)} + reflection ${decibels(reflectionDb)}${reserve}.`;
}

function noteLines({ warnings }: CheckView): string[] {
  const shown = warnings
    .slice(0, mostNotes)
    .map(({ path, message }) => `  Note${path ? ` (${path})` : ''}: ${message}`);
  const more = warnings.length - shown.length;
  return more > 0 ? [...shown, `  And ${more} more notes.`] : shown;
}

function wordsOf(verdict: string): string {
  return verdictWords[verdict] ?? verdict;
}

function decibels(db: number | null): string {
  return db === null ? 'no transmission' : `${fixed(db)} dB`;
}

function fixed(value: number): string {
  return (Math.round(value * 1000) / 1000 + 0).toFixed(3);
}

function ghz(frequencyHz: number): string {
  return `${Number((frequencyHz / 1e9).toPrecision(7))} GHz`;
}
