import type { CompleteChannel } from '@tollgate/contracts';
import { bounds } from '@tollgate/contracts';
import { tidyPoint, type Point } from '@tollgate/geometry';
import type { PlanTrace } from '../layout/plan-layout';
import type { Elements } from './pull';

type Path = [number, number][];
type Trace = Extract<Elements[number], { kind: 'trace' }>;

/** A vertex in the piece that begins at `piece`. */
export function withVertexInserted(
  document: CompleteChannel,
  id: string,
  piece: number,
  at: Point,
): CompleteChannel {
  return withPath(document, id, (path) =>
    path.length >= bounds.pathVertices
      ? path
      : [...path.slice(0, piece + 1), [...tidyPoint(at)], ...path.slice(piece + 1)],
  );
}

/** Without one vertex; a path of two keeps both. */
export function withoutVertex(document: CompleteChannel, id: string, vertex: number): CompleteChannel {
  return withPath(document, id, (path) => (path.length <= 2 ? path : path.filter((_, k) => k !== vertex)));
}

/** A trace whose length was typed, drawn where the layout shows it: the typed length stays, and says so. */
export function withDrawnAsShown(document: CompleteChannel, item: PlanTrace): CompleteChannel {
  return withTrace(document, item.id, (trace) =>
    trace.path ? trace : { ...trace, path: item.points.map((point) => [...tidyPoint(point)]) },
  );
}

/** The length follows what is drawn from now on. */
export function withLengthAsDrawn(document: CompleteChannel, id: string): CompleteChannel {
  return withTrace(document, id, (trace) => {
    if (!trace.path || (trace.lengthM === undefined && trace.lengthNM === undefined)) return trace;
    const { lengthM: _typed, lengthNM: _typedN, ...rest } = trace;
    return rest;
  });
}

function withPath(document: CompleteChannel, id: string, change: (path: Path) => Path): CompleteChannel {
  return withTrace(document, id, (trace) => {
    if (!trace.path) return trace;
    const path = change(trace.path);
    return path.length === trace.path.length ? trace : { ...trace, path };
  });
}

function withTrace(document: CompleteChannel, id: string, change: (trace: Trace) => Trace): CompleteChannel {
  const index = document.elements.findIndex((element) => element.id === id);
  const trace = document.elements[index];
  if (trace?.kind !== 'trace') return document;
  const changed = change(trace);
  if (changed === trace) return document;
  return { ...document, elements: document.elements.map((each, i) => (i === index ? changed : each)) };
}
