/** Every address of the client, written once; templates link with these. */
export const paths = {
  signIn: '/sign-in',
  forgot: '/forgot',
  boards: '/boards',
  board: (boardId: string) => `/boards/${boardId}`,
  revision: (revisionId: string) => `/revisions/${revisionId}`,
  stackup: (revisionId: string) => `/revisions/${revisionId}/stackup`,
  channel: (channelId: string) => `/channels/${channelId}`,
  people: '/people',
  account: '/account',
  mail: '/mail',
} as const;

/** What the browser's tab says; pages about one thing set its name themselves (PageTitle). */
export const titles = {
  signIn: 'Sign in',
  forgot: 'Forgotten password',
  reset: 'New password',
  firstAdministrator: 'First administrator',
  boards: 'Boards',
  board: 'Board',
  revision: 'Revision',
  stackup: 'Stackup',
  channel: 'Channel',
  people: 'People',
  account: 'Account',
  mail: 'Mail',
  notFound: 'Not found',
} as const;
