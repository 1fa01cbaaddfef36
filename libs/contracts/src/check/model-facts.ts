import * as z from 'zod';

const traceModel = z.object({
  kind: z.literal('trace'),
  element: z.string(),
  /** The publication or solver behind the numbers. */
  source: z.string(),
  /** Segments of the field solution's finer mesh, and what its two meshes leave open, relative. */
  unknowns: z.number(),
  errorZ0: z.number(),
  errorPermittivity: z.number(),
  /** Lossless and quasi-static, Dk as given; of one conductor. */
  modes: z.array(
    z.object({
      mode: z.enum(['single', 'even', 'odd']),
      z0Ohm: z.number(),
      effectivePermittivity: z.number(),
    }),
  ),
  planes: z.object({ above: z.string().nullable(), below: z.string().nullable() }),
  /** From the plane it is seen from, upward; the solder mask last. */
  sheets: z.array(
    z.object({
      layer: z.string(),
      thicknessM: z.number(),
      dk: z.number(),
      df: z.number(),
      atHz: z.number(),
    }),
  ),
  /** Above it the dispersion formula of a microstrip leaves its published range; null where nothing bounds it. */
  validToHz: z.number().nullable(),
});

const viaModel = z.object({
  kind: z.literal('via'),
  element: z.string(),
  sources: z.array(z.string()),
  meshErrorShare: z.number(),
  throughM: z.number(),
  stubs: z.object({ aboveM: z.number(), belowM: z.number() }),
  /** The model's own least |S21|, and half of it, up to which the model is estimated. */
  notchHz: z.number().nullable(),
  validToHz: z.number().nullable(),
  sections: z.array(
    z.object({
      layer: z.string(),
      part: z.enum(['above', 'through', 'below']),
      what: z.enum(['barrel', 'pad']),
      lengthM: z.number(),
      permittivity: z.number(),
      z0Ohm: z.number().optional(),
      evenZ0Ohm: z.number().optional(),
      oddZ0Ohm: z.number().optional(),
    }),
  ),
});

/** What a trace or via was computed from, for whoever has to trust it. */
export const modelFacts = z.discriminatedUnion('kind', [traceModel, viaModel]);
export type ModelFacts = z.output<typeof modelFacts>;
