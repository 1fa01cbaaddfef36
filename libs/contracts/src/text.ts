import * as z from 'zod';
import { bounds } from './bounds';

/** One line of text: trimmed, without control characters, never empty. */
export function line(label: string, max: number = bounds.textCharacters) {
  return z
    .string({ error: `${label} is missing.` })
    .trim()
    .min(1, `${label} must not be empty.`)
    .max(max, `${label} must be at most ${max} characters.`)

    .regex(/^[^\u0000-\u001f\u007f]*$/, `${label} must be one line without control characters.`);
}

/** Longer text in which new lines and tabs are allowed. */
export function notes(label: string) {
  return z
    .string()
    .max(bounds.notesCharacters, `${label} must be at most ${bounds.notesCharacters} characters.`)

    .regex(
      /^[^\u0000-\u0008\u000b\u000c\u000e-\u001f\u007f]*$/,
      `${label} must not contain control characters.`,
    );
}
