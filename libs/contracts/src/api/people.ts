import * as z from 'zod';
import { line } from '../text';
import { email, id, instant, list, role } from './common';

export const person = z.object({
  id,
  name: z.string(),
  email: z.string(),
  roles: z.array(role),
  active: z.boolean(),
  /** No password set yet: the invitation has not been taken up. */
  invited: z.boolean(),
  lastSignInAt: instant.nullable(),
  createdAt: instant,
});
export type Person = z.output<typeof person>;
export const people = list(person);

export const directoryEntry = z.object({ id, name: z.string(), roles: z.array(role) });
export type DirectoryEntry = z.output<typeof directoryEntry>;
export const directory = list(directoryEntry);

const heldRoles = z.array(role).min(1, 'Choose at least one role.').max(5);
export const personCreate = z.strictObject({ name: line('Name', 100), email, roles: heldRoles });
export const personChange = z
  .strictObject({
    name: line('Name', 100).optional(),
    roles: heldRoles.optional(),
    active: z.boolean().optional(),
  })
  .refine(
    (change) => Object.values(change).some((value) => value !== undefined),
    'Change at least one thing.',
  );

export const auditEvent = z.object({
  seq: z.number(),
  at: instant,
  who: z.string().nullable(),
  what: z.string(),
  subject: z.string(),
  detail: z.string(),
});
export type AuditEvent = z.output<typeof auditEvent>;
export const eventQuery = z.strictObject({
  before: z.coerce.number().int().min(1).optional(),
  take: z.coerce.number().int().min(1).max(200).default(50),
  what: z.string().max(60).optional(),
  who: z.uuid().optional(),
});
export const auditEvents = z.object({ items: z.array(auditEvent), nextBefore: z.number().nullable() });

export const outboxEntry = z.object({
  id,
  to: z.string(),
  subject: z.string(),
  state: z.enum(['waiting', 'sent', 'failed']),
  attempts: z.number(),
  lastError: z.string().nullable(),
  createdAt: instant,
  sentAt: instant.nullable(),
});
export const outbox = list(outboxEntry);

export const caughtMail = z.object({
  id: z.string(),
  from: z.string(),
  to: z.array(z.string()),
  subject: z.string(),
  text: z.string(),
  html: z.string(),
  receivedAt: instant,
});
export type CaughtMail = z.output<typeof caughtMail>;
export const caughtMails = list(caughtMail);
