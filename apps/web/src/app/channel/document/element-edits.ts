import {
  freeId,
  kindDescription,
  newElement,
  type ChannelElement,
  type CompleteChannel,
  type ElementKind,
} from '@tollgate/contracts';
import { withValue, type Path } from './at-path';

export type PlacedElement = CompleteChannel['elements'][number];
export type PlacedLimit = CompleteChannel['limits'][number];

function elementIds(document: CompleteChannel): Set<string> {
  return new Set(document.elements.map((element) => element.id));
}

/** Puts a new element of a kind after the one named, or at the far end. */
export function withNewElement(
  document: CompleteChannel,
  kind: ElementKind,
  afterId: string | undefined,
): { document: CompleteChannel; id: string } {
  const id = freeId(kindDescription(kind).prefix, elementIds(document));
  return {
    document: inserted(document, { ...newElement(kind, document.signaling, document.stackup), id }, afterId),
    id,
  };
}

/** A second element like the one named, right behind it. */
export function withDuplicate(
  document: CompleteChannel,
  ofId: string,
): { document: CompleteChannel; id: string } {
  const original = document.elements.find((element) => element.id === ofId);
  if (!original) return { document, id: ofId };
  const id = freeId(kindDescription(original.kind).prefix, elementIds(document));
  return { document: inserted(document, { ...original, id }, ofId), id };
}

export function withoutElement(document: CompleteChannel, id: string): CompleteChannel {
  return { ...document, elements: document.elements.filter((element) => element.id !== id) };
}

/** Moves an element to a place in the list; a place beyond an end is the end. */
export function withMoved(document: CompleteChannel, id: string, to: number): CompleteChannel {
  const from = document.elements.findIndex((element) => element.id === id);
  const place = Math.max(0, Math.min(document.elements.length - 1, to));
  if (from < 0 || from === place) return document;
  const elements = document.elements.slice();
  const [moved] = elements.splice(from, 1);
  elements.splice(place, 0, moved!);
  return { ...document, elements };
}

export function withElementValue(
  document: CompleteChannel,
  id: string,
  path: Path,
  value: unknown,
): CompleteChannel {
  const elements = document.elements.map((element) =>
    element.id === id ? withValue(element, path, value) : element,
  );
  return { ...document, elements };
}

export function withElement(
  document: CompleteChannel,
  id: string,
  change: (element: PlacedElement) => ChannelElement,
): CompleteChannel {
  const elements = document.elements.map((element) =>
    element.id === id ? { ...change(element), id } : element,
  );
  return { ...document, elements };
}

export function withLimit(document: CompleteChannel, id: string, limit: PlacedLimit): CompleteChannel {
  return { ...document, limits: document.limits.map((each) => (each.id === id ? limit : each)) };
}

function inserted(document: CompleteChannel, element: PlacedElement, afterId: string | undefined) {
  const after = document.elements.findIndex((each) => each.id === afterId);
  const elements = document.elements.slice();
  elements.splice(after < 0 ? elements.length : after + 1, 0, element);
  return { ...document, elements };
}
