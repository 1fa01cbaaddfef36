import * as z from 'zod';
import { bounds } from '../bounds';
import { problemsOf, type FieldProblem } from '../problems';
import { channelFile } from './channel-file';
import { withIds, type CompleteChannel } from './complete';

export type ParsedChannel =
  | { readonly ok: true; readonly channel: CompleteChannel }
  | { readonly ok: false; readonly problems: readonly FieldProblem[] };

/** Shape, bounds and units of a channel document; the result is in SI, with defaults and ids filled in. */
export function parseChannelFile(document: unknown): ParsedChannel {
  const parsed = channelFile.safeParse(document);
  return parsed.success
    ? { ok: true, channel: withIds(parsed.data) }
    : { ok: false, problems: problemsOf(parsed.error, document).slice(0, 100) };
}

/** Reads the text of a channel file; a JSON error is told with its place. */
export function parseChannelText(text: string): ParsedChannel {
  if (text.length > bounds.documentBytes) {
    return refused('The file is larger than 2 MB.', 'Split it, or keep measured data in Touchstone parts.');
  }
  try {
    return parseChannelFile(JSON.parse(text.replace(/^\ufeff/, '')) as unknown);
  } catch (error) {
    if (!(error instanceof SyntaxError)) throw error;
    return refused(
      `The file is not JSON: ${error.message}.`,
      'A channel file is one JSON document in UTF-8.',
    );
  }
}

function refused(message: string, mend: string): ParsedChannel {
  return { ok: false, problems: [{ path: '', message, mend }] };
}

/** JSON Schema of the channel file as it is written: every quantity a number or text with a unit. */
export function channelJsonSchema(): Record<string, unknown> {
  return z.toJSONSchema(channelFile, { io: 'input', unrepresentable: 'any' });
}
