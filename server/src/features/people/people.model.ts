import type { Sequelize } from 'sequelize';
import type { Role } from '@tollgate/contracts';
import { column } from '../../platform/database';
import type { Table } from '../../platform/work';

export interface PersonRow {
  id: string;
  name: string;
  email: string;
  passwordHash: string | null;
  active: boolean;
  createdAt: Date;
  lastSignInAt: Date | null;
}

interface RoleRow {
  personId: string;
  role: Role;
}

export interface TokenRow {
  hash: string;
  purpose: TokenPurpose;
  personId: string | null;
  expiresAt: Date;
  usedAt: Date | null;
  createdAt: Date;
}

/** What a mailed or printed secret may be used for, once. */
export type TokenPurpose = 'reset' | 'invitation' | 'first-administrator';

export function definePeople(sequelize: Sequelize): {
  people: Table<PersonRow>;
  roles: Table<RoleRow>;
  tokens: Table<TokenRow>;
} {
  return {
    people: sequelize.define('people', {
      id: column.id,
      name: column.text,
      email: column.text,
      passwordHash: column.text,
      active: column.flag,
      createdAt: column.instant,
      lastSignInAt: column.instant,
    }),
    roles: sequelize.define('person_roles', {
      personId: { ...column.reference, primaryKey: true },
      role: { ...column.text, primaryKey: true },
    }),
    tokens: sequelize.define('tokens', {
      hash: { ...column.hash, primaryKey: true },
      purpose: column.text,
      personId: column.reference,
      expiresAt: column.instant,
      usedAt: column.instant,
      createdAt: column.instant,
    }),
  };
}
