import type { CompleteStackup, Layer, Stackup } from '@tollgate/contracts';

/** A layer with a key that stays with it while it is moved or renamed. */
export interface LayerRow {
  readonly key: string;
  readonly layer: Layer;
}

/** A stackup as the screen edits it. */
export interface StackupRows {
  readonly temperatureC?: number;
  readonly rows: readonly LayerRow[];
}

export function rowsOf(stackup: Stackup): StackupRows {
  const { layers = [], ...rest } = stackup;
  return { ...rest, rows: layers.map((layer, i) => ({ key: `layer-${i + 1}`, layer })) };
}

export function stackupOf({ rows, ...rest }: StackupRows): CompleteStackup {
  return { ...rest, layers: rows.map(({ layer }) => layer) };
}

/** A key no row has yet. */
export function freeKey(rows: readonly LayerRow[]): string {
  let number = rows.length + 1;
  while (rows.some(({ key }) => key === `layer-${number}`)) number += 1;
  return `layer-${number}`;
}

/** A name no layer has yet: what stands there, with the next number behind it. */
export function freeName(rows: readonly LayerRow[], like: string): string {
  const taken = new Set(rows.map(({ layer }) => layer.name));
  if (!taken.has(like)) return like;
  const stem = like.replace(/ \d+$/, '');
  let number = 2;
  while (taken.has(`${stem} ${number}`)) number += 1;
  return `${stem} ${number}`;
}
