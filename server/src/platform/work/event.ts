/** What happened, as a unit of work tells it; the chain adds who, when and its place. */
export interface NewEvent {
  /** Stable name, `thing.happened`. */
  readonly what: string;
  /** Identifier of what it happened to. */
  readonly subject: string;
  readonly from?: unknown;
  readonly to?: unknown;
  /** One sentence for the audit page. */
  readonly detail?: string;
  readonly boardId?: string | null;
}
