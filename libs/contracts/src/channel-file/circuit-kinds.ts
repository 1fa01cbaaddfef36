import * as z from 'zod';
import { bounds } from '../bounds';
import { quantity as quantityOf } from '../quantity';
import { elementCommon } from './common';
import * as field from './fields';
import { touchstoneFields } from './touchstone-kind';

export const sqrtLoss = field.lossPerLength(
  'Loss with √f',
  'at 1 GHz; grows with the square root of frequency',
);
export const linearLoss = field.lossPerLength('Loss with f', 'at 1 GHz; grows with frequency');

export const lineFields = {
  z0Ohm: field.impedance(),
  lengthM: field.length(),
  effectivePermittivity: field.permittivity(),
  lossSqrtDbPerM: sqrtLoss.default(0),
  lossLinearDbPerM: linearLoss.default(0),
};

/** Parts in series with each other; at least one is named (checked where the branch is used). */
export const branchFields = {
  resistanceOhm: field.resistance().optional(),
  inductanceH: field.inductance().optional(),
  capacitanceF: field.seriesCapacitance().optional(),
};

const noPart = {
  message: 'There is no part: a resistance, an inductance or a capacitance.',
  params: { mend: 'Give resistanceOhm, inductanceH or capacitanceF; 0 ohm is a short.' },
};
function namesAPart(branch: {
  resistanceOhm?: number;
  inductanceH?: number;
  capacitanceF?: number;
}): boolean {
  return (
    branch.resistanceOhm !== undefined ||
    branch.inductanceH !== undefined ||
    branch.capacitanceF !== undefined
  );
}

export const branch = z.strictObject(branchFields).refine(namesAPart, noPart);
export type Branch = z.output<typeof branch>;

export const pairLoss = z.strictObject({
  sqrtDbPerM: sqrtLoss.default(0),
  linearDbPerM: linearLoss.default(0),
});
const noLoss = { sqrtDbPerM: 0, linearDbPerM: 0 };

export const lineElement = z.strictObject({ kind: z.literal('line'), ...elementCommon, ...lineFields });

export const rlgcLineElement = z.strictObject({
  kind: z.literal('rlgc-line'),
  ...elementCommon,
  resistanceOhmPerM: perLength('resistancePerLength', 'Resistance per length', 'ohm/m'),
  inductanceHPerM: perLength('inductancePerLength', 'Inductance per length', 'nH/m', true),
  conductanceSPerM: perLength('conductancePerLength', 'Conductance per length', 'S/m').default(0),
  capacitanceFPerM: perLength('capacitancePerLength', 'Capacitance per length', 'pF/m', true),
  lengthM: field.length(),
});

export const seriesElement = z
  .strictObject({ kind: z.literal('series'), ...elementCommon, ...branchFields })
  .refine(namesAPart, noPart);

export const shuntElement = z
  .strictObject({ kind: z.literal('shunt'), ...elementCommon, ...branchFields })
  .refine(namesAPart, noPart);

export const stubElement = z
  .strictObject({
    kind: z.literal('stub'),
    ...elementCommon,
    ...lineFields,
    end: z.enum(['open', 'short', 'load'], 'A stub ends open, short or in a load.'),
    load: branch.optional(),
  })
  .refine((stub) => (stub.end === 'load') === (stub.load !== undefined), {
    message: 'A load is given exactly where the stub ends in a load.',
    path: ['load'],
    params: { mend: 'Give the load of a stub with end "load"; leave it out of the others.' },
  });

export const teeElement = z.strictObject({
  kind: z.literal('tee'),
  ...elementCommon,
  near: branch,
  shunt: branch,
  far: branch,
});
export const piElement = z.strictObject({
  kind: z.literal('pi'),
  ...elementCommon,
  near: branch,
  series: branch,
  far: branch,
});

export const transformerElement = z.strictObject({
  kind: z.literal('transformer'),
  ...elementCommon,
  turnsRatio: ratio('Turns ratio', 1e-6, 1e6),
});

export const attenuatorElement = z.strictObject({
  kind: z.literal('attenuator'),
  ...elementCommon,
  attenuationDb: field.lossDb('Attenuation'),
  z0Ohm: field.impedance('Matched impedance'),
});

export const touchstoneElement = z.strictObject({
  kind: z.literal('touchstone'),
  ...elementCommon,
  ...touchstoneFields,
});

export const coupledLineElement = z.strictObject({
  kind: z.literal('coupled-line'),
  ...elementCommon,
  evenZ0Ohm: field.impedance('Even-mode impedance'),
  oddZ0Ohm: field.impedance('Odd-mode impedance'),
  evenEffectivePermittivity: field.permittivity('Even-mode permittivity'),
  oddEffectivePermittivity: field.permittivity('Odd-mode permittivity'),
  lengthM: field.length(),
  evenLoss: pairLoss.default(noLoss),
  oddLoss: pairLoss.default(noLoss),
});

export const linePairElement = z.strictObject({
  kind: z.literal('line-pair'),
  ...elementCommon,
  p: z.strictObject(lineFields),
  n: z.strictObject(lineFields),
});

export const pairSeriesElement = z
  .strictObject({
    kind: z.literal('pair-series'),
    ...elementCommon,
    inductanceH: field.inductance('Inductance of each leg'),
    mutualInductanceH: field.inductance('Mutual inductance'),
  })
  .refine((pair) => pair.mutualInductanceH <= pair.inductanceH, {
    message: 'The mutual inductance can be no larger than the inductance of a leg.',
    path: ['mutualInductanceH'],
    params: { mend: 'Give no more than inductanceH.' },
  });

export const pairShuntElement = z.strictObject({
  kind: z.literal('pair-shunt'),
  ...elementCommon,
  capacitanceF: field.capacitance('Capacitance of each leg to ground'),
  mutualCapacitanceF: field.capacitance('Capacitance between the legs'),
  resistanceOhm: field.impedance('Resistance of each leg to ground').optional(),
  mutualResistanceOhm: field.impedance('Resistance between the legs').optional(),
});

export const budgetLossElement = z.strictObject({
  kind: z.literal('budget-loss'),
  ...elementCommon,
  lossDb: field.lossDb('Loss'),
  atHz: field.frequency('At frequency', { above: 0 }),
  shape: z.enum(
    ['sqrt', 'linear'],
    'The loss falls to 0 with the square root of frequency (sqrt) or with frequency (linear).',
  ),
  returnLossDb: field.lossDb('Return loss').optional(),
  delayS: delay().optional(),
});

/** The kinds a connector's circuit may be made of. */
export const circuitElements = [
  lineElement,
  rlgcLineElement,
  seriesElement,
  shuntElement,
  stubElement,
  teeElement,
  piElement,
  transformerElement,
  attenuatorElement,
  coupledLineElement,
  linePairElement,
  pairSeriesElement,
  pairShuntElement,
  budgetLossElement,
] as const;

export const circuitElement = z.discriminatedUnion('kind', circuitElements, unknownKind(circuitElements));
export type CircuitElement = z.output<typeof circuitElement>;

export const circuit = z
  .array(circuitElement)
  .min(1, 'A circuit needs at least one element.')
  .max(bounds.circuitElements, `A circuit has at most ${bounds.circuitElements} elements.`);

export function unknownKind(schemas: readonly z.ZodType[]) {
  const kinds = schemas.map((schema) => kindOf(schema)).join(', ');
  return {
    error: (issue: { code?: string }) =>
      issue.code === 'invalid_union' ? `The kind is not one of: ${kinds}.` : undefined,
  };
}

export function kindOf(schema: z.ZodType): string {
  return ((schema as z.ZodObject).shape['kind'] as z.ZodLiteral<string>).value;
}

function perLength(
  dimension: 'resistancePerLength' | 'inductancePerLength' | 'conductancePerLength' | 'capacitancePerLength',
  label: string,
  unit: string,
  positive = false,
) {
  return quantityOf({ dimension, label, unit, ...(positive ? { above: 0 } : { min: 0 }), max: 1e12 });
}

function ratio(label: string, min: number, max: number) {
  return quantityOf({ dimension: 'ratio', label, unit: '', min, max });
}

function delay() {
  return quantityOf({ dimension: 'time', label: 'Delay', unit: 'ps', min: 0, max: 1e-3 });
}
