import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { Empty } from '../states/empty';
import { StackupStore } from './document/stackup-store';
import { startingStackups } from './document/starting-stackups';

/** A revision without a stackup: what one can start from. */
@Component({
  selector: 'tg-stackup-start',
  imports: [Empty, MatButton, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tg-empty headline="This revision has no stackup yet" [detail]="detail()">
      @if (store.mayChange()) {
        <div class="ways">
          @for (start of starts; track start.key) {
            <button type="button" class="way" (click)="store.put(start.stackup)">
              <strong>{{ start.title }}</strong>
              <span>{{ start.detail }}</span>
            </button>
          }
          <a
            matButton="outlined"
            [routerLink]="[]"
            [queryParams]="{ dialog: 'copy' }"
            queryParamsHandling="merge"
            >Copy from another revision</a
          >
        </div>
      }
    </tg-empty>
  `,
  styles: `
    .ways {
      display: flex;
      flex-wrap: wrap;
      gap: var(--tg-space-3);
      align-items: center;
    }
    .way {
      display: grid;
      gap: 2px;
      max-width: 250px;
      padding: var(--tg-space-3) var(--tg-space-4);
      border: 1px solid var(--tg-outline);
      border-radius: var(--tg-radius);
      background: var(--tg-surface);
      color: var(--tg-ink);
      font: inherit;
      text-align: start;
      cursor: pointer;
    }
    .way:hover {
      border-color: var(--tg-copper);
    }
    .way span {
      color: var(--tg-slate);
      font-size: var(--tg-text-small);
    }
  `,
})
export class StackupStart {
  protected readonly store = inject(StackupStore);
  protected readonly starts = startingStackups;

  protected detail(): string {
    return this.store.mayChange()
      ? 'Start from values of our own, each marked as assumed, or from a stackup of another revision. Nothing is stored until you save a version.'
      : 'A layout engineer or reviewer who is a member makes it.';
  }
}
