import { DatePipe } from '@angular/common';
import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { RouterLink } from '@angular/router';
import { differencesOf } from './document/differences';
import { StackupDrafts } from './document/stackup-drafts';
import { StackupStore } from './document/stackup-store';

/** What one must know before going on: edits that came back, a version saved meanwhile, drafts that are behind. */
@Component({
  selector: 'tg-stackup-notes',
  imports: [DatePipe, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @if (store.overtaking(); as theirs) {
      <div class="note warn" role="alert">
        <p>
          <strong>{{ theirs.createdBy }} saved version {{ theirs.number }} in the meantime:</strong>
          “{{ theirs.why }}” Yours is kept in this browser and not saved.
        </p>
        <ul>
          @for (change of apart(); track $index) {
            <li>{{ change }}</li>
          } @empty {
            <li>The layers are the same as yours.</li>
          }
        </ul>
        <button type="button" (click)="store.settle(theirs)">
          Take version {{ theirs.number }}, drop mine
        </button>
        <button type="button" (click)="goOn()">Go on with mine over version {{ theirs.number }}</button>
      </div>
    } @else if (store.recoveredAt()) {
      <p class="note" role="status">
        Edits of {{ store.recoveredAt() | date: 'd MMM y, HH:mm' }} were in no version and are back from this
        browser.
        <button type="button" (click)="discard()">Discard them</button>
      </p>
    }
    @if (behind() && store.versions()?.can?.use) {
      <p class="note" role="status">
        {{ behind() }}
        <a [routerLink]="[]" [queryParams]="{ dialog: 'use' }" queryParamsHandling="merge"
          >Let them take it</a
        >
      </p>
    }
  `,
  styles: `
    .note {
      padding: 6px var(--tg-space-4);
      border-left: 3px solid var(--tg-ochre);
      background: color-mix(in srgb, var(--tg-ochre) 12%, var(--tg-ground));
      overflow-wrap: anywhere;
    }
    .note + .note {
      margin-top: var(--tg-space-2);
    }
    .warn {
      border-left-color: var(--tg-oxide);
      background: color-mix(in srgb, var(--tg-oxide) 9%, var(--tg-ground));
    }
    ul {
      margin: var(--tg-space-1) 0;
      padding-left: 18px;
      font-size: var(--tg-text-small);
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
    a {
      color: var(--tg-ink);
      font-weight: 600;
    }
  `,
})
export class StackupNotes {
  private readonly drafts = inject(StackupDrafts);
  protected readonly store = inject(StackupStore);

  protected readonly apart = computed(() => {
    const theirs = this.store.overtaking();
    const mine = this.store.stackup();
    return theirs && mine ? differencesOf(theirs.document, mine).slice(0, 12) : [];
  });
  protected readonly behind = computed(() => {
    const { behind, following } = this.store.versions()?.drafts ?? { behind: 0, following: 0 };
    if (behind === 0) return '';
    return `${behind} of ${following} channels that follow this stackup still have an earlier version; their checks are out of date.`;
  });

  /** Theirs is the ground from now on; the edits stay. */
  protected goOn(): void {
    this.store.base.set(this.store.overtaking());
    this.store.overtaking.set(undefined);
  }

  protected discard(): void {
    this.drafts.forget(this.store.revisionId());
    this.store.open(this.store.revisionId(), this.store.base());
  }
}
