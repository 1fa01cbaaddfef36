import type { ChannelVerdict, CompleteChannel, FieldProblem, Standing } from '@tollgate/contracts';
import type { SolvedSection } from '@tollgate/elements';
import type { SectionHelp } from './section-store';

/** A part as a check names it: the key in the channel, and which file it is. */
export interface TaskPart {
  readonly key: string;
  readonly sha256: string;
  readonly name: string;
}

/** What is handed to a worker thread. */
export interface CheckTask {
  readonly channel: CompleteChannel;
  readonly parts: readonly TaskPart[];
  /** Data directory, where the parsed parts lie. */
  readonly dataDirectory: string;
  /** What is wanted: what the screen draws, or the whole response. */
  readonly form: 'view' | 'response';
  /** One shared number, not 0 once a newer check has taken this one's place. */
  readonly flag: Int32Array<SharedArrayBuffer>;
  /** Solved cross-sections of its traces, and which of them to hand back. */
  readonly sections: SectionHelp;
}

/** Columns that lists and filters need of a check. */
export interface CheckSummary {
  readonly verdict: ChannelVerdict;
  readonly worstMarginDb: number | null;
  readonly worstLimitTitle: string | null;
  readonly worstLimitStatus: string | null;
  readonly worstFrequencyHz: number | null;
  readonly weakestStanding: Standing;
}

export interface CheckOutcome {
  readonly fingerprint: string;
  readonly engine: string;
  readonly summary: CheckSummary;
  /** The view or response, written as JSON in the worker, so that the serving thread only passes it on. */
  readonly json: string;
}

/** `superseded`: the flag was raised, and the thread left off. */
export type TaskResult =
  | { readonly ok: false; readonly superseded: true }
  | { readonly ok: true; readonly outcome: CheckOutcome; readonly solved: readonly SolvedSection[] }
  | { readonly ok: false; readonly superseded: false; readonly problems: readonly FieldProblem[] };
