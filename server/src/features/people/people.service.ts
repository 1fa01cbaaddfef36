import { randomUUID } from 'node:crypto';
import { roleTitles, type Role } from '@tollgate/contracts';
import type { Sequelize } from 'sequelize';
import type { Config } from '../../platform/config/config';
import { endSessions, problems } from '../../platform/http';
import { mailBodies } from '../../platform/mail';
import { theProduct, type Actor, type UnitOfWork, type Work } from '../../platform/work';
import type { PeopleRepository, StoredPerson } from './people.repository';
import type { TokenPurpose } from './people.model';
import { hashPassword, newToken, passwordMatches, tokenHash } from './secrets';

const lifeMs: Record<TokenPurpose, number> = {
  reset: 3600 * 1000,
  invitation: 7 * 24 * 3600 * 1000,
  'first-administrator': 24 * 3600 * 1000,
};

export type PeopleService = ReturnType<typeof createPeopleService>;

interface Needs {
  readonly config: Config;
  readonly sequelize: Sequelize;
  readonly repository: PeopleRepository;
  readonly unitOfWork: UnitOfWork;
}

export function createPeopleService({ config, sequelize, repository, unitOfWork }: Needs) {
  async function issueToken(work: Work, purpose: TokenPurpose, personId: string | null): Promise<string> {
    const { token, hash } = newToken();
    await repository.insertToken(work, {
      hash,
      purpose,
      personId,
      expiresAt: new Date(work.at.getTime() + lifeMs[purpose]),
      usedAt: null,
      createdAt: work.at,
    });
    return token;
  }

  async function mailLink(work: Work, person: StoredPerson, purpose: 'reset' | 'invitation'): Promise<void> {
    const token = await issueToken(work, purpose, person.id);
    const url = `${config.url}/reset/${token}`;
    const invited = purpose === 'invitation';
    const words = invited ? 'Choose a password' : 'Set a new password';
    const told = invited
      ? [
          `${person.name}, you have been invited to Tollgate as ${titles(person.roles)}.`,
          'The link below lets you choose your password. It works once, for seven days.',
        ]
      : [
          `${person.name}, a new password for Tollgate was asked for.`,
          'The link below works once, for one hour. If it was not you, leave it: nothing has changed.',
        ];
    work.mail({
      to: person.email,
      subject: invited ? 'Your invitation to Tollgate' : 'A new password for Tollgate',
      ...mailBodies(told, { words, url }),
    });
  }

  return {
    byId: (id: string) => repository.byId(id),
    all: () => repository.all(),

    /** The active person these credentials belong to; undefined where they belong to nobody. */
    async verify(email: string, password: string): Promise<StoredPerson | undefined> {
      const person = await repository.byEmail(email);
      const right = await passwordMatches(password, person?.passwordHash, config.scryptLogN);
      return right && person?.active ? person : undefined;
    },

    async recordSignIn(person: StoredPerson): Promise<void> {
      await unitOfWork(actor(person), async (work) => {
        await repository.update(work, person.id, { lastSignInAt: work.at });
        work.event({ what: 'person.signed-in', subject: person.id, detail: `${person.name} signed in` });
      });
    },

    async invite(by: Actor, input: { name: string; email: string; roles: Role[] }): Promise<StoredPerson> {
      if (await repository.byEmail(input.email)) throw taken(input.email);
      const id = randomUUID();
      await unitOfWork(by, async (work) => {
        const person: StoredPerson = {
          id,
          name: input.name,
          email: input.email,
          roles: unique(input.roles),
          passwordHash: null,
          active: true,
          createdAt: work.at,
          lastSignInAt: null,
        };
        await repository.insert(work, person);
        await mailLink(work, person, 'invitation');
        work.event({
          what: 'person.invited',
          subject: id,
          to: { name: input.name, email: input.email, roles: person.roles },
          detail: `${input.name} invited as ${titles(person.roles)}`,
        });
      });
      return (await repository.byId(id))!;
    },

    async change(
      by: Actor,
      id: string,
      change: { name?: string; roles?: Role[]; active?: boolean },
    ): Promise<StoredPerson> {
      await unitOfWork(by, async (work) => {
        const before = await repository.byId(id, work.transaction);
        if (!before) throw problems.notFound('This person');
        const losesAdministrator =
          before.roles.includes('administrator') &&
          (change.active === false || (change.roles && !change.roles.includes('administrator')));
        if (losesAdministrator && (await repository.otherAdministrators(work, id)) === 0) {
          throw problems.conflict('This is the last active administrator; make someone else one first.', [
            { path: change.active === false ? 'active' : 'roles', message: 'The last administrator stays.' },
          ]);
        }
        const { roles, ...columns } = change;
        if (Object.keys(columns).length) await repository.update(work, id, columns);
        if (roles) await repository.setRoles(work, id, unique(roles));
        if (change.active === false) await endSessions(sequelize, id, work.transaction);
        const { name, roles: held, active } = before;
        work.event({
          what: change.active === false ? 'person.deactivated' : 'person.changed',
          subject: id,
          from: { name, roles: held, active },
          to: change,
          detail: `${name} changed`,
        });
      });
      return (await repository.byId(id))!;
    },

    /** Mails a one-time link; administrators cannot set a password. */
    async sendLink(by: Actor, id: string): Promise<void> {
      await unitOfWork(by, async (work) => {
        const person = await repository.byId(id, work.transaction);
        if (!person) throw problems.notFound('This person');
        if (!person.active) throw problems.conflict(`${person.name} is deactivated; activate first.`);
        await mailLink(work, person, person.passwordHash === null ? 'invitation' : 'reset');
        work.event({
          what: 'person.link-sent',
          subject: id,
          detail: `One-time link mailed to ${person.name}`,
        });
      });
    },

    /** Answers alike for accounts that are and that are not. */
    async askReset(email: string): Promise<void> {
      const person = await repository.byEmail(email);
      if (!person?.active) return;
      await unitOfWork(theProduct, async (work) => {
        await mailLink(work, person, 'reset');
        work.event({
          what: 'person.reset-asked',
          subject: person.id,
          detail: `New password asked for ${person.name}`,
        });
      });
    },

    async completeReset(token: string, newPassword: string): Promise<void> {
      const passwordHash = await hashPassword(newPassword, config.scryptLogN);
      await unitOfWork(theProduct, async (work) => {
        const open = await repository.openToken(work, tokenHash(token));
        if (!open?.personId) throw problems.gone('The link has been used or has run out; ask for a new one.');
        const person = await repository.byId(open.personId, work.transaction);
        if (!person?.active) throw problems.gone('The account is deactivated; ask an administrator.');
        await repository.update(work, person.id, { passwordHash });
        await repository.closeTokens(work, open);
        await endSessions(sequelize, person.id, work.transaction);
        work.event({
          what: 'person.password-reset',
          subject: person.id,
          detail: `${person.name} set a password by link`,
        });
      });
    },

    async changePassword(personId: string, current: string, next: string, sessionId: string): Promise<void> {
      const person = await repository.byId(personId);
      if (!person || !(await passwordMatches(current, person.passwordHash, config.scryptLogN))) {
        throw problems.unprocessable([
          { path: 'currentPassword', message: 'This is not your current password.' },
        ]);
      }
      const passwordHash = await hashPassword(next, config.scryptLogN);
      await unitOfWork(actor(person), async (work) => {
        await repository.update(work, personId, { passwordHash });
        await endSessions(sequelize, personId, work.transaction, sessionId);
        work.event({
          what: 'person.password-changed',
          subject: personId,
          detail: `${person.name} changed the password`,
        });
      });
    },

    isUnclaimed: async () => (await repository.count()) === 0,

    /** The link that makes the first administrator; printed by the start, never mailed. */
    async firstAdministratorLink(): Promise<string> {
      const token = await unitOfWork(theProduct, async (work) => {
        work.event({
          what: 'administrator.link-printed',
          subject: 'people',
          detail: 'One-time link for the first administrator printed',
        });
        return issueToken(work, 'first-administrator', null);
      });
      return `${config.url}/first/${token}`;
    },

    async claimAdministrator(input: {
      token: string;
      name: string;
      email: string;
      password: string;
    }): Promise<StoredPerson> {
      const passwordHash = await hashPassword(input.password, config.scryptLogN);
      const id = randomUUID();
      await unitOfWork(theProduct, async (work) => {
        const open = await repository.openToken(work, tokenHash(input.token));
        if (open?.purpose !== 'first-administrator' || (await repository.count()) > 0) {
          throw problems.gone('The link has been used or has run out; start Tollgate again for a new one.');
        }
        await repository.insert(work, {
          id,
          name: input.name,
          email: input.email,
          roles: ['administrator'],
          passwordHash,
          active: true,
          createdAt: work.at,
          lastSignInAt: null,
        });
        await repository.closeTokens(work, open);
        work.event({
          what: 'administrator.claimed',
          subject: id,
          to: { name: input.name, email: input.email },
          detail: `${input.name} became the first administrator`,
        });
      });
      return (await repository.byId(id))!;
    },
  };
}

function actor(person: StoredPerson): Actor {
  return { personId: person.id, name: person.name };
}

function titles(roles: readonly Role[]): string {
  return roles.map((role) => roleTitles[role]).join(', ');
}

function unique<Item>(items: readonly Item[]): Item[] {
  return [...new Set(items)];
}

function taken(email: string) {
  return problems.conflict('Someone has this address already.', [
    { path: 'email', message: `${email} belongs to another person.` },
  ]);
}
