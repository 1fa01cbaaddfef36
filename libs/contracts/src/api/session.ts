import * as z from 'zod';
import { line } from '../text';
import { email, id, oneTimeToken, password, role } from './common';

export const signedInPerson = z.object({ id, name: z.string(), email: z.string(), roles: z.array(role) });
export type SignedInPerson = z.output<typeof signedInPerson>;

export const session = z.object({
  csrfToken: z.string(),
  person: signedInPerson.nullable(),
  demonstration: z.boolean(),
  /** No person exists yet: the one-time link on the console makes the first administrator. */
  unclaimed: z.boolean(),
  can: z.object({ createBoards: z.boolean(), managePeople: z.boolean() }),
});
export type Session = z.output<typeof session>;

export const signIn = z.strictObject({
  email: z
    .string({ error: 'Give your mail address.' })
    .trim()
    .min(1, 'Give your mail address.')
    .max(200)
    .toLowerCase(),
  password: z.string({ error: 'Give your password.' }).min(1, 'Give your password.').max(200),
});
export type SignIn = z.output<typeof signIn>;

export const passwordChange = z.strictObject({
  currentPassword: z
    .string({ error: 'Give your current password.' })
    .min(1, 'Give your current password.')
    .max(200),
  newPassword: password,
});
export type PasswordChange = z.output<typeof passwordChange>;

export const resetRequest = z.strictObject({ email });
export const resetCompletion = z.strictObject({ token: oneTimeToken, newPassword: password });
export const administratorClaim = z.strictObject({
  token: oneTimeToken,
  name: line('Name', 100),
  email,
  password,
});
