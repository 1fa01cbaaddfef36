import type { CheckView, CompleteChannel, Ledger, Spoils } from '@tollgate/contracts';
import { formatDb } from '@tollgate/quantities';
import { mainValues, nameOf } from '../elements/element-words';

export interface LedgerLine {
  readonly id: string;
  readonly name: string;
  readonly values: string;
  readonly standing: string;
  readonly toll: string;
  readonly saved: string;
  readonly allotted: string;
  /** Allotment less toll: positive is left, negative is over. */
  readonly balanceDb: number | undefined;
  /** The balance as a share of the largest, 0 to 1. */
  readonly bar: number;
}

/** The ledger's lines in the order of the channel, numbers as they are shown. */
export function ledgerLines(ledger: Ledger, view: CheckView, document: CompleteChannel): LedgerLine[] {
  const elements = new Map(document.elements.map((element) => [element.id, element]));
  const standings = new Map(view.elementStandings.map((each) => [each.element, each.standing]));
  const balances = ledger.rows.map((row) =>
    row.allotmentDb === undefined || row.tollDb === null ? undefined : row.allotmentDb - row.tollDb,
  );
  const largest = Math.max(0.01, ...balances.map((balance) => Math.abs(balance ?? 0)));
  return ledger.rows.map((row, i) => {
    const element = elements.get(row.element);
    const balanceDb = balances[i];
    return {
      id: row.element,
      name: element ? nameOf(element) : row.element,
      values: element ? mainValues(element) : '',
      standing: standings.get(row.element) ?? '',
      toll: formatDb(row.tollDb, false),
      saved: savedWords(row.savedRangeDb, row.savedIfIdealDb),
      allotted: row.allotmentDb === undefined ? '' : formatDb(row.allotmentDb, false),
      balanceDb,
      bar: Math.abs(balanceDb ?? 0) / largest,
    };
  });
}

export interface SpoilsLine {
  readonly id: string;
  readonly name: string;
  readonly standing: string;
  readonly spoils: string;
  readonly range: string;
}

/** What each element spoils of a return loss, in the order of the channel. */
export function spoilsLines(spoils: Spoils, view: CheckView, document: CompleteChannel): SpoilsLine[] {
  const elements = new Map(document.elements.map((element) => [element.id, element]));
  const standings = new Map(view.elementStandings.map((each) => [each.element, each.standing]));
  return spoils.rows.map(({ element: id, spoilsDb, rangeDb }) => {
    const element = elements.get(id);
    return {
      id,
      name: element ? nameOf(element) : id,
      standing: standings.get(id) ?? '',
      spoils: formatDb(spoilsDb, false),
      range: savedWords(rangeDb, null),
    };
  });
}

function savedWords([low, high]: Ledger['rows'][number]['savedRangeDb'], one: number | null): string {
  if (low === null || high === null) return formatDb(one, false);
  const [a, b] = [formatDb(low, false), formatDb(high, false)];
  return a === b ? a : `${a} to ${b}`;
}
