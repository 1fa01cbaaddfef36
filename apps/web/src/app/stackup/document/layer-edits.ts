import type { Layer } from '@tollgate/contracts';
import { freeKey, freeName, type LayerRow, type StackupRows } from './stackup-rows';
import { newCopper, newDielectric, newMask } from './starting-stackups';

/** What a layer can be told to be: copper by its role. */
export const layerKinds = ['signal', 'plane', 'dielectric', 'soldermask'] as const;
export type LayerKind = (typeof layerKinds)[number];
export const layerKindTitles: Readonly<Record<LayerKind, string>> = {
  signal: 'Signal copper',
  plane: 'Plane copper',
  dielectric: 'Dielectric',
  soldermask: 'Solder mask',
};

export function kindOf(layer: Layer): LayerKind {
  return layer.kind === 'copper' ? layer.role : layer.kind;
}

export function withLayer(stackup: StackupRows, key: string, change: (layer: Layer) => Layer): StackupRows {
  return {
    ...stackup,
    rows: stackup.rows.map((row) => (row.key === key ? { ...row, layer: change(row.layer) } : row)),
  };
}

/** A value of a layer; undefined takes the field away. */
export function withValue(layer: Layer, field: string, value: unknown): Layer {
  const { [field]: _before, ...rest } = layer as unknown as Record<string, unknown>;
  return (value === undefined ? rest : { ...layer, [field]: value }) as unknown as Layer;
}

/** The layer as another kind; what both kinds have stays. */
export function withKind(layer: Layer, kind: LayerKind): Layer {
  if (kindOf(layer) === kind) return layer;
  if (kind === 'signal' || kind === 'plane') {
    if (layer.kind === 'copper') return { ...layer, role: kind };
    return newCopper(layer.name, kind);
  }
  if (layer.kind !== 'copper') return { ...layer, kind };
  return kind === 'soldermask' ? newMask(layer.name) : newDielectric(layer.name);
}

export interface Edited {
  readonly stackup: StackupRows;
  /** The row that is to be selected. */
  readonly key: string;
}

/** A new layer below the one named; with none named, at the bottom. */
export function withNew(stackup: StackupRows, kind: LayerKind, below: string | undefined): Edited {
  const names: Record<LayerKind, string> = {
    signal: 'Signal',
    plane: 'Plane',
    dielectric: 'Dielectric',
    soldermask: 'Mask',
  };
  const name = freeName(stackup.rows, names[kind]);
  const layer =
    kind === 'dielectric'
      ? newDielectric(name)
      : kind === 'soldermask'
        ? newMask(name)
        : newCopper(name, kind);
  return inserted(stackup, layer, below);
}

export function withDuplicate(stackup: StackupRows, key: string): Edited {
  const row = stackup.rows.find((each) => each.key === key)!;
  return inserted(stackup, { ...row.layer, name: freeName(stackup.rows, row.layer.name) }, key);
}

function inserted(stackup: StackupRows, layer: Layer, below: string | undefined): Edited {
  const key = freeKey(stackup.rows);
  const at = below === undefined ? -1 : stackup.rows.findIndex((row) => row.key === below);
  const rows: LayerRow[] = [...stackup.rows];
  rows.splice(at < 0 ? rows.length : at + 1, 0, { key, layer });
  return { stackup: { ...stackup, rows }, key };
}

export function without(stackup: StackupRows, key: string): StackupRows {
  return { ...stackup, rows: stackup.rows.filter((row) => row.key !== key) };
}

export function withMoved(stackup: StackupRows, key: string, by: -1 | 1): StackupRows {
  const from = stackup.rows.findIndex((row) => row.key === key);
  const to = from + by;
  if (from < 0 || to < 0 || to >= stackup.rows.length) return stackup;
  const rows = [...stackup.rows];
  const [row] = rows.splice(from, 1);
  rows.splice(to, 0, row!);
  return { ...stackup, rows };
}
