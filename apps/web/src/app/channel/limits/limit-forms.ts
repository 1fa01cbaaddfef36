import {
  freeId,
  limitQuantities,
  limitStatuses,
  type CompleteChannel,
  type Limit,
  type MaskSet,
  type QuantityField,
} from '@tollgate/contracts';
import type { PlacedLimit } from '../document/element-edits';
import { quantityTitle } from './verdict-lines';

export type Form = 'segments' | 'points' | 'single';

export const quantityPicks = limitQuantities.map((value) => ({ value, title: quantityTitle(value) }));
export const statusPicks = limitStatuses.map((value) => ({
  value,
  title: value === 'own' ? 'our own' : value,
}));
export const sensePicks = [
  { value: 'max', title: 'at most' },
  { value: 'min', title: 'at least' },
];
export const formPicks = [
  { value: 'segments', title: 'a formula' },
  { value: 'points', title: 'points' },
  { value: 'single', title: 'one frequency' },
];
export const interpolationPicks = [
  { value: 'linear', title: 'linear in f' },
  { value: 'log', title: 'logarithmic in f' },
];
export const basisPicks = [
  { value: 'line', title: 'a line in f and its root' },
  { value: 'weighted', title: 'weighted by the loss' },
];

const frequency = (label: string, above?: number): QuantityField => ({
  dimension: 'frequency',
  label,
  unit: 'GHz',
  max: 1e13,
  ...(above === undefined ? { min: 0 } : { above }),
});
export const fields = {
  from: frequency('From'),
  to: frequency('To', 0),
  at: frequency('At', 0),
  fitFrom: frequency('Fitted from'),
  fitTo: frequency('Fitted to', 0),
  db: { dimension: 'loss', label: 'Limit', unit: 'dB', min: -1000, max: 1000 },
  reference: { dimension: 'resistance', label: 'Reference', unit: 'ohm', above: 0, max: 1e5 },
} satisfies Record<string, QuantityField>;

export function formOf(limit: Limit): Form {
  if (limit.segments) return 'segments';
  return limit.points ? 'points' : 'single';
}

/** A limit of one's own to start from: 10 dB at the top of what the channel is for. */
export function ownLimit(document: CompleteChannel): PlacedLimit {
  const id = freeId('limit-', new Set(document.limits.map((limit) => limit.id)));
  const atHz = document.evaluationHz ?? (document.symbolRateBd ? document.symbolRateBd / 2 : 10e9);
  return { id, title: 'Own limit', quantity: 'insertion-loss', sense: 'max', atHz, db: 10, status: 'own' };
}

/** The limit given another way; what can be carried over is. */
export function inForm(limit: PlacedLimit, form: Form): PlacedLimit {
  if (form === formOf(limit)) return limit;
  const { segments, points, interpolation: _joined, atHz, db, ...rest } = limit;
  const topHz = segments?.at(-1)?.toHz ?? points?.at(-1)?.[0] ?? atHz ?? 10e9;
  const level = db ?? points?.at(-1)?.[1] ?? 10;
  if (form === 'segments') {
    return { ...rest, segments: [{ fromHz: Math.min(50e6, topHz / 2), toHz: topHz, formula: `${level}` }] };
  }
  if (form === 'points') {
    const given: [number, number][] = [
      [Math.min(50e6, topHz / 2), level],
      [topHz, level],
    ];
    return { ...rest, points: given, interpolation: 'linear' };
  }
  return { ...rest, atHz: topHz, db: level };
}

/** Fields that a quantity needs, or may not have. */
export function ofQuantity(limit: PlacedLimit, quantity: Limit['quantity']): PlacedLimit {
  const { parameter, fit, ...rest } = limit;
  const sense = quantity.includes('return-loss') ? 'min' : limit.sense;
  const next: PlacedLimit = { ...rest, quantity, sense };
  if (quantity === 'mode-conversion') return { ...next, parameter: parameter ?? 'SCD21', sense: 'min' };
  if (quantity === 'fitted-attenuation' || quantity === 'insertion-loss-deviation') {
    return { ...next, fit: fit ?? { basis: 'line', fromHz: 50e6, toHz: 10e9 } };
  }
  return next;
}

/** Whose numbers were changed by hand is no longer the mask set's limit: its revision is not named any more. */
export function asOwnNumbers(limit: PlacedLimit): PlacedLimit {
  if (typeof limit.source !== 'object' || limit.source.itemRevision === undefined) return limit;
  const { itemRevision: _revision, ...source } = limit.source;
  const text = source.text ? `after ${source.text.replace(/^after /, '')}` : undefined;
  const kept = text === undefined ? source : { ...source, text };
  return {
    ...limit,
    status: 'own',
    ...(Object.keys(kept).length ? { source: kept } : { source: undefined }),
  };
}

/** The limits of a mask set, by value, as they go into a channel. */
export function limitsOfSet(set: MaskSet, document: CompleteChannel): PlacedLimit[] {
  const taken = new Set(document.limits.map((limit) => limit.id));
  return set.limits.map((limit) => ({
    ...limit,
    id: freeId('limit-', taken),
    status: limit.status ?? set.status,
    from: limit.from ?? (set.from || undefined),
    to: limit.to ?? (set.to || undefined),
    referenceOhm: limit.referenceOhm ?? set.referenceOhm,
    beyond: limit.beyond ?? (set.beyond.length ? [...set.beyond] : undefined),
    source: { text: `${set.standard}, ${set.clause}`, itemRevision: set.revisionId },
  }));
}
