import type { Sequelize } from 'sequelize';
import type { StackupKind } from '@tollgate/contracts';
import { column } from '../../platform/database';
import type { Table } from '../../platform/work';

export interface StackupRow {
  id: string;
  revisionId: string;
  number: number;
  kind: StackupKind;
  why: string;
  /** JSON of the stackup in SI. */
  document: string;
  /** Of the canonical document: two versions of one hash are the same stackup. */
  sha256: string;
  createdAt: Date;
  createdBy: string | null;
}

export function defineStackups(sequelize: Sequelize): Table<StackupRow> {
  return sequelize.define('stackup_versions', {
    id: column.id,
    revisionId: column.reference,
    number: column.integer,
    kind: column.text,
    why: column.text,
    document: column.longText,
    sha256: column.hash,
    createdAt: column.instant,
    createdBy: column.reference,
  });
}
