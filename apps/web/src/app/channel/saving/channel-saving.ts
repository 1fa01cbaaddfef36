import { computed, DestroyRef, inject, Injectable, signal } from '@angular/core';
import { takeUntilDestroyed, toObservable } from '@angular/core/rxjs-interop';
import type { Channel, CompleteChannel } from '@tollgate/contracts';
import { debounceTime, tap } from 'rxjs';
import { ApiClient } from '../../api/api-client';
import { apiProblemOf, type ApiProblem } from '../../api/api-problem';
import { Availability } from '../../api/availability';
import { Toasts } from '../../states/toasts';
import { ChannelStore } from '../document/channel-store';
import { Conflicts } from './conflicts';
import { Drafts, type Draft } from './drafts';
import { mergeDocuments } from './merge';

const settleMs = 800;

export type SaveState = 'saved' | 'changed' | 'saving' | 'away' | 'refused';

/** Saves the document a moment after the last change, over the version it was made from; keeps a draft until then. */
@Injectable()
export class ChannelSaving {
  private readonly api = inject(ApiClient);
  private readonly store = inject(ChannelStore);
  private readonly drafts = inject(Drafts);
  private readonly conflicts = inject(Conflicts);
  private readonly toasts = inject(Toasts);
  private readonly availability = inject(Availability);
  private readonly destroyed = inject(DestroyRef);
  private readonly now = signal<SaveState>('saved');
  private readonly said = signal('');
  private sending = false;
  /** A person is choosing between mine and theirs: nothing is sent meanwhile. */
  private settling = false;

  readonly state = this.now.asReadonly();
  /** Why the server refused the document. */
  readonly refusal = this.said.asReadonly();
  readonly dirty = computed(
    () => this.store.document() !== undefined && this.store.document() !== this.store.channel()?.document,
  );

  constructor() {
    toObservable(this.store.document)
      .pipe(
        tap(() => this.noteChange()),
        debounceTime(settleMs),
        takeUntilDestroyed(),
      )
      .subscribe(() => this.save());
    this.destroyed.onDestroy(() => this.save());
  }

  /** Sends what is not saved yet; harmless where all is. */
  save(): void {
    const channel = this.store.channel();
    const document = this.store.document();
    if (!channel || !document || !channel.can.change) return;
    if (!this.dirty() || this.sending || this.settling) return;
    this.sending = true;
    this.now.set('saving');
    const body = { document, why: this.store.reason() };
    this.api.put<Channel>(`/channels/${channel.id}`, body, channel.version).subscribe({
      next: (saved) => this.acknowledged(document, saved),
      error: (error: unknown) => this.failed(document, apiProblemOf(error)),
    });
  }

  /** Another person saved: taken in as it is, or merged with what is not saved yet. */
  takeIn(theirs: Channel): void {
    const channel = this.store.channel();
    if (!channel || theirs.version <= channel.version) return;
    if (this.sending || this.settling) return;
    if (!this.dirty()) {
      this.store.open(theirs);
      this.toasts.done(`${theirs.changedBy} saved this channel; you see it as it is now.`);
      return;
    }
    this.join(channel.document, this.store.document()!, theirs);
  }

  private noteChange(): void {
    const channel = this.store.channel();
    const document = this.store.document();
    if (!channel || !document || !this.dirty()) return;
    if (this.now() !== 'saving' && this.now() !== 'away') this.now.set('changed');
    const { version, document: base } = channel;
    this.drafts.keep(channel.id, { version, base, document, at: new Date().toISOString() });
  }

  private acknowledged(sent: CompleteChannel, saved: Channel): void {
    this.sending = false;
    this.said.set('');
    // What was sent is what is stored; keeping the object keeps "nothing to save" true by identity.
    this.store.acknowledge({ ...saved, document: sent });
    if (this.store.document() === sent) {
      this.drafts.forget(saved.id);
      this.now.set('saved');
    } else {
      this.noteChange();
      this.save();
    }
  }

  private failed(sent: CompleteChannel, problem: ApiProblem): void {
    this.sending = false;
    if (problem.status === 412 && problem.problem.current) {
      const theirs = problem.problem.current as Channel;
      this.join(this.store.channel()!.document, this.store.document()!, theirs);
      return;
    }
    if (problem.away) {
      this.now.set('away');
      this.availability
        .lost()
        .pipe(takeUntilDestroyed(this.destroyed))
        .subscribe(() => this.save());
      return;
    }
    this.now.set('refused');
    this.said.set(problem.fields[0]?.message ?? problem.message);
    if (problem.fields.length && this.store.document() === sent) this.store.problems.set(problem.fields);
  }

  private join(base: CompleteChannel, mine: CompleteChannel, theirs: Channel): void {
    const merged = mergeDocuments(base, mine, theirs.document);
    if (merged.conflicts.length === 0) {
      this.settle(theirs, merged.document);
      this.toasts.done(`${theirs.changedBy} saved this channel too; both edits are joined.`);
      return;
    }
    this.now.set('changed');
    this.settling = true;
    this.conflicts.settle(merged.conflicts, theirs.changedBy).subscribe((choices) => {
      this.settling = false;
      this.settle(theirs, mergeDocuments(base, mine, theirs.document, choices).document);
    });
  }

  /** Edits that a browser kept when they could not be saved. */
  recover(draft: Draft): void {
    const channel = this.store.channel();
    if (!channel) return;
    if (draft.version === channel.version) this.store.merged(draft.document);
    else this.join(draft.base, draft.document, channel);
  }

  private settle(theirs: Channel, document: CompleteChannel): void {
    this.store.acknowledge(theirs);
    this.store.merged(document);
    this.save();
  }
}
