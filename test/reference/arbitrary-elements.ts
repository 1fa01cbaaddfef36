import fc from 'fast-check';

/** Random elements as a person might write them. */
export type Element = Record<string, unknown> & { kind: string };
export type Arbitrary<T> = fc.Arbitrary<T>;

/** Even over the range: fast-check's own doubles are even over their exponents, and most would be next to nothing. */
export const real = (min: number, max: number): Arbitrary<number> =>
  fc.integer({ min: 0, max: 1_000_000 }).map((k) => min + ((max - min) * k) / 1_000_000);
/** Even over the decades from `min` to `max`. */
export const decades = (min: number, max: number): Arbitrary<number> =>
  real(Math.log10(min), Math.log10(max)).map((exponent) => 10 ** exponent);
const maybe = (value: Arbitrary<number>): Arbitrary<number | undefined> =>
  fc.option(value, { nil: undefined });
export const element = (kind: string, fields: Record<string, Arbitrary<unknown>>): Arbitrary<Element> =>
  fc.record(fields).map((rest) => ({ kind, ...rest }));

export const lineFields = {
  z0Ohm: real(25, 120),
  lengthM: decades(3e-4, 0.08),
  effectivePermittivity: real(1, 6),
  lossSqrtDbPerM: fc.oneof(fc.constant(0), real(0, 12)),
  lossLinearDbPerM: fc.oneof(fc.constant(0), real(0, 8)),
};

/** Parts in series with each other; at least one is there. */
const branch = (ohm: [number, number], henry: [number, number], farad: [number, number]) =>
  fc
    .record({
      resistanceOhm: maybe(decades(...ohm)),
      inductanceH: maybe(decades(...henry)),
      capacitanceF: maybe(decades(...farad)),
    })
    .map((parts) =>
      Object.values(parts).some((value) => value !== undefined) ? parts : { resistanceOhm: ohm[1] },
    );

const inPath = branch([0.1, 30], [1e-11, 2e-9], [1e-12, 1e-7]);
const toGround = branch([20, 5000], [1e-9, 1e-7], [1e-14, 1e-12]);
const pairLoss = fc.record({ sqrtDbPerM: real(0, 12), linearDbPerM: real(0, 8) });

export const oneLegKinds: Arbitrary<Element>[] = [
  element('line', lineFields),
  element('line', lineFields),
  element('rlgc-line', {
    resistanceOhmPerM: fc.oneof(fc.constant(0), decades(0.1, 100)),
    inductanceHPerM: real(1.5e-7, 6e-7),
    conductanceSPerM: fc.oneof(fc.constant(0), decades(1e-6, 1e-2)),
    capacitanceFPerM: real(5e-11, 2e-10),
    lengthM: decades(1e-4, 0.1),
  }),
  inPath.map((parts) => ({ kind: 'series', ...parts })),
  toGround.map((parts) => ({ kind: 'shunt', ...parts })),
  element('stub', { ...lineFields, lengthM: decades(3e-4, 0.03), end: fc.constantFrom('open', 'short') }),
  element('stub', { ...lineFields, lengthM: decades(3e-4, 0.03), end: fc.constant('load'), load: toGround }),
  element('tee', { near: inPath, shunt: toGround, far: inPath }),
  element('pi', { near: toGround, series: inPath, far: toGround }),
  element('transformer', { turnsRatio: real(0.5, 2) }),
  element('attenuator', { attenuationDb: real(0, 6), z0Ohm: real(30, 90) }),
  element('budget-loss', {
    lossDb: real(0, 3),
    atHz: decades(1e9, 2e10),
    shape: fc.constantFrom('sqrt', 'linear'),
    returnLossDb: maybe(real(10, 40)),
    delayS: maybe(decades(1e-12, 1e-9)),
  }),
];

export const capacitor = element('capacitor', {
  capacitanceF: decades(1e-9, 1e-6),
  seriesInductanceH: decades(1e-10, 1e-9),
  seriesResistanceOhm: real(0, 0.5),
  padCapacitanceF: fc.oneof(fc.constant(0), decades(1e-14, 3e-13)),
});

const coupledFields = {
  evenZ0Ohm: real(45, 90),
  oddZ0Ohm: real(25, 60),
  evenEffectivePermittivity: real(1, 6),
  oddEffectivePermittivity: real(1, 6),
  lengthM: decades(3e-4, 0.08),
};

export const pairKinds: Arbitrary<Element>[] = [
  element('coupled-line', { ...coupledFields, evenLoss: pairLoss, oddLoss: pairLoss }),
  element('line-pair', { p: fc.record(lineFields), n: fc.record(lineFields) }),
  fc.tuple(decades(1e-11, 3e-9), real(0, 0.9)).map(([inductanceH, coupling]) => {
    return { kind: 'pair-series', inductanceH, mutualInductanceH: inductanceH * coupling };
  }),
  element('pair-shunt', {
    capacitanceF: decades(1e-14, 5e-13),
    mutualCapacitanceF: decades(1e-15, 2e-13),
    resistanceOhm: maybe(decades(100, 1e5)),
    mutualResistanceOhm: maybe(decades(100, 1e5)),
  }),
];

/** Those kinds that a circuit analysis has too: lines without loss, or of constant R, L and C a metre. */
const withoutLoss = { ...lineFields, lossSqrtDbPerM: fc.constant(0), lossLinearDbPerM: fc.constant(0) };
const stubFields = { ...withoutLoss, lengthM: decades(3e-4, 0.03) };
export const spiceKinds: Arbitrary<Element>[] = [
  element('line', withoutLoss),
  element('rlgc-line', {
    resistanceOhmPerM: decades(0.1, 100),
    inductanceHPerM: real(1.5e-7, 6e-7),
    conductanceSPerM: fc.constant(0),
    capacitanceFPerM: real(5e-11, 2e-10),
    lengthM: decades(1e-3, 0.1),
  }),
  inPath.map((parts) => ({ kind: 'series', ...parts })),
  toGround.map((parts) => ({ kind: 'shunt', ...parts })),
  element('stub', { ...stubFields, end: fc.constantFrom('open', 'short') }),
  element('stub', { ...stubFields, end: fc.constant('load'), load: toGround }),
  element('tee', { near: inPath, shunt: toGround, far: inPath }),
  element('pi', { near: toGround, series: inPath, far: toGround }),
  element('transformer', { turnsRatio: real(0.5, 2) }),
  element('attenuator', { attenuationDb: real(0.1, 6), z0Ohm: real(30, 90) }),
];
const noLoss = fc.constant({ sqrtDbPerM: 0, linearDbPerM: 0 });
export const spicePairKinds: Arbitrary<Element>[] = [
  element('coupled-line', { ...coupledFields, evenLoss: noLoss, oddLoss: noLoss }),
  element('line-pair', { p: fc.record(withoutLoss), n: fc.record(withoutLoss) }),
  ...pairKinds.slice(2),
];
