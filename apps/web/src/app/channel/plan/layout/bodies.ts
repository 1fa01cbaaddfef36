import type { ChannelElement } from '@tollgate/contracts';

/** How an element is drawn on the plan. */
export type Body = 'trace' | 'via' | 'capacitor' | 'connector' | 'part' | 'loss' | 'lump';

const bodies: Readonly<Record<ChannelElement['kind'], Body>> = {
  trace: 'trace',
  line: 'trace',
  'rlgc-line': 'trace',
  'coupled-line': 'trace',
  'line-pair': 'trace',
  via: 'via',
  capacitor: 'capacitor',
  connector: 'connector',
  touchstone: 'part',
  'budget-loss': 'loss',
  attenuator: 'loss',
  series: 'lump',
  shunt: 'lump',
  stub: 'lump',
  tee: 'lump',
  pi: 'lump',
  transformer: 'lump',
  'pair-series': 'lump',
  'pair-shunt': 'lump',
};

export function bodyOf(kind: ChannelElement['kind']): Body {
  return bodies[kind];
}

/** Size of our symbols in metres: length along the channel from pin to pin, and width. They stand for a part; its outline is not known. */
export const bodySizes: Readonly<
  Record<Exclude<Body, 'trace'>, { readonly lengthM: number; readonly widthM: number }>
> = {
  via: { lengthM: 0, widthM: 0 },
  capacitor: { lengthM: 1e-3, widthM: 1.6e-3 },
  connector: { lengthM: 5e-3, widthM: 12e-3 },
  part: { lengthM: 4e-3, widthM: 4e-3 },
  loss: { lengthM: 2e-3, widthM: 1.6e-3 },
  lump: { lengthM: 0, widthM: 1e-3 },
};
