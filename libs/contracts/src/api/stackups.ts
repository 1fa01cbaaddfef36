import * as z from 'zod';
import type { Stackup } from '../channel-file/stackup';
import type { CompleteStackup } from '../channel-file/stackup-rules';
import * as field from '../channel-file/fields';
import { quantity } from '../quantity';
import { line, notes } from '../text';
import { can, id, instant, list } from './common';
import { fieldProblem } from './problem';

/** What a version speaks of: what was designed, what a fabricator proposes, what was built. */
export const stackupKinds = ['design', 'fabricator-proposal', 'as-built'] as const;
export type StackupKind = (typeof stackupKinds)[number];
export const stackupKindTitles: Readonly<Record<StackupKind, string>> = {
  design: 'Design',
  'fabricator-proposal': "Fabricator's proposal",
  'as-built': 'As built',
};

const kind = z.enum(stackupKinds, `A kind is one of ${stackupKinds.join(', ')}.`);

/** A line of the list of versions. */
export const stackupVersionSummary = z.object({
  id,
  number: z.number(),
  kind,
  why: z.string(),
  layers: z.number(),
  copperLayers: z.number(),
  thicknessM: z.number(),
  createdAt: instant,
  createdBy: z.string(),
});
export type StackupVersionSummary = z.output<typeof stackupVersionSummary>;

/** A stackup as it is stored: in SI. */
export const stackupDocument = z
  .custom<CompleteStackup>((value) => typeof value === 'object' && value !== null)
  .meta({ type: 'object', description: "A stackup, as a channel file's `stackup`; quantities in SI" });

export const stackupVersion = stackupVersionSummary.extend({
  revisionId: id,
  document: stackupDocument,
  /** Possible but unusual values; nothing that keeps the version from being used. */
  cautions: z.array(fieldProblem),
});
export type StackupVersion = z.output<typeof stackupVersion>;

export const stackupVersions = z.object({
  /** Newest first. */
  items: z.array(stackupVersionSummary),
  /** Drafts of the revision: how many, and how many of them follow a version that is no longer the newest. */
  drafts: z.object({ total: z.number(), following: z.number(), behind: z.number() }),
  can: can('change', 'use'),
});
export type StackupVersions = z.output<typeof stackupVersions>;

const why = notes('Why')
  .trim()
  .min(1, 'Say why there is a new version.')
  .max(500, 'Why must be at most 500 characters.');

/** `If-Match: "<number>"` of the newest version goes with it, "0" for the first; the document is read by parseStackup. */
export const stackupCreate = z.strictObject({ document: z.unknown(), kind: kind.default('design'), why });
export const stackupCopy = z.strictObject({
  /** A version of any revision that the caller may read. */
  fromVersionId: id,
  kind: kind.optional(),
  why: why.optional(),
});
/** Which drafts take the newest version; left out, all of the revision. */
export const stackupUse = z.strictObject({ channelIds: z.array(id).min(1).max(1000).optional() });

/** A draft that took the stackup, and the version it was saved as. */
export const stackupUsed = z.object({
  number: z.number(),
  changed: z.array(z.object({ channelId: id, name: z.string(), version: z.number() })),
  unchanged: z.number(),
});
export type StackupUsed = z.output<typeof stackupUsed>;

/** The newest stackup of each revision the caller may read: what one can copy from. */
export const stackupSource = z.object({
  boardId: id,
  boardName: z.string(),
  revisionId: id,
  revisionLetter: z.string(),
  version: stackupVersionSummary,
});
export type StackupSource = z.output<typeof stackupSource>;
export const stackupSources = list(stackupSource);

const layerName = line('Layer');
const planes = z.strictObject({ above: layerName.nullable(), below: layerName.nullable() });
const width = field.length('Width', { above: 0, max: 0.1 });
const gap = field.length('Gap', { above: 0, max: 0.1 });
const frequency = field.frequency('Frequency', { above: 0 });

/** A trace or an edge-coupled pair on a layer, at one frequency. `stackup` is read by parseStackup, so that problems carry its paths. */
export const crossSectionRequest = z.strictObject({
  stackup: z.unknown(),
  layer: layerName,
  widthM: width,
  gapM: gap.optional(),
  planes: planes.optional(),
  frequencyHz: frequency,
  /** Left out where a person is still typing: they cost about ten more solutions. */
  sensitivities: z.boolean().default(true),
});
export type CrossSectionRequest = z.output<typeof crossSectionRequest>;
/** What the engine is asked. */
export type CrossSectionInput = Pick<
  CrossSectionRequest,
  'layer' | 'widthM' | 'gapM' | 'planes' | 'frequencyHz'
>;

const impedance = quantity({ dimension: 'resistance', label: 'Impedance', unit: 'ohm', min: 1, max: 1000 });

/** Width for a wanted impedance; of a pair with the gap held (`gapM`), or the gap with the width held (`widthM`). */
export const synthesisRequest = z
  .strictObject({
    stackup: z.unknown(),
    layer: layerName,
    targetOhm: impedance,
    mode: z.enum(['single', 'differential'], 'A mode is single or differential.'),
    widthM: width.optional(),
    gapM: gap.optional(),
    planes: planes.optional(),
    frequencyHz: frequency,
  })
  .superRefine((request, context) => {
    const given = (request.widthM === undefined ? 0 : 1) + (request.gapM === undefined ? 0 : 1);
    if (request.mode === 'single' && given > 0) {
      context.addIssue({
        code: 'custom',
        path: [request.widthM === undefined ? 'gapM' : 'widthM'],
        message: 'For a single trace the width is what is looked for: give neither width nor gap.',
      });
    } else if (request.mode === 'differential' && given !== 1) {
      context.addIssue({
        code: 'custom',
        path: ['gapM'],
        message: 'For a pair give the gap to find the width, or the width to find the gap.',
      });
    }
  });
export type SynthesisRequest = z.output<typeof synthesisRequest>;

export const lineModeFigures = z.object({
  mode: z.enum(['single', 'even', 'odd']),
  /** Lossless, quasi-static, Dk as given. */
  z0Ohm: z.number(),
  effectivePermittivity: z.number(),
  /** At the frequency asked for. */
  delaySPerM: z.number(),
  conductorLossDbPerM: z.number(),
  dielectricLossDbPerM: z.number(),
});
export type LineModeFigures = z.output<typeof lineModeFigures>;

export const sectionFigures = z.object({
  modes: z.array(lineModeFigures),
  /** Of a single trace; null for a pair. */
  z0Ohm: z.number().nullable(),
  /** Twice odd and half of even; null for a single trace. */
  differentialOhm: z.number().nullable(),
  commonOhm: z.number().nullable(),
  /** Where the numbers come from. */
  source: z.string(),
});
export type SectionFigures = z.output<typeof sectionFigures>;

const point = z.tuple([z.number(), z.number()]);
/** The section in metres: x to the right from the middle, y up from the foot of what is drawn. */
export const sectionDrawing = z.object({
  widthM: z.number(),
  heightM: z.number(),
  sheets: z.array(
    z.object({ layer: z.string(), fromM: z.number(), toM: z.number(), dk: z.number(), df: z.number() }),
  ),
  planes: z.array(z.object({ layer: z.string(), fromM: z.number(), toM: z.number() })),
  traces: z.array(z.array(point)),
  mask: z.object({ layer: z.string(), outline: z.array(point), dk: z.number() }).nullable(),
});
export type SectionDrawing = z.output<typeof sectionDrawing>;

export const sensitivityQuantities = ['width', 'gap', 'height', 'dk', 'thickness'] as const;
export type SensitivityQuantity = (typeof sensitivityQuantities)[number];
/** How the impedance that is controlled answers to one value, others held. */
export const sensitivity = z.object({
  of: z.enum(sensitivityQuantities),
  layer: z.string().nullable(),
  value: z.number(),
  /** d(ohm)/d(value), in ohm a metre, or ohm a unit of Dk. */
  ohmPerUnit: z.number(),
  /** Change of impedance for 1 % more of the value. */
  ohmPerPercent: z.number(),
  /** What the value's own tolerance makes of the impedance, where it has one. */
  toleranceOhm: z.number().nullable(),
});
export type Sensitivity = z.output<typeof sensitivity>;

export const crossSection = z.object({
  kind: z.enum(['microstrip', 'coated-microstrip', 'embedded-microstrip', 'stripline']),
  pair: z.boolean(),
  standing: z.enum(['solved', 'estimated', 'assumed']),
  frequencyHz: z.number(),
  figures: sectionFigures,
  closedForm: sectionFigures.nullable(),
  /** Why there is none. */
  closedFormReason: z.string().nullable(),
  /** Closed form against solution, of the impedance that is controlled. */
  differencePercent: z.number().nullable(),
  solver: z.object({ unknowns: z.number(), errorZ0: z.number(), errorPermittivity: z.number() }).nullable(),
  planes: z.object({ above: z.string().nullable(), below: z.string().nullable() }),
  drawing: sectionDrawing,
  cautions: z.array(z.string()),
  /** Empty where they were not asked for. */
  sensitivities: z.array(sensitivity),
});
export type CrossSection = z.output<typeof crossSection>;
export type CrossSectionOf = (document: Stackup, input: CrossSectionInput) => CrossSection;

export const synthesis = z.object({
  widthM: z.number(),
  gapM: z.number().nullable(),
  /** What was looked for. */
  found: z.enum(['width', 'gap']),
  targetOhm: z.number(),
  reachedOhm: z.number(),
  section: crossSection,
});
export type Synthesis = z.output<typeof synthesis>;
