import * as z from 'zod';

export const qualityGrades = ['good', 'acceptable', 'inconclusive', 'poor'] as const;

const ranges = z.array(z.tuple([z.number(), z.number()]));
const graded = z.object({
  percent: z.number(),
  grade: z.enum(qualityGrades),
  /** Where it fails. */
  failsHz: ranges,
});

/** What the file behind an element is worth: its band, its sampling, its grades (IEEE Std 370-2020), and how it was used. */
export const partFacts = z.object({
  element: z.string(),
  fileName: z.string(),
  sha256: z.string(),
  ports: z.number(),
  points: z.number(),
  bandHz: z.tuple([z.number(), z.number()]),
  /** The through pairs as stated, or the ports picked. */
  portOrder: z.string(),
  reversed: z.boolean(),
  /** Absent above 8 ports, where grading takes too long. */
  quality: z
    .object({ passivity: graded, reciprocity: graded.nullable(), causality: graded.nullable() })
    .optional(),
  gapsHz: ranges,
  reachesDc: z.boolean(),
  /** The widest turn of the through path between two points. */
  phaseStepDeg: z.number(),
  /** Largest estimate of what interpolation added to an S, on the check's frequencies. */
  interpolationErrorAbs: z.number(),
  /** The range carried on below the file's band, where that was asked for. */
  extendedHz: z.tuple([z.number(), z.number()]).optional(),
});
export type PartFacts = z.output<typeof partFacts>;
