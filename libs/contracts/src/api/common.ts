import * as z from 'zod';
import { bounds } from '../bounds';
import { roles } from '../rights';

export const id = z.uuid('An identifier is a UUID.');
export const instant = z.iso.datetime('A time is written as 2026-05-31T12:00:00.000Z.');
export const day = z.iso.date('A date is written as 2026-05-31.');
export const role = z.enum(roles, `A role is one of ${roles.join(', ')}.`);

export const email = z
  .email('Write an address such as name@example.com.')
  .max(200, 'An address has at most 200 characters.')
  .transform((text) => text.toLowerCase());

export const password = z
  .string({ error: 'Give a password.' })
  .min(bounds.passwordCharacters.min, `A password has at least ${bounds.passwordCharacters.min} characters.`)
  .max(bounds.passwordCharacters.max, `A password has at most ${bounds.passwordCharacters.max} characters.`);

/** A secret from a mailed link: 32 random bytes as base64url. */
export const oneTimeToken = z
  .string()
  .regex(/^[A-Za-z0-9_-]{43}$/, 'The link is incomplete: copy it whole from the mail.');

/** What the reader of a reply may do with the thing in it; buttons follow it, the server decides by the same table. */
export function can<Key extends string>(...keys: Key[]) {
  return z.object(Object.fromEntries(keys.map((key) => [key, z.boolean()])) as Record<Key, z.ZodBoolean>);
}

export function list<Item extends z.ZodType>(item: Item) {
  return z.object({ items: z.array(item) });
}
