import type { ElementOf, Layer, Stackup } from '@tollgate/contracts';
import { isCopper } from '../trace/layers';
import { ElementError } from '../types';

export type Via = ElementOf<'via'>;

/** A layer with its depth in metres, counted from the outer face of the top copper downward. */
export interface PlacedLayer {
  readonly layer: Layer;
  readonly topM: number;
  readonly bottomM: number;
}

/** A via among the layers: its ends after drilling back, and the two depths at which traces meet it. */
export interface Barrel {
  /** From the top copper to the bottom copper. */
  readonly layers: readonly PlacedLayer[];
  readonly topM: number;
  readonly bottomM: number;
  readonly upperM: number;
  readonly lowerM: number;
  /** Whether the near side is the upper one. */
  readonly downward: boolean;
}

export const refused = (path: string, message: string, mend: string): ElementError =>
  new ElementError({ path, message, mend });

export const millimetres = (lengthM: number): string => `${Number((lengthM * 1e3).toPrecision(6))} mm`;

/**
 * Places a via: lengths run from the outer face of outermost copper to the mid-plane of inner copper (exchange contract, `via`).
 * @throws ElementError where a layer is missing, the barrel doesn't reach, or a residual stub is longer than the barrel
 */
export function placeBarrel(via: Via, stackup: Stackup | undefined): Barrel {
  const layers = placedLayers(stackup?.layers ?? []);
  const from = layerNamed(layers, via.fromLayer, 'fromLayer');
  const to = layerNamed(layers, via.toLayer, 'toLayer');
  if (from === to) {
    throw refused(
      'toLayer',
      `The via goes from ${via.fromLayer} to the same layer, so nothing runs through it.`,
      'Name another layer, or describe the barrel as a stub.',
    );
  }
  const [upper, lower] = [Math.min(from, to), Math.max(from, to)];
  const [top, bottom] = barrelEnds(via, layers);
  if (upper < top || lower > bottom) {
    const missed = upper < top ? layers[upper]! : layers[lower]!;
    throw refused(
      'barrel',
      `The barrel from ${layers[top]!.layer.name} to ${layers[bottom]!.layer.name} does not reach ${missed.layer.name}.`,
      'Let the barrel span fromLayer and toLayer.',
    );
  }
  const depth = (index: number): number => depthOf(layers, index);
  const { topResidualM, bottomResidualM } = via.backdrill ?? {};
  const reach = { topM: depth(top), bottomM: depth(bottom) };
  return {
    layers,
    topM: drilled(reach.topM, layers[upper]!, -1, topResidualM, 'topResidualM'),
    bottomM: drilled(reach.bottomM, layers[lower]!, 1, bottomResidualM, 'bottomResidualM'),
    upperM: depth(upper),
    lowerM: depth(lower),
    downward: from < to,
  };
}

function placedLayers(all: readonly Layer[]): PlacedLayer[] {
  const first = all.findIndex(isCopper);
  const last = all.findLastIndex(isCopper);
  let depthM = 0;
  return first < 0
    ? []
    : all.slice(first, last + 1).map((layer) => {
        const topM = depthM;
        depthM += layer.thicknessM;
        return { layer, topM, bottomM: depthM };
      });
}

function layerNamed(layers: readonly PlacedLayer[], name: string, path: string): number {
  const copper = layers.flatMap(({ layer }, index) => (isCopper(layer) ? [{ name: layer.name, index }] : []));
  const found = copper.filter((layer) => layer.name === name);
  if (found.length === 1) return found[0]!.index;
  if (found.length > 1) {
    throw refused(path, `${found.length} copper layers are called ${name}.`, 'Give each layer its own name.');
  }
  const names = copper.map((layer) => layer.name).join(', ');
  throw refused(
    path,
    names
      ? `The stackup has no copper layer ${name}; it has ${names}.`
      : `The stackup has no copper layers, so ${name} is nowhere.`,
    'Name a copper layer of the stackup.',
  );
}

function barrelEnds(via: Via, layers: readonly PlacedLayer[]): [number, number] {
  if (via.barrel === undefined) return [0, layers.length - 1];
  const [top, bottom] = via.barrel.map((name, i) => layerNamed(layers, name, `barrel[${i}]`)) as [
    number,
    number,
  ];
  if (top < bottom) return [top, bottom];
  throw refused(
    'barrel',
    `The barrel's top ${via.barrel[0]} does not lie above its bottom ${via.barrel[1]}.`,
    'Name the upper layer first, then the lower one.',
  );
}

function depthOf(layers: readonly PlacedLayer[], index: number): number {
  const { topM, bottomM } = layers[index]!;
  if (index === 0) return topM;
  return index === layers.length - 1 ? bottomM : (topM + bottomM) / 2;
}

/** The barrel's end once drilled back to a residual from the signal layer's face. */
function drilled(
  endM: number,
  signal: PlacedLayer,
  side: -1 | 1,
  residualM: number | undefined,
  field: string,
): number {
  if (residualM === undefined) return endM;
  const faceM = side < 0 ? signal.topM : signal.bottomM;
  const thereM = Math.max(0, side * (endM - faceM));
  // A sum of layers carries rounding; a residual as long as the barrel is no mistake.
  if (residualM > thereM * (1 + 1e-9) + 1e-12) {
    throw refused(
      `backdrill.${field}`,
      `The residual stub of ${millimetres(residualM)} is longer than the barrel ${side < 0 ? 'above' : 'below'} ${signal.layer.name}, which is ${millimetres(thereM)}.`,
      'Give a shorter residual, or leave it out where nothing is drilled.',
    );
  }
  return thereM === 0 ? endM : faceM + side * Math.min(residualM, thereM);
}
