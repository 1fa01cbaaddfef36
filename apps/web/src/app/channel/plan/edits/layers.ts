import {
  freeId,
  kindDescription,
  newElement,
  type CompleteChannel,
  type ElementOf,
} from '@tollgate/contracts';
import type { Point } from '@tollgate/geometry';
import type { PlacedElement } from '../../document/element-edits';
import type { PlanLayout, PlanTrace } from '../layout/plan-layout';

type Via = ElementOf<'via'>;

/** Signal layers of the stackup, from the top. */
export function signalLayers(document: CompleteChannel): readonly string[] {
  return copperOf(document).flatMap(({ name, role }) => (role === 'signal' ? [name] : []));
}

/** The layer on which the channel has arrived at its far end; where it begins, the first signal layer. */
export function layerAtFar(document: CompleteChannel): string {
  for (const element of document.elements.slice().reverse()) {
    if (element.kind === 'trace') return element.layer;
    if (element.kind === 'via') return element.toLayer;
  }
  return signalLayers(document)[0] ?? '';
}

/** Where a via goes from a layer: back to the layer before, else the next signal layer below, else the one above. */
export function nextLayer(document: CompleteChannel, from: string): string {
  const used = document.elements.flatMap((element) => (element.kind === 'trace' ? [element.layer] : []));
  const before = used.findLast((layer) => layer !== from);
  if (before !== undefined) return before;
  const signals = signalLayers(document);
  const at = signals.indexOf(from);
  return signals[at + 1] ?? signals[at - 1] ?? from;
}

/** Hole, pads and return vias of the last via of the channel; without one, the stated start values of a via. */
export function viaStart(document: CompleteChannel): Via {
  const like = document.elements.findLast((element) => element.kind === 'via');
  const start = newElement('via', document.signaling, document.stackup) as Via;
  if (like?.kind !== 'via') return start;
  const { drillM, padM, antipadM, pitchM, returnVias } = like;
  return {
    ...start,
    drillM,
    padM,
    antipadM,
    ...(pitchM === undefined ? {} : { pitchM }),
    ...(returnVias ? { returnVias } : {}),
  };
}

/**
 * A trace on another layer, with the vias that this asks for: a via beside it now leads to the new layer, and goes where
 * it would lead nowhere; where none stands, one is set at the joint. At an end of the channel it is set only where the
 * trace leaves an outer layer, on which the pins are.
 */
export function withLayer(
  document: CompleteChannel,
  layout: PlanLayout,
  id: string,
  layer: string,
): CompleteChannel {
  const item = layout.items.find((each): each is PlanTrace => each.id === id && each.body === 'trace');
  const trace = item && document.elements[item.index];
  if (!item || trace?.kind !== 'trace' || trace.layer === layer) return document;
  const taken = new Set(document.elements.map((element) => element.id));
  const joint = (end: 'near' | 'far') => {
    const beside = document.elements[item.index + (end === 'near' ? -1 : 1)];
    return atJoint({ document, trace, layer, end, beside, taken, at: item.drawn ? item[end] : undefined });
  };
  const [near, far] = [joint('near'), joint('far')];
  const elements = document.elements.slice();
  const start = item.index - (near.replaces ? 1 : 0);
  const count = 1 + (near.replaces ? 1 : 0) + (far.replaces ? 1 : 0);
  elements.splice(start, count, ...near.elements, { ...trace, layer }, ...far.elements);
  return { ...document, elements };
}

interface Joint {
  readonly document: CompleteChannel;
  readonly trace: ElementOf<'trace'>;
  readonly layer: string;
  readonly end: 'near' | 'far';
  readonly beside: PlacedElement | undefined;
  readonly taken: Set<string>;
  readonly at: Point | undefined;
}

/** What stands at an end of the trace afterwards, and whether it takes the place of the via that stood there. */
function atJoint(joint: Joint): { elements: PlacedElement[]; replaces: boolean } {
  const { document, trace, layer, end, beside, at } = joint;
  if (beside?.kind === 'via') {
    const other = end === 'near' ? beside.fromLayer : beside.toLayer;
    if (other === layer) return { elements: [], replaces: true };
    const turned = end === 'near' ? { ...beside, toLayer: layer } : { ...beside, fromLayer: layer };
    return { elements: [turned], replaces: true };
  }
  const there = beside
    ? beside.kind === 'trace'
      ? beside.layer
      : trace.layer
    : outerOr(document, trace.layer, layer);
  if (there === layer) return { elements: [], replaces: false };
  const id = freeId(kindDescription('via').prefix, joint.taken);
  const [fromLayer, toLayer] = end === 'near' ? [there, layer] : [layer, there];
  const plan = at ? { plan: { xM: at[0], yM: at[1] } } : {};
  return { elements: [{ ...viaStart(document), fromLayer, toLayer, ...plan, id }], replaces: false };
}

/** The layer of the pins at an end of the channel: the old one where it is an outer layer, else no via is asked for. */
function outerOr(document: CompleteChannel, old: string, layer: string): string {
  const copper = copperOf(document);
  return old === copper[0]?.name || old === copper.at(-1)?.name ? old : layer;
}

function copperOf(document: CompleteChannel) {
  return (document.stackup?.layers ?? []).filter((layer) => layer.kind === 'copper');
}
