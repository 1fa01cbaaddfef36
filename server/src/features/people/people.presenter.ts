import type { DirectoryEntry, Person } from '@tollgate/contracts';
import type { StoredPerson } from './people.repository';

export function presentPerson(person: StoredPerson): Person {
  return {
    id: person.id,
    name: person.name,
    email: person.email,
    roles: person.roles,
    active: person.active,
    invited: person.passwordHash === null,
    lastSignInAt: person.lastSignInAt?.toISOString() ?? null,
    createdAt: person.createdAt.toISOString(),
  };
}

export function presentDirectoryEntry(person: StoredPerson): DirectoryEntry {
  return { id: person.id, name: person.name, roles: person.roles };
}
