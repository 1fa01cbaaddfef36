import { Injectable } from '@angular/core';
import type { CompleteStackup } from '@tollgate/contracts';
import { draftPrefix } from '../../session/session-store';

export interface StackupDraft {
  /** The version the edits were made on; 0 for none. */
  readonly number: number;
  readonly stackup: CompleteStackup;
  readonly at: string;
}

/** Edits of a revision's stackup that are in no version yet, kept in this browser; they go at sign-out. */
@Injectable({ providedIn: 'root' })
export class StackupDrafts {
  keep(revisionId: string, draft: StackupDraft): void {
    this.guarded(() => localStorage.setItem(keyOf(revisionId), JSON.stringify(draft)));
  }

  find(revisionId: string): StackupDraft | undefined {
    const text = this.guarded(() => localStorage.getItem(keyOf(revisionId)));
    return text ? this.guarded(() => JSON.parse(text) as StackupDraft) : undefined;
  }

  forget(revisionId: string): void {
    this.guarded(() => localStorage.removeItem(keyOf(revisionId)));
  }

  /** A browser may refuse storage, or be full, or hold what it did not write: the draft is then not there. */
  private guarded<Result>(act: () => Result): Result | undefined {
    try {
      return act();
    } catch (error) {
      if (error instanceof DOMException || error instanceof SyntaxError) return undefined;
      throw error;
    }
  }
}

function keyOf(revisionId: string): string {
  return `${draftPrefix}stackup.${revisionId}`;
}
