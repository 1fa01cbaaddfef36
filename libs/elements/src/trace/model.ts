import type { LineMode, ModeName } from '@tollgate/lines';

/** A trace's modes over frequency, and what a person should know of them. */
export interface TraceModel {
  readonly modes: Partial<Record<ModeName, LineMode>>;
  readonly standing: 'solved' | 'estimated' | 'assumed';
  /** The publication or solver the numbers come from. */
  readonly source: string;
  readonly cautions: readonly string[];
}
