import * as z from 'zod';
import { quantity } from '../quantity';
import { line, notes } from '../text';

export const standings = ['measured', 'supplied', 'solved', 'estimated', 'assumed'] as const;
/** How far a model can be trusted, best first. */
export type Standing = (typeof standings)[number];

export const signalings = ['single-ended', 'differential'] as const;
export type Signaling = (typeof signalings)[number];

export const identifier = z
  .string({ error: 'An identifier is text.' })
  .regex(
    /^[A-Za-z0-9][A-Za-z0-9._:-]{0,63}$/,
    'An identifier has 1 to 64 letters, digits or . _ : - and starts with a letter or digit.',
  );

/** Where a value comes from: plain words, or a library item by revision. */
export const source = z.union([
  line('Source'),
  z.strictObject({
    text: line('Source').optional(),
    date: z.iso.date('Write the date as 2026-05-31.').optional(),
    itemRevision: identifier.optional(),
    sha256: z
      .string()
      .regex(/^[0-9a-f]{64}$/, 'A SHA-256 has 64 hexadecimal digits.')
      .optional(),
  }),
]);
export type Source = z.output<typeof source>;

const allotment = quantity({ dimension: 'loss', label: 'Allotment', unit: 'dB', min: 0, max: 1000 });

/** Fields every element may carry, whatever its kind. */
export const elementCommon = {
  id: identifier.optional(),
  label: line('Label').optional(),
  standing: z.enum(standings, `A standing is one of ${standings.join(', ')}.`).optional(),
  source: source.optional(),
  allotmentDb: allotment.optional(),
  notes: notes('Notes').optional(),
  /** Where the part stands on the floor plan; no part of the check. */
  plan: z
    .strictObject({
      xM: quantity({ dimension: 'length', label: 'Position x', unit: 'mm', min: -10, max: 10 }),
      yM: quantity({ dimension: 'length', label: 'Position y', unit: 'mm', min: -10, max: 10 }),
      rotationDeg: quantity({
        dimension: 'angle',
        label: 'Rotation',
        unit: '°',
        min: -360,
        max: 360,
      }).optional(),
    })
    .optional(),
};

export const reflectionAllotment = quantity({
  dimension: 'loss',
  label: 'Reflection allotment',
  unit: 'dB',
  min: 0,
  max: 1000,
});
