import type { CompleteChannel } from '@tollgate/contracts';
import { shifted, stepped, tidyPoint, wayTo, type Point } from '@tollgate/geometry';
import { bodySizes } from '../layout/bodies';
import type { PlanItem, PlanLayout } from '../layout/plan-layout';
import { pull } from './pull';

/** A via or part at another place, and turned where a rotation is given; trace ends joined to it follow. */
export function withNodeAt(
  document: CompleteChannel,
  layout: PlanLayout,
  id: string,
  to: Point,
  rotation?: number,
): CompleteChannel {
  const item = itemOf(layout, id);
  if (!item || item.body === 'trace') return document;
  const rotationDeg = turned(rotation ?? item.rotationDeg);
  const at = tidyPoint(to);
  const elements = document.elements.slice();
  const element = elements[item.index]!;
  const { plan } = element;
  if (plan && plan.xM === at[0] && plan.yM === at[1] && (plan.rotationDeg ?? 0) === rotationDeg)
    return document;
  const turn = rotationDeg === 0 ? {} : { rotationDeg };
  elements[item.index] = { ...element, plan: { xM: at[0], yM: at[1], ...turn } };
  const half = bodySizes[item.body].lengthM / 2;
  pull(elements, layout.items, item.index, 'near', wayTo(item.near, stepped(at, rotationDeg, -half)));
  pull(elements, layout.items, item.index, 'far', wayTo(item.far, stepped(at, rotationDeg, half)));
  return { ...document, elements };
}

/** One vertex of a trace at another place; what is joined to an end goes along. */
export function withVertexAt(
  document: CompleteChannel,
  layout: PlanLayout,
  id: string,
  vertex: number,
  to: Point,
): CompleteChannel {
  const item = itemOf(layout, id);
  const element = item && document.elements[item.index];
  const old = element?.kind === 'trace' ? element.path?.[vertex] : undefined;
  if (!item || element?.kind !== 'trace' || !element.path || !old) return document;
  const at = tidyPoint(to);
  const by = wayTo(old, at);
  if (by[0] === 0 && by[1] === 0) return document;
  const elements = document.elements.slice();
  elements[item.index] = { ...element, path: element.path.map((each, k) => (k === vertex ? [...at] : each)) };
  if (vertex === 0) pull(elements, layout.items, item.index, 'near', by);
  if (vertex === element.path.length - 1) pull(elements, layout.items, item.index, 'far', by);
  return { ...document, elements };
}

/** A whole element shifted; what is joined to either end goes along. */
export function withShifted(
  document: CompleteChannel,
  layout: PlanLayout,
  id: string,
  by: Point,
): CompleteChannel {
  const item = itemOf(layout, id);
  if (!item) return document;
  if (item.body !== 'trace') return withNodeAt(document, layout, id, shifted(item.at, by));
  const element = document.elements[item.index]!;
  if (element.kind !== 'trace' || !element.path) return document;
  const elements = document.elements.slice();
  elements[item.index] = { ...element, path: element.path.map((each) => [...shifted(each, by)]) };
  pull(elements, layout.items, item.index, 'near', by);
  pull(elements, layout.items, item.index, 'far', by);
  return { ...document, elements };
}

/** Where the places of an element that can be moved stand; a trace that is only typed has none. */
export function movable(item: PlanItem | undefined): boolean {
  return item !== undefined && (item.body !== 'trace' || item.drawn);
}

function itemOf(layout: PlanLayout, id: string): PlanItem | undefined {
  return layout.items.find((item) => item.id === id);
}

function turned(degrees: number): number {
  const rest = ((degrees % 360) + 360) % 360;
  return Math.round(rest * 1e6) / 1e6;
}
