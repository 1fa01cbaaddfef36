import * as z from 'zod';
import { bounds } from '../bounds';
import { quantity } from '../quantity';
import { line, notes } from '../text';
import * as circuitKinds from './circuit-kinds';
import { identifier, reflectionAllotment, signalings } from './common';
import * as field from './fields';
import { limit } from './limits';
import * as physicalKinds from './physical-kinds';
import { stackup } from './stackup';

export const channelFormat = 'tollgate.channel/1';

export const elementSchemas = [
  ...circuitKinds.circuitElements,
  circuitKinds.touchstoneElement,
  physicalKinds.traceElement,
  physicalKinds.viaElement,
  physicalKinds.connectorElement,
  physicalKinds.capacitorElement,
] as const;

export const element = z.discriminatedUnion('kind', elementSchemas, circuitKinds.unknownKind(elementSchemas));
export type ChannelElement = z.output<typeof element>;
export type ElementKind = ChannelElement['kind'];
export type ElementOf<Kind extends ElementKind> = Extract<ChannelElement, { kind: Kind }>;

const ohms = field.impedance('Reference impedance');
const reactance = quantity({
  dimension: 'resistance',
  label: 'Imaginary part',
  unit: 'ohm',
  min: -1e6,
  max: 1e6,
});
const portReference = z.union([ohms, z.tuple([ohms, reactance])]);

export const grid = z.union([
  z
    .strictObject({
      startHz: field.frequency('Start'),
      stopHz: field.frequency('Stop', { above: 0 }),
      points: z
        .int('The number of points is a whole number.')
        .min(bounds.gridPoints.min, `A grid has at least ${bounds.gridPoints.min} points.`)
        .max(bounds.gridPoints.max, `A grid has at most ${bounds.gridPoints.max} points.`),
      spacing: z.enum(['linear', 'log'], 'Spacing is linear or log.').default('linear'),
    })
    .refine((range) => range.stopHz > range.startHz, {
      message: 'The grid must end above its start.',
      path: ['stopHz'],
      params: { mend: 'Give a stop above the start.' },
    })
    .refine((range) => range.spacing === 'linear' || range.startHz > 0, {
      message: 'A logarithmic grid cannot start at 0 Hz.',
      path: ['startHz'],
      params: { mend: 'Start above 0 Hz, or space the grid linear.' },
    }),
  z.strictObject({
    frequenciesHz: z
      .array(field.frequency('Frequency'))
      .min(bounds.gridPoints.min, `A grid has at least ${bounds.gridPoints.min} points.`)
      .max(bounds.gridPoints.max, `A grid has at most ${bounds.gridPoints.max} points.`)
      .superRefine((frequencies, context) => {
        const at = frequencies.findIndex((value, i) => i > 0 && value <= frequencies[i - 1]!);
        if (at > 0)
          context.addIssue({
            code: 'custom',
            path: [at],
            message: 'Frequencies must ascend, each larger than the one before.',
            params: { mend: 'Sort them upwards and give each one once.' },
          });
      }),
  }),
]);
export type Grid = z.output<typeof grid>;

/** Shape and bounds of a channel file; what needs the elements together is checked by libs/budget readChannel. */
export const channelFile = z
  .strictObject({
    format: z.literal(channelFormat, `The format must be "${channelFormat}".`),
    name: line('Name'),
    signaling: z.enum(signalings, 'Signaling is single-ended or differential.'),
    referenceOhm: z.union([ohms, z.array(portReference).min(2).max(4)]).default(50),
    symbolRateBd: quantity({
      dimension: 'symbolRate',
      label: 'Symbol rate',
      unit: 'GBd',
      above: 0,
      max: 1e13,
    }).optional(),
    evaluationHz: field.frequency('Evaluation frequency', { above: 0 }).optional(),
    from: line('From').optional(),
    to: line('To').optional(),
    grid: grid.optional(),
    stackup: stackup.optional(),
    elements: z
      .array(element)
      .min(bounds.elements.min, 'A channel needs at least one element.')
      .max(bounds.elements.max, `A channel has at most ${bounds.elements.max} elements.`),
    limits: z.array(limit).max(bounds.limits, `A channel has at most ${bounds.limits} limits.`).default([]),
    reflectionAllotmentDb: reflectionAllotment.optional(),
    notes: notes('Notes').optional(),
    library: z
      .strictObject({ maskSetRevision: identifier.optional(), stackupVersion: identifier.optional() })
      .optional(),
  })
  .superRefine((file, context) => {
    refuseTwins(file.elements, 'elements', context);
    refuseTwins(file.limits, 'limits', context);
    const ports = file.signaling === 'differential' ? 4 : 2;
    if (Array.isArray(file.referenceOhm) && file.referenceOhm.length !== ports) {
      context.addIssue({
        code: 'custom',
        path: ['referenceOhm'],
        message: `A ${file.signaling} channel has ${ports} ports; ${file.referenceOhm.length} references are given.`,
        params: { mend: `Give one reference for all, or ${ports}.` },
      });
    }
  });
export type ChannelFile = z.output<typeof channelFile>;

function refuseTwins(list: readonly { id?: string }[], name: string, context: z.RefinementCtx): void {
  const seen = new Map<string, number>();
  list.forEach((entry, i) => {
    if (entry.id === undefined) return;
    const first = seen.get(entry.id);
    if (first === undefined) seen.set(entry.id, i);
    else
      context.addIssue({
        code: 'custom',
        path: [name, i, 'id'],
        message: `"${entry.id}" is also the id of ${name}[${first}]; an id is unique.`,
        params: { mend: 'Give another id, or leave it out and one is given.' },
      });
  });
}
