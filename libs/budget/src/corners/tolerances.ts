import type { ChannelElement, CompleteChannel, CornerName, Layer } from '@tollgate/contracts';

/** What a fabricator may miss. */
export const tolerancedQuantities = [
  'dk',
  'df',
  'dielectric thickness',
  'copper thickness',
  'width',
  'gap',
] as const;
export type TolerancedQuantity = (typeof tolerancedQuantities)[number];

/** One tolerance: a quantity on one layer, the layer varying as one over the whole channel. */
export interface Tolerance {
  readonly quantity: TolerancedQuantity;
  readonly layer: string;
}

/** Which way each quantity moves at a corner; common practice, from the closed forms of impedance and attenuation. */
const moves: Readonly<
  Record<Exclude<CornerName, 'nominal'>, Readonly<Record<TolerancedQuantity, 1 | -1 | 0>>>
> = {
  // Thin dielectric and narrow, thin copper crowd the current; Dk and Df raise what the laminate takes.
  'most-loss': { dk: 1, df: 1, 'dielectric thickness': -1, 'copper thickness': -1, width: -1, gap: -1 },
  'lowest-impedance': { dk: 1, df: 0, 'dielectric thickness': -1, 'copper thickness': 1, width: 1, gap: -1 },
  'highest-impedance': {
    dk: -1,
    df: 0,
    'dielectric thickness': 1,
    'copper thickness': -1,
    width: -1,
    gap: 1,
  },
};

export const corners = [
  'most-loss',
  'lowest-impedance',
  'highest-impedance',
] as const satisfies readonly CornerName[];
export type Corner = (typeof corners)[number];

type Trace = Extract<ChannelElement, { kind: 'trace' }>;

/** The tolerances that a channel's stackup and traces state; only of layers that its traces and vias can meet. */
export function tolerancesOf(channel: CompleteChannel): Tolerance[] {
  const layers = channel.stackup?.layers ?? [];
  const onStackup = ['trace', 'via', 'capacitor'];
  if (!channel.elements.some(({ kind }) => onStackup.includes(kind))) return [];
  const found: Tolerance[] = layers.flatMap((layer) => {
    const quantities: [TolerancedQuantity, number | undefined][] =
      layer.kind === 'copper'
        ? [['copper thickness', layer.thicknessToleranceM]]
        : [
            ['dk', layer.dkTolerance],
            ['df', layer.dfTolerance],
            ['dielectric thickness', layer.thicknessToleranceM],
          ];
    return quantities
      .filter(([, tolerance]) => (tolerance ?? 0) > 0)
      .map(([quantity]) => ({ quantity, layer: layer.name }));
  });
  const routed = new Set(channel.elements.flatMap((each) => (each.kind === 'trace' ? [each] : [])));
  for (const quantity of ['width', 'gap'] as const) {
    const wide = new Set([...routed].filter((trace) => toleranceOfTrace(channel, trace)[quantity] > 0));
    for (const layer of new Set([...wide].map((trace) => trace.layer))) found.push({ quantity, layer });
  }
  return found;
}

function toleranceOfTrace({ stackup }: CompleteChannel, trace: Trace): { width: number; gap: number } {
  const layer = stackup?.layers?.find((each) => each.name === trace.layer);
  const ofLayer = layer?.kind === 'copper' ? layer.widthToleranceM : undefined;
  return { width: trace.widthToleranceM ?? ofLayer ?? 0, gap: trace.gapToleranceM ?? 0 };
}

/** The channel at a corner, with all of `tolerances` taken up. */
export function atCorner(
  channel: CompleteChannel,
  corner: Corner,
  tolerances: readonly Tolerance[],
): CompleteChannel {
  const shift = (quantity: TolerancedQuantity, layer: string): number =>
    tolerances.some((each) => each.quantity === quantity && each.layer === layer)
      ? moves[corner][quantity]
      : 0;
  return {
    ...channel,
    stackup: channel.stackup && {
      ...channel.stackup,
      layers: channel.stackup.layers?.map((layer) => movedLayer(layer, (q) => shift(q, layer.name))),
    },
    elements: channel.elements.map((element) =>
      element.kind === 'trace' ? movedTrace(channel, element, (q) => shift(q, element.layer)) : element,
    ),
  };
}

function movedLayer(layer: Layer, shift: (quantity: TolerancedQuantity) => number): Layer {
  const thicker = (quantity: TolerancedQuantity) =>
    moved(layer.thicknessM, shift(quantity) * (layer.thicknessToleranceM ?? 0));
  if (layer.kind === 'copper') return { ...layer, thicknessM: thicker('copper thickness') };
  const point = <Point extends { dk: number; df: number }>(at: Point): Point => ({
    ...at,
    dk: Math.max(1, at.dk + shift('dk') * (layer.dkTolerance ?? 0)),
    df: Math.max(0, at.df + shift('df') * (layer.dfTolerance ?? 0)),
  });
  return {
    ...point(layer),
    thicknessM: thicker('dielectric thickness'),
    ...(layer.furtherPoints ? { furtherPoints: layer.furtherPoints.map(point) } : {}),
  };
}

/** Where a pair's gap has no tolerance of its own the legs keep their pitch: what the width gains the gap loses. */
function movedTrace<Element extends Trace>(
  channel: CompleteChannel,
  trace: Element,
  shift: (quantity: TolerancedQuantity) => number,
): Element {
  const tolerance = toleranceOfTrace(channel, trace);
  const wider = shift('width') * tolerance.width;
  const widthM = moved(trace.widthM, wider);
  if (trace.gapM === undefined) return { ...trace, widthM };
  const further = tolerance.gap > 0 ? shift('gap') * tolerance.gap : trace.widthM - widthM;
  return { ...trace, widthM, gapM: moved(trace.gapM, further) };
}

/** No tolerance leaves less than a tenth of the thing. */
function moved(value: number, by: number): number {
  return Math.max(value + by, value / 10);
}
