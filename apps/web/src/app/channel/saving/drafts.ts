import { Injectable } from '@angular/core';
import type { CompleteChannel } from '@tollgate/contracts';
import { draftPrefix } from '../../session/session-store';

export interface Draft {
  /** What the edits were made on. */
  readonly version: number;
  readonly base: CompleteChannel;
  readonly document: CompleteChannel;
  readonly at: string;
}

/** Unsaved edits in this browser, kept until the server has them; they go at sign-out. */
@Injectable({ providedIn: 'root' })
export class Drafts {
  /** Says whether it could be kept: a browser may refuse storage, or be full. */
  keep(channelId: string, draft: Draft): boolean {
    try {
      localStorage.setItem(draftPrefix + channelId, JSON.stringify(draft));
      return true;
    } catch (error) {
      if (error instanceof DOMException) return false;
      throw error;
    }
  }

  find(channelId: string): Draft | undefined {
    try {
      const text = localStorage.getItem(draftPrefix + channelId);
      return text === null ? undefined : (JSON.parse(text) as Draft);
    } catch (error) {
      if (error instanceof DOMException || error instanceof SyntaxError) return undefined;
      throw error;
    }
  }

  forget(channelId: string): void {
    try {
      localStorage.removeItem(draftPrefix + channelId);
    } catch (error) {
      if (!(error instanceof DOMException)) throw error;
    }
  }
}
