import {
  parseChannelFile,
  type ChannelElement,
  type CompleteChannel,
  type FieldProblem,
  type Warning,
} from '@tollgate/contracts';
import { elementFiles, elementProblems } from '@tollgate/elements';
import { compileMask, limitProblems } from '@tollgate/masks';
import { referencesOf } from './references';

/** Whether parts are named by path (command line), by identifier (API), or either. */
export type PartsMode = 'file' | 'fileId' | 'any';

export type ReadResult =
  | { readonly ok: true; readonly channel: CompleteChannel; readonly warnings: Warning[] }
  | { readonly ok: false; readonly problems: FieldProblem[] };

/** A Touchstone part that an element names: its key in the map of parts, and where in the channel file it is named. */
export interface PartReference {
  readonly key: string;
  readonly path: string;
}

/**
 * Reads a channel document: shape, bounds and units, then everything that can be said of elements and limits without
 * their parts. Never throws on a bad document; every problem has its full path, such as `elements[3].circuit[0].lengthM`.
 */
export function readChannel(document: unknown, options: { parts: PartsMode } = { parts: 'any' }): ReadResult {
  const parsed = parseChannelFile(document);
  if (!parsed.ok) return { ok: false, problems: [...parsed.problems] };
  const { channel } = parsed;
  const problems = [
    ...referenceProblems(channel),
    ...channel.elements.flatMap((element, i) => problemsOfElement(element, i, channel, options.parts)),
    ...channel.limits.flatMap((limit, i) => {
      const path = `limits[${i}]`;
      const mask = compileMask(limit, path);
      return [...limitProblems(limit, channel.signaling, path), ...(mask.ok ? [] : mask.problems)];
    }),
  ];
  return problems.length ? { ok: false, problems } : { ok: true, channel, warnings: [] };
}

/** The parts a channel names, in the order of its elements; one part may be named more than once. */
export function partsNeeded(channel: CompleteChannel): PartReference[] {
  return channel.elements.flatMap((element, i) =>
    elementFiles(element).map(({ key, path }) => ({ key, path: `elements[${i}].${path}` })),
  );
}

function problemsOfElement(
  element: ChannelElement,
  index: number,
  channel: CompleteChannel,
  mode: PartsMode,
): FieldProblem[] {
  const at = `elements[${index}]`;
  const found = elementProblems(element, channel.signaling, channel.stackup).map(
    ({ path, message, mend }): FieldProblem => ({ path: pathInside(at, path), message, mend }),
  );
  if (mode === 'file' && 'fileId' in element && element.fileId !== undefined) {
    found.push({
      path: `${at}.fileId`,
      message: 'A part named by fileId lies on a server and cannot be read here.',
      mend: 'Name the Touchstone file as file, by its path from the channel file; an export with parts does so.',
    });
  }
  if (mode === 'fileId' && 'file' in element && element.file !== undefined) {
    found.push({
      path: `${at}.file`,
      message: 'A path cannot be followed on the server.',
      mend: 'Upload the Touchstone file and name it by its fileId, or import the channel with its parts as a zip.',
    });
  }
  return found;
}

/** A path inside an element, written from the channel's root. */
export function pathInside(element: string, path: string): string {
  if (path === '') return element;
  return path.startsWith('[') ? `${element}${path}` : `${element}.${path}`;
}

/** Mixed mode is of one pair an end: its p and n must have one reference. */
function referenceProblems(channel: CompleteChannel): FieldProblem[] {
  if (channel.signaling !== 'differential') return [];
  const z = referencesOf(channel);
  return ['near', 'far'].flatMap((end, k) => {
    const p = k * 4;
    if (z[p] === z[p + 2] && z[p + 1] === z[p + 3]) return [];
    return {
      path: `referenceOhm[${k * 2 + 1}]`,
      message: `The ${end} end has different references on p and n.`,
      mend: 'Give both conductors of an end the same reference impedance.',
    };
  });
}
