/** Who may do what: one table for server, tests and buttons. Routes name an action; the server looks it up here. */
export const roles = [
  'layout-engineer',
  'si-reviewer',
  'project-manager',
  'librarian',
  'administrator',
] as const;
export type Role = (typeof roles)[number];

export const roleTitles: Readonly<Record<Role, string>> = {
  'layout-engineer': 'Layout engineer',
  'si-reviewer': 'SI reviewer',
  'project-manager': 'Project manager',
  librarian: 'Librarian',
  administrator: 'Administrator',
};

/**
 * What ownership an action needs besides a role.
 * - `public`: nobody need be signed in; - `demo`: public, and only where the demonstration runs;
 * - `signed-in`: any active person; - `member`: a member of the board the thing belongs to.
 */
export const scopes = ['public', 'demo', 'signed-in', 'member'] as const;
export type Scope = (typeof scopes)[number];

export interface Right {
  readonly scope: Scope;
  /** Roles that may; left out, every role may. */
  readonly roles?: readonly Role[];
}

const boardMakers: readonly Role[] = ['layout-engineer', 'project-manager'];
const administrators: readonly Role[] = ['administrator'];
const engineers: readonly Role[] = ['layout-engineer'];
/** A reviewer may enter what the fabricator answered; it then counts as a change of theirs when it comes to signing. */
const stackupMakers: readonly Role[] = ['layout-engineer', 'si-reviewer'];

export const rights = {
  'health.read': { scope: 'public' },
  'session.read': { scope: 'public' },
  'session.sign-in': { scope: 'public' },
  'session.sign-out': { scope: 'signed-in' },
  'password.change': { scope: 'signed-in' },
  'password.ask-reset': { scope: 'public' },
  'password.complete-reset': { scope: 'public' },
  'administrator.claim': { scope: 'public' },
  'api.describe': { scope: 'public' },
  'demo-mail.read': { scope: 'demo' },
  'people.directory': { scope: 'signed-in' },
  'people.list': { scope: 'signed-in', roles: administrators },
  'people.change': { scope: 'signed-in', roles: administrators },
  'events.list': { scope: 'signed-in', roles: administrators },
  'outbox.list': { scope: 'signed-in', roles: administrators },
  'stream.read': { scope: 'signed-in' },
  'masks.list': { scope: 'signed-in' },
  'boards.list': { scope: 'signed-in' },
  'boards.create': { scope: 'signed-in', roles: boardMakers },
  'board.read': { scope: 'member' },
  'board.change': { scope: 'member', roles: boardMakers },
  'board.members': { scope: 'member', roles: boardMakers },
  'revision.read': { scope: 'member' },
  'revision.create': { scope: 'member', roles: boardMakers },
  'revision.change': { scope: 'member', roles: boardMakers },
  'link.change': { scope: 'member', roles: engineers },
  'file.read': { scope: 'member' },
  'file.upload': { scope: 'member', roles: engineers },
  'channel.read': { scope: 'member' },
  'channel.create': { scope: 'member', roles: engineers },
  'channel.change': { scope: 'member', roles: engineers },
  'channel.check': { scope: 'member' },
  'stackup.read': { scope: 'member' },
  'stackup.create': { scope: 'member', roles: stackupMakers },
  'stackup.use': { scope: 'member', roles: engineers },
  'stackups.list': { scope: 'signed-in' },
  'section.solve': { scope: 'signed-in' },
} as const satisfies Record<string, Right>;

export type Action = keyof typeof rights;

export function rightOf(action: Action): Right {
  return rights[action];
}

/** Whether a person's roles allow the action; membership is asked for apart. */
export function roleAllows(action: Action, held: readonly Role[]): boolean {
  const right = rightOf(action);
  return right.roles === undefined || right.roles.some((role) => held.includes(role));
}
