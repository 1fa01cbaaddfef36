import { Injectable } from '@angular/core';
import type { StreamEvent } from '@tollgate/contracts';
import { filter, Observable, share } from 'rxjs';

const pollEveryMs = 10_000;

/** What an event must be about; a field left out takes all. */
export interface Subject {
  readonly boardId?: string;
  readonly revisionId?: string;
  readonly channelId?: string;
}

/** `what` of the event that stands for "something may have changed": sent every 10 s while there is no stream. */
export const pollEvent = 'poll';

/**
 * What changes on the server, as it changes. One EventSource a tab, shared by all who listen and closed with the last;
 * the browser resumes it by Last-Event-ID. Without it a `poll` event comes every 10 s: read again what is shown.
 */
@Injectable({ providedIn: 'root' })
export class EventStream {
  private lastSeq: number | undefined;

  readonly events: Observable<StreamEvent> = new Observable<StreamEvent>((subscriber) => {
    let source: EventSource | undefined;
    let pause: ReturnType<typeof setTimeout> | undefined;
    const open = (): void => {
      source = new EventSource(this.address());
      source.onmessage = (message: MessageEvent<string>) => {
        const event = JSON.parse(message.data) as StreamEvent;
        this.lastSeq = event.seq;
        subscriber.next(event);
      };
      source.onerror = () => {
        if (source?.readyState !== EventSource.CLOSED) return;
        subscriber.next(poll(this.lastSeq ?? 0));
        pause = setTimeout(open, pollEveryMs);
      };
    };
    open();
    return () => {
      clearTimeout(pause);
      source?.close();
    };
  }).pipe(share());

  /** Events about one thing, and polls; the thing is asked for with each event, so that it may follow an input. */
  about(subject: () => Subject): Observable<StreamEvent> {
    return this.events.pipe(filter((event) => event.what === pollEvent || isAbout(event, subject())));
  }

  private address(): string {
    return this.lastSeq === undefined ? '/api/stream' : `/api/stream?since=${this.lastSeq}`;
  }
}

function isAbout(event: StreamEvent, subject: Subject): boolean {
  const wanted = Object.entries(subject) as [keyof Subject, string][];
  return wanted.every(([key, value]) => event[key] === value);
}

function poll(seq: number): StreamEvent {
  return { seq, what: pollEvent, boardId: null, revisionId: null, channelId: null, version: null, who: null };
}
