import type { ElementOf, Layer, Stackup } from '@tollgate/contracts';
import { copperConductivityAt, type Conductor, type Dielectric, type Roughness } from '@tollgate/lines';
import { ElementError } from '../types';
import {
  isCopper,
  placeTrace,
  type CopperLayer,
  type DielectricLayer,
  type Placed,
  type TracePlace,
} from './layers';
import { materialOf } from './material';

/** Temperature of a board that states none, in degrees. */
const roomC = 20;

/** A slice of dielectric between two faces, from the lower plane upward. */
export interface Sheet {
  readonly thicknessM: number;
  readonly material: Dielectric;
  readonly layer: string;
}

/**
 * What a trace is made of, seen with a plane below it: a section with its only plane above is turned over, so that
 * `foot`, `sheets` and the conductor's faces are those of the turned one.
 */
export interface TraceSection {
  readonly turned: boolean;
  readonly widthM: number;
  readonly gapM?: number;
  readonly thicknessM: number;
  readonly etchAngleDeg: number;
  readonly foot: 'down' | 'up';
  /** From the lower plane's face upward; the trace's own level is one of them where a dielectric lies beside it. */
  readonly sheets: readonly Sheet[];
  /** Height of the trace's lower face over the plane below. */
  readonly traceAtM: number;
  readonly planeAbove: boolean;
  readonly mask?: Sheet;
  readonly conductor: Conductor;
  /** Names of the planes, as the board has them; null where that side has none. */
  readonly planes: { readonly above: string | null; readonly below: string | null };
  readonly warnings: readonly string[];
}

export type SectionInput = TracePlace & Pick<ElementOf<'trace'>, 'widthM' | 'gapM'>;

/**
 * The cross-section of a trace on a stackup (exchange contract, physical kinds): beside the copper lies the dielectric of the side away
 * from its foot; a signal layer on the way to a plane counts as the dielectric around it; on an outer layer air, or the
 * solder mask that follows the surface.
 * @throws ElementError
 */
export function sectionOf(stackup: Stackup | undefined, input: SectionInput): TraceSection {
  const placed = placeTrace(stackup, input);
  const { layers, trace, above, below } = placed;
  const copper = layers[trace] as CopperLayer;
  const turned = below === undefined;
  // Seen with the plane below, the layers count upward from it.
  const order = turned ? [...layers.keys()] : [...layers.keys()].reverse();
  const from = order.indexOf((turned ? above : below)!);
  const own = order.indexOf(trace);
  const to = turned || above === undefined ? order.length : order.indexOf(above);
  const under = order.slice(from + 1, own);
  const over = order.slice(own + 1, to);
  const planeAbove = to < order.length;
  if (under.every((i) => isCopper(layers[i]))) throw noDielectric(copper.name, layers[order[from]!]!.name);
  const outer = !planeAbove && over.every((i) => layers[i]!.kind === 'soldermask');
  const footDown = (copper.foilSide === 'down') !== turned;
  const sheets = sheetsOf(placed, order, from, to, outer);
  const underM = under.reduce((sum, i) => sum + layers[i]!.thicknessM, 0);
  const maskLayer = outer ? over.map((i) => layers[i]!)[0] : undefined;
  const warnings =
    outer && !footDown
      ? [`The foot of ${copper.name} looks away from the laminate: check its foilSide.`]
      : [];
  return {
    turned,
    widthM: input.widthM,
    gapM: input.gapM,
    thicknessM: copper.thicknessM,
    etchAngleDeg: copper.etchAngleDeg,
    foot: footDown ? 'down' : 'up',
    sheets,
    traceAtM: underM,
    planeAbove,
    mask: maskLayer && sheetOf(maskLayer as DielectricLayer),
    conductor: conductorOf(copper, placed, turned, stackup?.temperatureC ?? roomC),
    planes: {
      above: above === undefined ? null : layers[above]!.name,
      below: below === undefined ? null : layers[below]!.name,
    },
    warnings,
  };
}

function noDielectric(trace: string, plane: string): ElementError {
  return new ElementError({
    path: 'layer',
    message: `Between ${trace} and ${plane} lies no dielectric.`,
    mend: 'Give the stackup a dielectric between the two copper layers.',
  });
}

/** Dielectrics from the lower plane up. Copper between counts as what lies around it, so does the trace's own level. */
function sheetsOf(
  { layers, trace }: Placed,
  order: readonly number[],
  from: number,
  to: number,
  outer: boolean,
): Sheet[] {
  const sheets: Sheet[] = [];
  for (const i of order.slice(from + 1, to)) {
    const layer = layers[i]!;
    if (layer.kind === 'soldermask' && outer) continue;
    if (layer.kind !== 'copper') {
      sheets.push(sheetOf(layer));
      continue;
    }
    const beside = besideCopper(layers, i, layer);
    // On an outer layer nothing but air or the mask lies beside the copper.
    if (beside && !(outer && i === trace)) sheets.push({ ...sheetOf(beside), thicknessM: layer.thicknessM });
  }
  return sheets;
}

/** The dielectric of the side away from the foot: the prepreg that flowed around the copper. */
function besideCopper(
  layers: readonly Layer[],
  index: number,
  copper: CopperLayer,
): DielectricLayer | undefined {
  const step = copper.foilSide === 'down' ? -1 : 1;
  for (let i = index + step; i >= 0 && i < layers.length; i += step) {
    const layer = layers[i]!;
    if (layer.kind !== 'copper') return layer;
  }
  return undefined;
}

function sheetOf(layer: DielectricLayer): Sheet {
  return { layer: layer.name, thicknessM: layer.thicknessM, material: materialOf(layer) };
}

function conductorOf(copper: CopperLayer, placed: Placed, turned: boolean, temperatureC: number): Conductor {
  const { layers, above, below } = placed;
  const facing = (index: number | undefined, looks: 'up' | 'down'): Roughness | undefined => {
    const plane = index === undefined ? undefined : layers[index];
    if (!isCopper(plane)) return undefined;
    const faces = facesOf(plane);
    return plane.foilSide === looks ? faces.foot : faces.top;
  };
  const lower = facing(below, 'up');
  const upper = facing(above, 'down');
  return {
    conductivitySPerM: copperConductivityAt(copper.conductivitySPerM, temperatureC),
    roughness: {
      ...facesOf(copper),
      planeBelow: turned ? upper : lower,
      planeAbove: turned ? lower : upper,
    },
  };
}

const smooth: Roughness = { model: 'none' };

function facesOf({ roughness }: CopperLayer): { foot: Roughness; top: Roughness } {
  if (roughness === undefined) return { foot: smooth, top: smooth };
  const both = 'foot' in roughness ? roughness : { foot: roughness, top: roughness };
  return { foot: faceOf(both.foot), top: faceOf(both.top) };
}

/** Rq for the two rms models, Rz for the cannonball; the other height is converted (common practice: Rz about 5 Rq). */
const rzPerRq = 5;

function faceOf(face: { model: Roughness['model']; rqM?: number; rzM?: number }): Roughness {
  const rqM = face.rqM ?? (face.rzM ?? 0) / rzPerRq;
  switch (face.model) {
    case 'none':
      return smooth;
    case 'cannonball':
      return { model: 'cannonball', rzM: face.rzM ?? rqM * rzPerRq };
    default:
      return { model: face.model, rqM };
  }
}
