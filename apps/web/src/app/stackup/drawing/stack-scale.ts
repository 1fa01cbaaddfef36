import type { Layer } from '@tollgate/contracts';

export interface DrawnLayer {
  readonly name: string;
  readonly kind: 'signal' | 'plane' | 'dielectric' | 'soldermask';
  readonly yPx: number;
  readonly heightPx: number;
  /** Where its words stand: beside it, or as near as the words of its neighbours leave. */
  readonly labelPx: number;
  /** Nothing but mask or air lies beside its copper. */
  readonly outer: boolean;
}

export interface DrawnStack {
  readonly heightPx: number;
  readonly layers: readonly DrawnLayer[];
}

const leastPx = 360;
const lineHeightPx = 18;
/** A layer's share of the height, near that of its row in the table beside. */
const rowPx = 28;

/** Layers in one scale from top to bottom; the picture grows with their number, so that each has a line of words. */
export function drawnStack(layers: readonly Layer[]): DrawnStack {
  const heightPx = Math.max(leastPx, layers.length * rowPx);
  const totalM = layers.reduce((sum, { thicknessM }) => sum + thicknessM, 0);
  const pxPerM = totalM > 0 ? heightPx / totalM : 0;
  const copper = layers.flatMap(({ kind }, i) => (kind === 'copper' ? [i] : []));
  let yPx = 0;
  const placed = layers.map((layer, i) => {
    const drawn = { yPx, heightPx: layer.thicknessM * pxPerM };
    yPx += drawn.heightPx;
    return {
      name: layer.name,
      kind: layer.kind === 'copper' ? layer.role : layer.kind,
      outer: i === copper[0] || i === copper.at(-1),
      ...drawn,
    };
  });
  const labels = spread(
    placed.map((layer) => layer.yPx + layer.heightPx / 2),
    lineHeightPx,
    heightPx,
  );
  return { heightPx, layers: placed.map((layer, i) => ({ ...layer, labelPx: labels[i]! })) };
}

/**
 * Places in ascending order, moved apart to at least `apart` and kept within 0 to `end`: down where the one above needs
 * room, then up again from the end.
 */
export function spread(wanted: readonly number[], apart: number, end: number): number[] {
  const half = apart / 2;
  const places: number[] = [];
  for (const place of wanted) places.push(Math.max(place, (places.at(-1) ?? half - apart) + apart));
  for (let i = places.length - 1, most = end - half; i >= 0; i--, most -= apart) {
    most = Math.min(most, i + 1 < places.length ? places[i + 1]! - apart : most);
    places[i] = Math.min(places[i]!, most);
  }
  return places;
}
