import type { ChannelElement, CompleteChannel } from '@tollgate/contracts';

export type Shape = 'line' | 'through' | 'hanging' | 'part' | 'loss';

export interface StripPiece {
  readonly id: string;
  readonly shape: Shape;
  readonly x: number;
  readonly width: number;
}

const shapes: Readonly<Record<ChannelElement['kind'], Shape>> = {
  line: 'line',
  'rlgc-line': 'line',
  'coupled-line': 'line',
  'line-pair': 'line',
  trace: 'line',
  series: 'through',
  capacitor: 'through',
  'pair-series': 'through',
  transformer: 'through',
  attenuator: 'loss',
  'budget-loss': 'loss',
  shunt: 'hanging',
  'pair-shunt': 'hanging',
  stub: 'hanging',
  tee: 'hanging',
  pi: 'hanging',
  via: 'hanging',
  connector: 'part',
  touchstone: 'part',
};

const lumpWidth = 34;

/** How long a piece is to the eye: lines by the root of their length, so that a stub stays visible beside a backplane. */
function weight(element: ChannelElement): number {
  const length =
    element.kind === 'line-pair' ? element.p.lengthM : 'lengthM' in element ? element.lengthM : undefined;
  return element.kind === 'stub' || length === undefined ? 0 : Math.sqrt(length);
}

/** The elements side by side over a width, lumped ones in a fixed width, lines sharing what is left. */
export function stripPieces({ elements }: CompleteChannel, width: number): StripPiece[] {
  const lumps = elements.filter((element) => shapes[element.kind] !== 'line').length;
  const fixed = Math.min(lumpWidth, (0.7 * width) / Math.max(1, elements.length));
  const total = elements.reduce(
    (sum, element) => sum + (shapes[element.kind] === 'line' ? weight(element) : 0),
    0,
  );
  const lines = elements.length - lumps;
  const least = Math.min(24, (width - lumps * fixed) / Math.max(1, lines));
  const free = width - lumps * fixed - lines * least;
  let x = 0;
  return elements.map((element) => {
    const shape = shapes[element.kind];
    const share = total > 0 ? weight(element) / total : 1 / Math.max(1, lines);
    const own = shape === 'line' ? least + free * share : fixed;
    const piece = { id: element.id, shape, x, width: own };
    x += own;
    return piece;
  });
}
