import * as z from 'zod';
import { bounds } from '../bounds';
import { quantity } from '../quantity';
import { line, notes } from '../text';
import { identifier, source } from './common';
import * as field from './fields';

export const limitQuantities = [
  'insertion-loss',
  'return-loss-near',
  'return-loss-far',
  'common-return-loss-near',
  'common-return-loss-far',
  'mode-conversion',
  'fitted-attenuation',
  'insertion-loss-deviation',
  'delay',
  'pair-skew',
] as const;
export type LimitQuantity = (typeof limitQuantities)[number];

export const limitStatuses = ['normative', 'informative', 'headline', 'proposal', 'own'] as const;
export type LimitStatus = (typeof limitStatuses)[number];

const bound = quantity({ dimension: 'loss', label: 'Limit', unit: 'dB', min: -1000, max: 1000 });

export const segment = z
  .strictObject({
    fromHz: field.frequency('From'),
    toHz: field.frequency('To', { above: 0 }),
    formula: z
      .string({ error: 'A formula in f (GHz).' })
      .trim()
      .min(1, 'Write a formula in f (GHz), such as 1.5 + 4.6*sqrt(f).')
      .max(bounds.formulaCharacters, `A formula has at most ${bounds.formulaCharacters} characters.`),
  })
  .refine((part) => part.toHz > part.fromHz, {
    message: 'The segment must end above its start.',
    path: ['toHz'],
    params: { mend: 'Give an end above fromHz.' },
  });

const maskPoints = z
  .array(z.tuple([field.frequency('Frequency'), bound], 'A point is [frequency, dB].'))
  .min(2, 'A mask of points has at least two.')
  .max(bounds.maskPoints, `A mask has at most ${bounds.maskPoints} points.`)
  .refine((points) => points.every((point, i) => i === 0 || point[0] >= points[i - 1]![0]), {
    message: 'The points must ascend in frequency.',
    params: { mend: 'Sort the points upwards.' },
  })
  .refine((points) => points.every((point, i) => i < 2 || point[0] > points[i - 2]![0]), {
    message: 'At most two points may share a frequency (a step).',
    params: { mend: 'Remove points between the two sides of the step.' },
  });

const test = line('Test point', 80);

export const limit = z
  .strictObject({
    id: identifier.optional(),
    title: line('Title'),
    quantity: z.enum(limitQuantities, `A limit is on one of: ${limitQuantities.join(', ')}.`),
    sense: z.enum(['max', 'min'], 'The sense is max or min.'),
    segments: z
      .array(segment)
      .min(1, 'Give at least one segment.')
      .max(bounds.segments, `At most ${bounds.segments} segments.`)
      .optional(),
    points: maskPoints.optional(),
    interpolation: z.enum(['linear', 'log'], 'Points are joined linear or log in frequency.').optional(),
    atHz: field.frequency('At frequency', { above: 0 }).optional(),
    db: bound.optional(),
    parameter: z
      .string()
      .regex(/^S[DC][DC][12][12]$/i, 'Write a mixed-mode name such as SCD21.')
      .optional(),
    fit: z
      .strictObject({
        basis: z.enum(['line', 'weighted']),
        fromHz: field.frequency('Fit from'),
        toHz: field.frequency('Fit to', { above: 0 }),
      })
      .optional(),
    referenceOhm: quantity({
      dimension: 'resistance',
      label: 'Reference impedance',
      unit: 'ohm',
      above: 0,
      max: 1e5,
    }).optional(),
    status: z.enum(limitStatuses, `A status is one of ${limitStatuses.join(', ')}.`).optional(),
    from: test.optional(),
    to: test.optional(),
    includes: z.array(line('Included part', 80)).max(20).optional(),
    source: source.optional(),
    /** What the limit's standard asks beyond it; listed as not judged here. */
    beyond: z.array(line('Further demand')).max(20).optional(),
    notes: notes('Notes').optional(),
  })
  .superRefine((value, context) => {
    const forms = [value.segments, value.points, value.atHz ?? value.db].filter((form) => form !== undefined);
    if (forms.length !== 1) {
      context.addIssue({
        code: 'custom',
        path: [],
        message: `The limit is given in ${forms.length} ways; it needs exactly one.`,
        params: { mend: 'Give one of: segments, points, or atHz with db.' },
      });
    } else if ((value.atHz === undefined) !== (value.db === undefined)) {
      context.addIssue({
        code: 'custom',
        path: [value.atHz === undefined ? 'atHz' : 'db'],
        message: 'A single value needs both atHz and db.',
        params: { mend: 'Give the one that is missing.' },
      });
    }
    if (value.points && value.interpolation === undefined) {
      context.addIssue({
        code: 'custom',
        path: ['interpolation'],
        message: 'It is not said how the points are joined.',
        params: { mend: 'Give interpolation: linear or log (in frequency).' },
      });
    }
    if (value.quantity === 'mode-conversion' && value.parameter === undefined) {
      context.addIssue({
        code: 'custom',
        path: ['parameter'],
        message: 'A limit on mode conversion names its parameter.',
        params: { mend: 'Name the mixed-mode parameter, such as SCD21.' },
      });
    }
    if (
      ['fitted-attenuation', 'insertion-loss-deviation'].includes(value.quantity) &&
      value.fit === undefined
    ) {
      context.addIssue({
        code: 'custom',
        path: ['fit'],
        message: 'It is not said how the loss is fitted.',
        params: { mend: 'Give fit: basis, fromHz and toHz.' },
      });
    }
  });
export type Limit = z.output<typeof limit>;
