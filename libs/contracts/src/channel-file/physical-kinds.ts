import * as z from 'zod';
import { bounds } from '../bounds';
import { quantity } from '../quantity';
import { line } from '../text';
import { circuit } from './circuit-kinds';
import { elementCommon } from './common';
import * as field from './fields';
import { touchstoneFields } from './touchstone-kind';

const layerName = line('Layer');
const coordinate = quantity({ dimension: 'length', label: 'Coordinate', unit: 'mm', min: -10, max: 10 });
export const vertex = z.tuple([coordinate, coordinate], 'A vertex is two coordinates, [x, y].');

const byLayer = (label: string) => z.union([field.length(label), z.record(z.string(), field.length(label))]);

export const traceElement = z
  .strictObject({
    kind: z.literal('trace'),
    ...elementCommon,
    layer: layerName,
    widthM: field.length('Width', { above: 0, max: 0.1 }),
    lengthM: field.length().optional(),
    path: z
      .array(vertex)
      .min(2, 'A path has at least two vertices.')
      .max(bounds.pathVertices, `A path has at most ${bounds.pathVertices} vertices.`)
      .optional(),
    gapM: field.length('Gap', { above: 0, max: 0.1 }).optional(),
    lengthNM: field.length('Length of the n leg').optional(),
    planes: z.strictObject({ above: layerName.nullable(), below: layerName.nullable() }).optional(),
    widthToleranceM: field.length('Width tolerance').optional(),
    gapToleranceM: field.length('Gap tolerance').optional(),
  })
  .refine((trace) => trace.lengthM !== undefined || trace.path !== undefined, {
    message: 'The trace has neither a length nor a path.',
    path: ['lengthM'],
    params: { mend: 'Give lengthM or path.' },
  });

export const viaElement = z.strictObject({
  kind: z.literal('via'),
  ...elementCommon,
  fromLayer: layerName,
  toLayer: layerName,
  drillM: field.length('Drill', { above: 0, max: 0.05 }),
  padM: byLayer('Pad'),
  antipadM: byLayer('Antipad'),
  pitchM: field.length('Pitch', { above: 0, max: 0.1 }).optional(),
  barrel: z.tuple([layerName, layerName]).optional(),
  backdrill: z
    .strictObject({
      topResidualM: field.length('Residual stub, top').optional(),
      bottomResidualM: field.length('Residual stub, bottom').optional(),
    })
    .optional(),
  returnVias: z
    .array(z.tuple([coordinate, coordinate]))
    .max(64, 'At most 64 return vias.')
    .optional(),
});

export const connectorElement = z.strictObject({
  kind: z.literal('connector'),
  ...elementCommon,
  makerReference: line("Maker's reference").optional(),
  ...touchstoneFields,
  circuit: circuit.optional(),
});

export const capacitorElement = z.strictObject({
  kind: z.literal('capacitor'),
  ...elementCommon,
  capacitanceF: field.seriesCapacitance(),
  seriesInductanceH: field.inductance('Series inductance'),
  seriesResistanceOhm: field.resistance('Series resistance'),
  padCapacitanceF: field.capacitance('Pad capacitance'),
  /** The pads as copper: each is solved as a short wide trace beside the capacitance stated. */
  pads: z
    .strictObject({
      layer: layerName,
      widthM: field.length('Pad width', { above: 0, max: 0.02 }),
      lengthM: field.length('Pad length', { above: 0, max: 0.02 }),
    })
    .optional(),
});
