import { computed, inject, Injectable, signal } from '@angular/core';
import { takeUntilDestroyed, toObservable } from '@angular/core/rxjs-interop';
import type { Channel, CheckView, CompleteChannel } from '@tollgate/contracts';
import { catchError, debounceTime, map, of, switchMap, type Observable } from 'rxjs';
import { ApiClient } from '../../api/api-client';
import { apiProblemOf } from '../../api/api-problem';
import { ChannelStore } from './channel-store';

const settleMs = 30;

type Outcome = { readonly view: CheckView } | { readonly failure: unknown };

/** Checks the document as it stands, a moment after each change; a newer check cancels the one on its way. */
@Injectable()
export class CheckRunner {
  private readonly api = inject(ApiClient);
  private readonly store = inject(ChannelStore);
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
    toObservable(this.store.document)
      .pipe(
        debounceTime(settleMs),
        switchMap((document) => (document ? this.check(document) : of(undefined))),
        takeUntilDestroyed(),
      )
      .subscribe();
  }

  /** The check that came with the channel shows at once. */
  show(channel: Channel): void {
    this.last.set(channel.check ?? undefined);
    this.of.set(channel.check ? channel.document : undefined);
    this.said.set(channel.check ? '' : (channel.checkProblems[0]?.message ?? ''));
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
    this.store.problems.set(problem.fields);
    this.said.set(problem.fields[0]?.message ?? problem.message);
  }
}
