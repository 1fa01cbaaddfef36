import type { CompleteChannel } from '@tollgate/contracts';
import { pairLengthsM, polylineLengthM } from '@tollgate/geometry';
import { callOf } from '../../elements/element-words';
import type { PlanItem, PlanTrace } from '../layout/plan-layout';
import type { PlanView } from '../view/plan-view';

/** `L3 0.110 / 0.150 mm, 62.40 mm`, and whether the length is typed. */
export function traceWords(item: PlanTrace, view: PlanView): string {
  const { layer, widthM, gapM, lengthM, typed, drawn } = item;
  const fine = (valueM: number) => (valueM / view.unitM()).toFixed(view.unit() === 'mm' ? 3 : 1);
  const cut = gapM === undefined ? fine(widthM) : `${fine(widthM)} / ${fine(gapM)}`;
  const geometry = layer ? [`${layer} ${cut} ${view.unit()}`] : [];
  const length = `${view.written(lengthM)}${typed ? ' typed' : ''}`;
  const beside = typed && drawn ? [`drawn ${view.written(polylineLengthM(item.points))}`] : [];
  return [...geometry, length, ...beside].join(', ');
}

/** How much longer the n leg of a pair is than the p leg; 0 for a single trace, undefined where no pair can follow the path. */
export function mismatchM(element: CompleteChannel['elements'][number]): number | undefined {
  if (element.kind === 'line-pair') return element.n.lengthM - element.p.lengthM;
  if (element.kind !== 'trace' || element.gapM === undefined) return 0;
  const { lengthM, lengthNM, path, gapM, widthM } = element;
  if (lengthM !== undefined) return (lengthNM ?? lengthM) - lengthM;
  if (!path) return 0;
  try {
    const legs = pairLengthsM(path, widthM + gapM);
    return (lengthNM ?? legs.nM) - legs.pM;
  } catch (error) {
    if (error instanceof RangeError) return undefined;
    throw error;
  }
}

export interface ChannelLengths {
  readonly totalM: number;
  readonly typedM: number;
  /** n leg less p leg, over all of the channel; undefined where a path turns back on itself. */
  readonly mismatchM: number | undefined;
}

export function lengthsOf(document: CompleteChannel, items: readonly PlanItem[]): ChannelLengths {
  const traces = items.filter((item): item is PlanTrace => item.body === 'trace');
  const sum = (some: readonly PlanTrace[]) => some.reduce((total, { lengthM }) => total + lengthM, 0);
  return {
    totalM: sum(traces),
    typedM: sum(traces.filter(({ typed }) => typed)),
    mismatchM: document.elements.reduce<number | undefined>((total, element) => {
      const own = mismatchM(element);
      return total === undefined || own === undefined ? undefined : total + own;
    }, 0),
  };
}

/** An element with where it stands, for those who read the plan and do not see it. */
export function placeWords(
  item: PlanItem,
  element: CompleteChannel['elements'][number],
  view: PlanView,
): string {
  const at = ([x, y]: readonly [number, number]) => `${view.number(x)}, ${view.number(y)}`;
  const unit = view.unit();
  if (item.body === 'trace') {
    const vertices = item.drawn ? `, ${item.points.length} vertices` : ', not drawn';
    return `${callOf(element)}: ${traceWords(item, view)}, from ${at(item.near)} to ${at(item.far)} ${unit}${vertices}`;
  }
  const turned = item.drawn && item.rotationDeg ? `, turned ${Math.round(item.rotationDeg)}°` : '';
  return `${callOf(element)}: at ${at(item.at)} ${unit}${turned}${item.drawn ? '' : ', not placed'}`;
}
