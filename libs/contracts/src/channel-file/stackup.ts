import * as z from 'zod';
import { bounds } from '../bounds';
import { quantity } from '../quantity';
import { line } from '../text';
import * as field from './fields';

const thickness = field.length('Thickness', { above: 0, max: 0.1 });
const thicknessTolerance = field.length('Thickness tolerance').optional();
const ratio = (label: string, min: number, max: number) =>
  quantity({ dimension: 'ratio', label, unit: '', min, max });

const dielectricFields = {
  name: line('Layer'),
  thicknessM: thickness,
  thicknessToleranceM: thicknessTolerance,
  dk: ratio('Dk', 1, 1000),
  dkTolerance: ratio('Dk tolerance', 0, 1000).optional(),
  df: ratio('Df', 0, 10),
  dfTolerance: ratio('Df tolerance', 0, 10).optional(),
  atHz: field.frequency('Frequency of Dk and Df', { above: 0 }),
  dispersion: z.enum(['wideband-debye', 'constant'], 'Dispersion is wideband-debye or constant.'),
  /** Further points of a data sheet: the wideband Debye model is fitted through them and the first. */
  furtherPoints: z
    .array(
      z.strictObject({
        dk: ratio('Dk', 1, 1000),
        df: ratio('Df', 0, 10),
        atHz: field.frequency('Frequency of Dk and Df', { above: 0 }),
      }),
    )
    .max(20, 'A material has at most 20 further points.')
    .optional(),
  source: line('Source').optional(),
};

const roughness = z
  .strictObject({
    model: z.enum(
      ['none', 'hammerstad', 'groiss', 'cannonball'],
      'Roughness is none, hammerstad, groiss or cannonball.',
    ),
    rqM: field.length('Rq', { max: 1e-4 }).optional(),
    rzM: field.length('Rz', { max: 1e-4 }).optional(),
  })
  .refine((face) => face.model === 'none' || (face.rqM === undefined) !== (face.rzM === undefined), {
    message: 'A roughness model takes exactly one of rqM and rzM.',
    path: ['rqM'],
    params: { mend: 'Give the one that the model is made for, and leave out the other.' },
  });

const copper = z.strictObject({
  kind: z.literal('copper'),
  name: line('Layer'),
  thicknessM: thickness,
  thicknessToleranceM: thicknessTolerance,
  conductivitySPerM: quantity({
    dimension: 'conductivity',
    label: 'Conductivity',
    unit: 'MS/m',
    above: 0,
    max: 1e9,
  }).default(5.8e7),
  role: z.enum(['signal', 'plane'], 'A copper layer is signal or plane.'),
  foilSide: z.enum(['down', 'up'], 'The foot of the foil looks down or up.').default('down'),
  roughness: z.union([roughness, z.strictObject({ foot: roughness, top: roughness })]).optional(),
  etchAngleDeg: quantity({ dimension: 'angle', label: 'Etch angle', unit: '°', min: 20, max: 90 }).default(
    90,
  ),
  widthToleranceM: field.length('Width tolerance').optional(),
});

export const layer = z.discriminatedUnion(
  'kind',
  [
    copper,
    z.strictObject({ kind: z.literal('dielectric'), ...dielectricFields }),
    z.strictObject({ kind: z.literal('soldermask'), ...dielectricFields }),
  ],
  {
    error: (issue) =>
      issue.code === 'invalid_union' ? 'A layer is copper, dielectric or soldermask.' : undefined,
  },
);
export type Layer = z.output<typeof layer>;

export const stackup = z.strictObject({
  temperatureC: quantity({
    dimension: 'temperature',
    label: 'Temperature',
    unit: '°C',
    min: -273,
    max: 1000,
  }).optional(),
  layers: z
    .array(layer)
    .max(bounds.stackupLayers, `A stackup has at most ${bounds.stackupLayers} layers.`)
    .optional(),
});
export type Stackup = z.output<typeof stackup>;
