import type { LimitResult } from '@tollgate/contracts';

/** What a limit's comparison came to, with what a drawing of it needs beside `LimitResult`. */
export interface Judgement extends LimitResult {
  /** Ranges of the limit (or of its fit) that no part or grid reaches. */
  readonly missingHz: [number, number][];
  /** The reference the value was judged at: the differential value for a pair. */
  readonly referenceOhm: number;
  /** The value judged, on the grid's points; null where it is infinite. Empty where it could not be had. */
  readonly valueDb: (number | null)[];
}
