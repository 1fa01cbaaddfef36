import type * as z from 'zod';
import { quantityField, type QuantityField } from '../quantity';
import { elementSchemas, type ChannelElement, type ElementKind } from './channel-file';
import { kindOf } from './circuit-kinds';
import type { Signaling } from './common';
import type { Stackup } from './stackup';

/** Where a kind may stand: single-ended channels, pairs, or both (then once in each leg of a pair). */
export type KindUse = Signaling | 'both';

export interface KindDescription {
  readonly kind: ElementKind;
  /** As menus and ledgers name it. */
  readonly title: string;
  readonly summary: string;
  /** Letter in front of the number in an id: T1, V2. */
  readonly prefix: string;
  readonly use: KindUse;
  readonly group: 'board' | 'part' | 'circuit';
}

const descriptions: Record<ElementKind, Omit<KindDescription, 'kind'>> = {
  trace: {
    title: 'Trace',
    summary: 'A routed segment on a layer of the stackup',
    prefix: 'T',
    use: 'both',
    group: 'board',
  },
  via: {
    title: 'Via',
    summary: 'A barrel between two layers, with its stubs',
    prefix: 'V',
    use: 'both',
    group: 'board',
  },
  connector: {
    title: 'Connector',
    summary: 'A connector, measured or as a circuit',
    prefix: 'J',
    use: 'both',
    group: 'part',
  },
  capacitor: {
    title: 'AC-coupling capacitor',
    summary: 'A series capacitor with its pads',
    prefix: 'C',
    use: 'both',
    group: 'part',
  },
  touchstone: {
    title: 'Measured part',
    summary: 'A part given by its Touchstone file',
    prefix: 'M',
    use: 'both',
    group: 'part',
  },
  'budget-loss': {
    title: 'Budgeted loss',
    summary: 'A placeholder until the real part is known',
    prefix: 'B',
    use: 'both',
    group: 'part',
  },
  line: {
    title: 'Line',
    summary: 'A uniform line by impedance, permittivity and loss',
    prefix: 'L',
    use: 'both',
    group: 'circuit',
  },
  'rlgc-line': {
    title: 'RLGC line',
    summary: 'A uniform line by its constants per length',
    prefix: 'L',
    use: 'both',
    group: 'circuit',
  },
  'coupled-line': {
    title: 'Coupled line',
    summary: 'A symmetric pair by its even and odd modes',
    prefix: 'L',
    use: 'differential',
    group: 'circuit',
  },
  'line-pair': {
    title: 'Uncoupled pair',
    summary: 'Two separate legs, for skew',
    prefix: 'L',
    use: 'differential',
    group: 'circuit',
  },
  series: {
    title: 'Series part',
    summary: 'R, L, C in the through path',
    prefix: 'S',
    use: 'both',
    group: 'circuit',
  },
  shunt: {
    title: 'Shunt part',
    summary: 'R, L, C from the path to ground',
    prefix: 'P',
    use: 'both',
    group: 'circuit',
  },
  stub: {
    title: 'Stub',
    summary: 'A line in shunt, closed at its far end',
    prefix: 'U',
    use: 'both',
    group: 'circuit',
  },
  tee: { title: 'Tee', summary: 'Series, shunt, series', prefix: 'N', use: 'both', group: 'circuit' },
  pi: { title: 'Pi', summary: 'Shunt, series, shunt', prefix: 'N', use: 'both', group: 'circuit' },
  transformer: { title: 'Transformer', summary: 'Ideal, n to 1', prefix: 'X', use: 'both', group: 'circuit' },
  attenuator: {
    title: 'Attenuator',
    summary: 'Matched in its own impedance',
    prefix: 'A',
    use: 'both',
    group: 'circuit',
  },
  'pair-series': {
    title: 'Pair inductance',
    summary: 'An inductance in each leg, coupled',
    prefix: 'S',
    use: 'differential',
    group: 'circuit',
  },
  'pair-shunt': {
    title: 'Pair capacitance',
    summary: 'Capacitances to ground and between the legs',
    prefix: 'P',
    use: 'differential',
    group: 'circuit',
  },
};

export const elementKinds: readonly KindDescription[] = (Object.keys(descriptions) as ElementKind[]).map(
  (kind) => ({
    kind,
    ...descriptions[kind],
  }),
);

export function kindDescription(kind: ElementKind): KindDescription {
  return { kind, ...descriptions[kind] };
}

/** One row of an element's form: the path inside the element (`['near', 'resistanceOhm']`) and its quantity. */
export interface ElementQuantity extends QuantityField {
  readonly path: readonly string[];
  readonly optional: boolean;
  readonly default?: number;
}

const notInForms = new Set(['allotmentDb', 'plan', 'circuit']);

/** Every quantity of a kind in the order of the schema, nested ones with their path; forms are built from it. */
export function elementQuantities(kind: ElementKind): ElementQuantity[] {
  const schema = elementSchemas.find((candidate) => kindOf(candidate) === kind)!;
  return quantitiesIn(schema, []);
}

function quantitiesIn(schema: z.ZodType, path: readonly string[]): ElementQuantity[] {
  const shape = shapeOf(schema);
  if (!shape) return [];
  return Object.entries(shape).flatMap(([name, inner]) => {
    if (path.length === 0 && notInForms.has(name)) return [];
    const field = quantityField(inner);
    return field ? [{ ...field, path: [...path, name] }] : quantitiesIn(inner, [...path, name]);
  });
}

function shapeOf(schema: z.ZodType): Record<string, z.ZodType> | undefined {
  const unwrapped = 'unwrap' in schema ? (schema as unknown as { unwrap(): z.ZodType }).unwrap() : schema;
  return 'shape' in unwrapped
    ? (unwrapped as unknown as { shape: Record<string, z.ZodType> }).shape
    : undefined;
}

/** A new element with values that a person would start from, on layers of the stackup; each is then edited in the form. */
export function newElement(kind: ElementKind, signaling: Signaling, stackup?: Stackup): ChannelElement {
  const signals = (stackup?.layers ?? []).flatMap((layer) =>
    layer.kind === 'copper' && layer.role === 'signal' ? [layer.name] : [],
  );
  const starts: { [Kind in ElementKind]: () => Extract<ChannelElement, { kind: Kind }> } = {
    line: () => ({ kind: 'line', ...startLine }),
    'rlgc-line': () => ({
      kind: 'rlgc-line',
      resistanceOhmPerM: 5,
      inductanceHPerM: 350e-9,
      conductanceSPerM: 0,
      capacitanceFPerM: 140e-12,
      lengthM: 0.02,
    }),
    'coupled-line': () => ({
      kind: 'coupled-line',
      evenZ0Ohm: 55,
      oddZ0Ohm: 46,
      evenEffectivePermittivity: 3.6,
      oddEffectivePermittivity: 3.6,
      lengthM: 0.02,
      evenLoss: startLoss,
      oddLoss: startLoss,
    }),
    'line-pair': () => ({ kind: 'line-pair', p: startLine, n: startLine }),
    series: () => ({ kind: 'series', resistanceOhm: 1 }),
    shunt: () => ({ kind: 'shunt', capacitanceF: 50e-15 }),
    stub: () => ({ kind: 'stub', ...startLine, lengthM: 0.001, end: 'open' }),
    tee: () => ({
      kind: 'tee',
      near: { inductanceH: 100e-12 },
      shunt: { capacitanceF: 80e-15 },
      far: { inductanceH: 100e-12 },
    }),
    pi: () => ({
      kind: 'pi',
      near: { capacitanceF: 40e-15 },
      series: { inductanceH: 200e-12 },
      far: { capacitanceF: 40e-15 },
    }),
    transformer: () => ({ kind: 'transformer', turnsRatio: 1 }),
    attenuator: () => ({ kind: 'attenuator', attenuationDb: 3, z0Ohm: 50 }),
    'pair-series': () => ({ kind: 'pair-series', inductanceH: 200e-12, mutualInductanceH: 40e-12 }),
    'pair-shunt': () => ({ kind: 'pair-shunt', capacitanceF: 40e-15, mutualCapacitanceF: 10e-15 }),
    'budget-loss': () => ({ kind: 'budget-loss', lossDb: 1, atHz: 10e9, shape: 'sqrt' }),
    capacitor: () => ({
      kind: 'capacitor',
      capacitanceF: 100e-9,
      seriesInductanceH: 300e-12,
      seriesResistanceOhm: 0.05,
      padCapacitanceF: 40e-15,
    }),
    connector: () => ({
      kind: 'connector',
      ...startPart,
      circuit: [{ kind: 'series', inductanceH: 200e-12 }],
    }),
    touchstone: () => ({ kind: 'touchstone', ...startPart }),
    trace: () => ({
      kind: 'trace',
      layer: signals[0] ?? '',
      widthM: 100e-6,
      lengthM: 0.02,
      ...(signaling === 'differential' ? { gapM: 150e-6 } : {}),
    }),
    via: () => ({
      kind: 'via',
      fromLayer: signals[0] ?? '',
      toLayer: signals.at(-1) ?? '',
      drillM: 250e-6,
      padM: 500e-6,
      antipadM: 800e-6,
      ...(signaling === 'differential' ? { pitchM: 1e-3 } : {}),
    }),
  };
  return starts[kind]();
}

const startLine = {
  z0Ohm: 50,
  lengthM: 0.02,
  effectivePermittivity: 3.6,
  lossSqrtDbPerM: 4,
  lossLinearDbPerM: 2,
};
const startLoss = { sqrtDbPerM: 4, linearDbPerM: 2 };
const startPart = { interpolation: 'polar', reversed: false, below: 'refuse', above: 'refuse' } as const;
