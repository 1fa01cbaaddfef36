/** A column of the data table. A cell shows `text`, or the template given for the column with `tgCell`. */
export interface Column<Row> {
  /** Stands in the address when the table is sorted by it. */
  readonly key: string;
  readonly title: string;
  /** The head is for screen readers only: a column of links says itself what it does. */
  readonly hiddenTitle?: boolean;
  readonly text?: (row: Row) => string;
  /** What sorting compares; left out, the column does not sort. Nulls come last in both directions. */
  readonly sortBy?: (row: Row) => string | number | null;
  /** Numbers stand at the end. */
  readonly align?: 'start' | 'end';
  /** A CSS width, such as '120px'. */
  readonly width?: string;
}

export interface Order {
  readonly key: string;
  readonly descending: boolean;
}

/** Reads `name` or `-name`. */
export function readOrder(text: string | null): Order | undefined {
  if (!text) return undefined;
  return text.startsWith('-') ? { key: text.slice(1), descending: true } : { key: text, descending: false };
}

export function writeOrder(order: Order): string {
  return order.descending ? `-${order.key}` : order.key;
}

const collator = new Intl.Collator('en', { numeric: true, sensitivity: 'base' });

/** The rows in order, as a new list; rows that compare equal keep theirs. */
export function ordered<Row>(
  rows: readonly Row[],
  columns: readonly Column<Row>[],
  order: Order | undefined,
): readonly Row[] {
  const value = columns.find((column) => column.key === order?.key)?.sortBy;
  if (!order || !value) return rows;
  const sign = order.descending ? -1 : 1;
  return rows.slice().sort((a, b) => {
    const left = value(a);
    const right = value(b);
    if (left === null || right === null) return Number(left === null) - Number(right === null);
    return (
      sign *
      (typeof left === 'number' && typeof right === 'number'
        ? left - right
        : collator.compare(String(left), String(right)))
    );
  });
}
