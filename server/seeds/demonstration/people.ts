import { randomBytes, randomUUID } from 'node:crypto';
import { writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { roleTitles, type Role } from '@tollgate/contracts';
import type { Config } from '../../src/platform/config/config';
import type { Caller } from '../../src/platform/http';
import { theProduct, type UnitOfWork } from '../../src/platform/work';
import { hashPassword, type PeopleRepository } from '../../src/features/people';

interface Invented {
  readonly name: string;
  readonly mail: string;
  readonly roles: readonly Role[];
}

/** People of the demonstration; invented, as everything in it. */
const invented: readonly Invented[] = [
  { name: 'Mira Solvang', mail: 'mira', roles: ['layout-engineer'] },
  { name: 'Teo Brandt', mail: 'teo', roles: ['layout-engineer'] },
  { name: 'Ines Varga', mail: 'ines', roles: ['si-reviewer'] },
  { name: 'Jonas Okafor', mail: 'jonas', roles: ['project-manager'] },
  { name: 'Lea Marchetti', mail: 'lea', roles: ['librarian'] },
  { name: 'Rui Almeida', mail: 'rui', roles: ['administrator'] },
];

export interface DemoPeople {
  readonly engineer: Caller;
  readonly second: Caller;
  readonly reviewer: Caller;
  readonly manager: Caller;
  readonly librarian: Caller;
}

/** Makes the people, each with a password of its own, and writes the sign-ins to the data directory for its owner's eyes only. */
export async function seedPeople(
  config: Config,
  repository: PeopleRepository,
  unitOfWork: UnitOfWork,
): Promise<DemoPeople> {
  const made = await Promise.all(
    invented.map(async (person) => {
      const password = randomBytes(12).toString('base64url');
      const email = `${person.mail}@demo.tollgate.example`;
      return {
        id: randomUUID(),
        name: person.name,
        email,
        roles: [...person.roles],
        password,
        passwordHash: await hashPassword(password, config.scryptLogN),
      };
    }),
  );
  await unitOfWork(theProduct, async (work) => {
    for (const { password: _password, ...person } of made) {
      await repository.insert(work, { ...person, active: true, createdAt: work.at, lastSignInAt: null });
      work.event({
        what: 'person.invented',
        subject: person.id,
        to: { name: person.name, roles: person.roles },
        detail: `${person.name} made for the demonstration`,
      });
    }
  });
  const signIns = made.map(({ roles, name, email, password }) => ({
    role: roleTitles[roles[0]!],
    name,
    email,
    password,
  }));
  await writeFile(join(config.dataDirectory, 'demo-sign-ins.json'), `${JSON.stringify(signIns, null, 2)}\n`, {
    mode: 0o600,
  });
  const [engineer, second, reviewer, manager, librarian] = made.map(({ id, name, email, roles }): Caller => ({
    id,
    name,
    email,
    roles,
  }));
  return {
    engineer: engineer!,
    second: second!,
    reviewer: reviewer!,
    manager: manager!,
    librarian: librarian!,
  };
}
