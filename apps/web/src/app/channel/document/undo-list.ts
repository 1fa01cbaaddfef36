import { applyPatch, compare, deepClone, JsonPatchError, type Operation } from 'fast-json-patch';

/** One step back and forth, as JSON patches that test what they change, so that a merge in between is noticed. */
export interface Step {
  readonly key: string;
  readonly at: number;
  readonly back: readonly Operation[];
  readonly forth: readonly Operation[];
}

/** Edits of one field that follow each other faster than this are one step. */
const together = 1500;

/** Edits whose key begins so are one drag, and one step however long it takes. */
export const dragKey = 'drag ';

/** The list with an edit added; typing on in one field lengthens the last step. */
export function withStep(
  steps: readonly Step[],
  before: object,
  after: object,
  key: string,
  at: number,
): readonly Step[] {
  const back = compare(after, before, true);
  const forth = compare(before, after, true);
  const last = steps.at(-1);
  if (last && key !== '' && last.key === key && (key.startsWith(dragKey) || at - last.at < together)) {
    const longer = { key, at, back: [...back, ...last.back], forth: [...last.forth, ...forth] };
    return [...steps.slice(0, -1), longer];
  }
  return [...steps, { key, at, back, forth }].slice(-200);
}

/** The document after a patch; undefined where it no longer fits. */
export function patched<Document extends object>(
  document: Document,
  patch: readonly Operation[],
): Document | undefined {
  try {
    return applyPatch(deepClone(document) as Document, deepClone(patch) as Operation[], true).newDocument;
  } catch (error) {
    if (error instanceof JsonPatchError) return undefined;
    throw error;
  }
}
