import type { CompleteChannel } from '@tollgate/contracts';
import { samePoint, shifted, type Point } from '@tollgate/geometry';
import type { PlanItem } from '../layout/plan-layout';

export type Elements = CompleteChannel['elements'];
export type Side = 'near' | 'far';

/**
 * Takes along what is joined to one end of an element: the end of the trace there, and parts in between with what is
 * joined to their other end. Elements without a place of their own follow by the rule of the layout.
 */
export function pull(
  elements: Elements,
  items: readonly PlanItem[],
  from: number,
  side: Side,
  by: Point,
): void {
  if (by[0] === 0 && by[1] === 0) return;
  const [step, facing]: [number, Side] = side === 'near' ? [-1, 'far'] : [1, 'near'];
  for (let i = from; ; i += step) {
    const [here, next] = [items[i]!, items[i + step]];
    if (!next || !samePoint(here[side], next[facing])) return;
    const element = elements[next.index]!;
    if (next.body === 'trace') {
      if (element.kind === 'trace' && element.path) elements[next.index] = withEndMoved(element, facing, by);
      return;
    }
    if (element.plan) {
      const [xM, yM] = shifted([element.plan.xM, element.plan.yM], by);
      elements[next.index] = { ...element, plan: { ...element.plan, xM, yM } };
    }
  }
}

type Trace = Extract<Elements[number], { kind: 'trace' }>;

function withEndMoved(trace: Trace, end: Side, by: Point): Trace {
  const path = trace.path!.slice();
  const k = end === 'near' ? 0 : path.length - 1;
  path[k] = [...shifted(path[k]!, by)];
  return { ...trace, path };
}
