import { computed, DestroyRef, inject, Injectable, signal } from '@angular/core';
import { takeUntilDestroyed, toObservable } from '@angular/core/rxjs-interop';
import type { Channel, CheckView, CompleteChannel } from '@tollgate/contracts';
import { catchError, debounceTime, map, merge, of, Subject, switchMap, type Observable } from 'rxjs';
import { ApiClient } from '../../api/api-client';
import { apiProblemOf } from '../../api/api-problem';
import { Availability } from '../../api/availability';
import { ChannelStore } from './channel-store';

const settleMs = 30;

type Outcome = { readonly view: CheckView } | { readonly failure: unknown };

/** Checks the document as it stands, a moment after each change; a newer check cancels the one on its way. */
@Injectable()
export class CheckRunner {
  private readonly api = inject(ApiClient);
  private readonly availability = inject(Availability);
  private readonly destroyed = inject(DestroyRef);
  private readonly store = inject(ChannelStore);
  private readonly again = new Subject<void>();
  private readonly last = signal<CheckView | undefined>(undefined);
  private readonly of = signal<CompleteChannel | undefined>(undefined);
  private readonly said = signal('');

  /** The last check that came about; what shows while a newer one is on its way or cannot be made. */
  readonly view = this.last.asReadonly();
  /** Why there is no check of the document as it stands; empty where there is one. */
  readonly failure = this.said.asReadonly();
  /** The view is not of the document on the screen. */
  readonly behind = computed(() => this.last() !== undefined && this.of() !== this.store.document());

  constructor() {
    merge(toObservable(this.store.document), this.again)
      .pipe(
        debounceTime(settleMs),
        map(() => this.store.document()),
        switchMap((document) => (document ? this.check(document) : of(undefined))),
        takeUntilDestroyed(),
      )
      .subscribe();
  }

  /** The check that came with the channel shows at once. */
  show(channel: Channel): void {
    this.last.set(channel.check ?? undefined);
    this.of.set(channel.check ? channel.document : undefined);
    const why = channel.checkProblems[0]?.message;
    this.said.set(channel.check || !why ? '' : uncheckable(why));
  }

  private check(document: CompleteChannel): Observable<void> {
    const channel = this.store.channel();
    if (!channel || this.of() === document) return of(undefined);
    return this.api.post<CheckView>(`/channels/${channel.id}/check`, { document }).pipe(
      map((view): Outcome => ({ view })),
      catchError((failure: unknown) => of<Outcome>({ failure })),
      map((outcome) => this.take(document, outcome)),
    );
  }

  private take(document: CompleteChannel, outcome: Outcome): void {
    if ('view' in outcome) {
      this.of.set(document);
      this.last.set(outcome.view);
      this.said.set('');
      this.store.problems.set([]);
      return;
    }
    const problem = apiProblemOf(outcome.failure);
    if (problem.away) {
      this.said.set('Not checked while the server is away.');
      this.availability
        .lost()
        .pipe(takeUntilDestroyed(this.destroyed))
        .subscribe(() => this.again.next());
      return;
    }
    this.store.problems.set(problem.fields);
    this.said.set(uncheckable(problem.fields[0]?.message ?? problem.message));
  }
}

function uncheckable(why: string): string {
  return `This document cannot be checked: ${why}`;
}
