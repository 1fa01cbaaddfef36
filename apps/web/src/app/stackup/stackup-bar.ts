import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { api, type Revision } from '@tollgate/contracts';
import { Glyph } from '../marks/glyph';
import { paths } from '../paths';
import { StackupStore } from './document/stackup-store';

/** The top bar of the stackup: where it is, which version it stands on, the way back, and saving. */
@Component({
  selector: 'tg-stackup-bar',
  imports: [Glyph, MatButton, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <div class="place">
      <nav aria-label="Trail">
        <a [routerLink]="paths.board(revision().boardId)" [title]="revision().boardName">{{
          revision().boardName
        }}</a>
        <span class="slash" aria-hidden="true">/</span>
        <a [routerLink]="paths.revision(revision().id)">revision {{ revision().letter }}</a>
        <span class="slash" aria-hidden="true">/</span>
      </nav>
      <strong>Stackup</strong>
    </div>
    <div class="state">
      <span class="saved" role="status">{{ state() }}</span>
      @if (store.mayChange() && store.stackup()) {
        <button
          type="button"
          class="step"
          aria-label="Undo"
          title="Undo, Ctrl+Z"
          [disabled]="!store.canUndo()"
          (click)="store.undo()"
        >
          <tg-glyph name="undo" />
        </button>
        <button
          type="button"
          class="step"
          aria-label="Redo"
          title="Redo, Ctrl+Shift+Z"
          [disabled]="!store.canRedo()"
          (click)="store.redo()"
        >
          <tg-glyph name="redo" />
        </button>
        @if (store.dirty()) {
          <a
            matButton="filled"
            class="save"
            [routerLink]="[]"
            [queryParams]="{ dialog: 'save' }"
            queryParamsHandling="merge"
            >Save version {{ (store.base()?.number ?? 0) + 1 }}</a
          >
        }
      }
    </div>
  `,
  styleUrl: './stackup-bar.scss',
})
export class StackupBar {
  protected readonly store = inject(StackupStore);

  readonly revision = input.required<Revision>();

  protected readonly paths = paths;
  protected readonly state = computed(() => {
    const base = this.store.base();
    const version = base
      ? `Version ${base.number}, ${api.stackupKindTitles[base.kind].toLowerCase()}`
      : 'No version yet';
    if (!this.store.mayChange()) return `${version}, read only`;
    return this.store.dirty() ? `${version}, changed and not saved` : version;
  });
}
