import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { ChannelStore } from '../document/channel-store';
import { ChannelSaving } from './channel-saving';
import { Drafts, type Draft } from './drafts';
import { isSame } from './same';

/** Offers edits that this browser kept when they could not be saved. */
@Component({
  selector: 'tg-draft-note',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @if (draft(); as draft) {
      <p role="status">
        Edits of {{ time(draft) }} were not saved and are kept in this browser.
        <button type="button" (click)="recover(draft)">Bring them back</button>
        <button type="button" (click)="discard()">Discard them</button>
      </p>
    }
  `,
  styles: `
    p {
      padding: 5px var(--tg-space-4);
      border-bottom: 1px solid var(--tg-ochre);
      background: color-mix(in srgb, var(--tg-ochre) 14%, var(--tg-ground));
    }
    button {
      padding: 0 4px;
      border: 0;
      background: none;
      color: var(--tg-ink);
      font: inherit;
      font-weight: 600;
      text-decoration: underline;
      cursor: pointer;
    }
  `,
})
export class DraftNote {
  private readonly drafts = inject(Drafts);
  private readonly saving = inject(ChannelSaving);
  private readonly store = inject(ChannelStore);
  private readonly answered = signal(false);

  /** As it was found when the channel was opened: what is kept while editing is no news. */
  private readonly first = computed(() => {
    const channel = this.store.channel();
    return channel && this.atOpening(channel.id);
  });
  protected readonly draft = computed(() => {
    const draft = this.first();
    const document = this.store.document();
    if (!draft || this.answered() || !document || !this.store.mayChange()) return undefined;
    return isSame(draft.document, document) ? undefined : draft;
  });
  private readonly opened = new Map<string, Draft | undefined>();

  protected time({ at }: Draft): string {
    return new Date(at).toLocaleString('en-GB', { dateStyle: 'medium', timeStyle: 'short' });
  }

  protected recover(draft: Draft): void {
    this.answered.set(true);
    this.saving.recover(draft);
  }

  protected discard(): void {
    this.answered.set(true);
    const id = this.store.channel()?.id;
    if (id) this.drafts.forget(id);
  }

  private atOpening(id: string): Draft | undefined {
    if (!this.opened.has(id)) this.opened.set(id, this.drafts.find(id));
    return this.opened.get(id);
  }
}
