import {
  freeId,
  kindDescription,
  newElement,
  type CompleteChannel,
  type ElementKind,
  type StackupVersion,
} from '@tollgate/contracts';
import {
  distanceM,
  elbow,
  headingDeg,
  polylineLengthM,
  samePoint,
  stepped,
  tidyPoint,
  type Point,
} from '@tollgate/geometry';
import type { PlacedElement } from '../../document/element-edits';
import { isSame } from '../../saving/same';
import { bodyOf, bodySizes } from '../layout/bodies';
import { headingAt, type PlanLayout } from '../layout/plan-layout';
import { layerAtFar, nextLayer, viaStart } from './layers';

export interface Appended {
  readonly document: CompleteChannel;
  /** The new element, or the last of several. */
  readonly id: string;
}

export interface FarEnd {
  readonly point: Point;
  readonly headingDeg: number;
}

type Trace = Extract<PlacedElement, { kind: 'trace' }>;

/**
 * A channel that is still what a new one starts as: one line, as it came. The first thing that is drawn takes its place,
 * for a channel has at least one element.
 */
export function isBlank({ elements, signaling }: CompleteChannel): boolean {
  const [only] = elements;
  if (elements.length !== 1 || !only) return false;
  if (only.kind !== 'line' && only.kind !== 'coupled-line') return false;
  const { id: _id, ...rest } = only;
  return isSame(rest, newElement(only.kind, signaling));
}

/** Where the next element begins; undefined while nothing is placed. */
export function farEnd(document: CompleteChannel, layout: PlanLayout): FarEnd | undefined {
  const last = layout.items.at(-1);
  if (!last || isBlank(document)) return undefined;
  return { point: last.far, headingDeg: headingAt(last, 'far') };
}

/** A trace along corners at the far end, on the layer where the channel has arrived, as wide as the last one there. */
export function withTraceAppended(
  document: CompleteChannel,
  corners: readonly Point[],
  stackup?: StackupVersion,
): Appended {
  const ground = withGround(document, stackup);
  const trace = traceOf(ground, corners);
  const id = freeId(kindDescription('trace').prefix, takenIds(ground));
  return { document: appended(ground, [{ ...trace, id }]), id };
}

/**
 * A part at the far end, or, dropped away from it, at the end of a trace that leads there. `at` is where its near pin
 * comes to lie; left out, the far end itself.
 */
export function withPartAppended(
  document: CompleteChannel,
  layout: PlanLayout,
  kind: ElementKind,
  at?: Point,
  stackup?: StackupVersion,
): Appended {
  const ground = withGround(document, stackup);
  const end = farEnd(document, layout);
  const pin = at ?? end?.point ?? [0.01, 0.02];
  const taken = takenIds(ground);
  const way = end && distanceM(end.point, pin) > 1e-6 ? elbow(end.point, pin) : undefined;
  const lead: PlacedElement[] = way
    ? [{ ...traceOf(ground, way), id: freeId(kindDescription('trace').prefix, taken) }]
    : [];
  const turnDeg = way ? headingDeg(way.at(-2)!, way.at(-1)!) : (end?.headingDeg ?? 0);
  const element = partOf(ground, kind, freeId(kindDescription(kind).prefix, taken));
  const half = bodySizes[bodyOf(kind) as keyof typeof bodySizes].lengthM / 2;
  const [xM, yM] = stepped(pin, turnDeg, half);
  const turn = turnDeg === 0 ? {} : { rotationDeg: turnDeg };
  const placed = { ...element, plan: { xM, yM, ...turn } };
  return { document: appended(ground, [...lead, placed]), id: placed.id };
}

/** A part set into a trace: the trace ends at its near pin and goes on at its far one. */
export function withPartInTrace(
  document: CompleteChannel,
  traceId: string,
  piece: number,
  at: Point,
  kind: ElementKind,
): Appended | undefined {
  const index = document.elements.findIndex((element) => element.id === traceId);
  const trace = document.elements[index];
  if (trace?.kind !== 'trace' || !trace.path) return undefined;
  const [a, b] = [trace.path[piece], trace.path[piece + 1]];
  const bodyM = bodySizes[bodyOf(kind) as keyof typeof bodySizes].lengthM;
  if (!a || !b || distanceM(a, b) < bodyM + 1e-6) return undefined;
  const turnDeg = headingDeg(a, b);
  const alongM = Math.min(distanceM(a, b) - bodyM / 2, Math.max(bodyM / 2, distanceM(a, at)));
  const middle = stepped(a, turnDeg, alongM);
  const taken = takenIds(document);
  const turn = turnDeg === 0 ? {} : { rotationDeg: turnDeg };
  const id = freeId(kindDescription(kind).prefix, taken);
  const part = {
    ...partOf(document, kind, id, trace.layer),
    plan: { xM: middle[0], yM: middle[1], ...turn },
  };
  const first = cut(trace, [...trace.path.slice(0, piece + 1), stepped(middle, turnDeg, -bodyM / 2)]);
  const second = cut(trace, [stepped(middle, turnDeg, bodyM / 2), ...trace.path.slice(piece + 1)]);
  const rest = { ...second, id: freeId(kindDescription('trace').prefix, taken) };
  const pieces = [first, part, rest].filter(
    (each) => each.kind !== 'trace' || polylineLengthM(each.path!) > 0,
  );
  const elements = document.elements.slice();
  elements.splice(index, 1, ...pieces);
  return { document: { ...document, elements }, id };
}

/** A typed length no longer fits either piece: both follow what is drawn. */
function cut({ lengthM: _lengthM, lengthNM: _lengthNM, ...trace }: Trace, path: readonly Point[]): Trace {
  return { ...trace, path: clean(path) };
}

function clean(path: readonly Point[]): [number, number][] {
  return path
    .filter((point, i) => i === 0 || !samePoint(point, path[i - 1]!))
    .map((point) => [...tidyPoint(point)]);
}

function traceOf(document: CompleteChannel, corners: readonly Point[]): Omit<Trace, 'id'> {
  const layer = layerAtFar(document);
  const traces = document.elements.filter((element): element is Trace => element.kind === 'trace');
  const like = traces.findLast((trace) => trace.layer === layer) ?? traces.at(-1);
  const start = newElement('trace', document.signaling, document.stackup) as Trace;
  const { lengthM: _typed, ...rest } = start;
  const cutLike = like ? { widthM: like.widthM, gapM: like.gapM } : { widthM: rest.widthM, gapM: rest.gapM };
  const { gapM, widthM } = cutLike;
  return { ...rest, layer, widthM, ...(gapM === undefined ? {} : { gapM }), path: clean(corners) };
}

function partOf(document: CompleteChannel, kind: ElementKind, id: string, layer?: string): PlacedElement {
  if (kind === 'via') {
    const from = layer ?? layerAtFar(document);
    return { ...viaStart(document), fromLayer: from, toLayer: nextLayer(document, from), id };
  }
  return { ...newElement(kind, document.signaling, document.stackup), id };
}

function takenIds(document: CompleteChannel): Set<string> {
  return new Set(isBlank(document) ? [] : document.elements.map((element) => element.id));
}

function appended(document: CompleteChannel, added: readonly PlacedElement[]): CompleteChannel {
  const kept = isBlank(document) ? [] : document.elements;
  return { ...document, elements: [...kept, ...added] };
}

/** A channel without layers takes the revision's stackup over with its first element. */
function withGround(document: CompleteChannel, version: StackupVersion | undefined): CompleteChannel {
  if (!version || (document.stackup?.layers ?? []).length > 0) return document;
  return {
    ...document,
    stackup: { ...document.stackup, ...version.document },
    library: { ...document.library, stackupVersion: version.id },
  };
}
