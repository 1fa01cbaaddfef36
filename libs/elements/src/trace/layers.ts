import type { ElementOf, Layer, Stackup } from '@tollgate/contracts';
import { ElementError } from '../types';

export type CopperLayer = Extract<Layer, { kind: 'copper' }>;
export type DielectricLayer = Exclude<Layer, { kind: 'copper' }>;

/** What of a trace says where it runs and what it returns on. */
export type TracePlace = Pick<ElementOf<'trace'>, 'layer' | 'planes'>;

/** A trace among the layers, top to bottom; a plane's index, or undefined where that side has none. */
export interface Placed {
  readonly layers: readonly Layer[];
  readonly trace: number;
  readonly above?: number;
  readonly below?: number;
}

export function isCopper(layer: Layer | undefined): layer is CopperLayer {
  return layer?.kind === 'copper';
}

/**
 * Finds a trace's layer and the planes it returns on: the nearest of role plane on each side, or those it names.
 * @throws ElementError where the layer is not a signal layer of the stackup, or no plane is found
 */
export function placeTrace(stackup: Stackup | undefined, place: TracePlace): Placed {
  const layers = stackup?.layers ?? [];
  const trace = layers.findIndex((layer) => isCopper(layer) && layer.name === place.layer);
  if (trace < 0)
    throw refused('layer', missingLayer(layers, place.layer), 'Name a copper layer of the stackup.');
  if ((layers[trace] as CopperLayer).role !== 'signal') {
    throw refused(
      'layer',
      `${place.layer} is a plane.`,
      'Route on a layer of role signal, or change the role of the layer.',
    );
  }
  const above = planeOf(layers, trace, -1, place);
  const below = planeOf(layers, trace, 1, place);
  if (above === undefined && below === undefined) {
    throw refused('layer', withoutPlane(layers, trace, place), 'Give a layer above or below the role plane.');
  }
  return { layers, trace, above, below };
}

function planeOf(
  layers: readonly Layer[],
  trace: number,
  step: -1 | 1,
  { planes, layer }: TracePlace,
): number | undefined {
  const side = step < 0 ? 'above' : 'below';
  const named = planes?.[side];
  if (named === null) return undefined;
  if (named !== undefined) {
    const index = layers.findIndex((other) => isCopper(other) && other.name === named);
    if (index >= 0 && Math.sign(index - trace) === step) return index;
    throw refused(
      `planes.${side}`,
      index < 0 ? missingLayer(layers, named) : `${named} does not lie ${side} ${layer}.`,
      `Name a copper layer ${side} the trace, or null for none.`,
    );
  }
  for (let i = trace + step; i >= 0 && i < layers.length; i += step) {
    const other = layers[i];
    if (isCopper(other) && other.role === 'plane') return i;
  }
  return undefined;
}

function missingLayer(layers: readonly Layer[], name: string): string {
  const names = layers.filter(isCopper).map((layer) => layer.name);
  return names.length
    ? `The stackup has no copper layer ${name}; it has ${names.join(', ')}.`
    : `The stackup has no copper layers, so ${name} is nowhere.`;
}

function withoutPlane(layers: readonly Layer[], trace: number, { planes, layer }: TracePlace): string {
  const copper = (from: number, to?: number) =>
    layers
      .slice(from, to)
      .filter(isCopper)
      .map(({ name, role }) => `${name} (${role})`)
      .join(', ') || 'no copper';
  const chosen = planes === undefined ? '' : ' as the trace says';
  return `${layer} has no plane to return on${chosen}: above it ${copper(0, trace)}, below it ${copper(trace + 1)}.`;
}

function refused(path: string, message: string, mend: string): ElementError {
  return new ElementError({ path, message, mend });
}
