import { ChangeDetectionStrategy, Component, computed, inject, output } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatMenu, MatMenuItem, MatMenuTrigger } from '@angular/material/menu';
import { elementKinds, type ElementKind, type KindDescription } from '@tollgate/contracts';
import { ChannelStore } from '../document/channel-store';

const groups: readonly { readonly group: KindDescription['group']; readonly title: string }[] = [
  { group: 'board', title: 'On the board' },
  { group: 'part', title: 'Parts' },
  { group: 'circuit', title: 'Circuit' },
];

/** Every kind that may stand in this channel, by group. */
@Component({
  selector: 'tg-element-tray',
  imports: [MatButton, MatMenu, MatMenuItem, MatMenuTrigger],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <button matButton type="button" [matMenuTriggerFor]="menu">Add an element</button>
    <mat-menu #menu="matMenu" class="tg-tray">
      @for (each of groups(); track each.title) {
        <p class="group" role="presentation">{{ each.title }}</p>
        @for (kind of each.kinds; track kind.kind) {
          <button mat-menu-item type="button" [attr.data-kind]="kind.kind" (click)="chosen.emit(kind.kind)">
            {{ kind.title }}
          </button>
        }
      }
    </mat-menu>
  `,
  styles: `
    button[matButton] {
      height: 30px;
      padding: 0 8px;
    }
    .group {
      padding: 8px 12px 2px;
      color: var(--tg-slate);
      font-size: var(--tg-text-small);
    }
    .mat-mdc-menu-item {
      min-height: 32px;
    }
  `,
})
export class ElementTray {
  private readonly store = inject(ChannelStore);

  readonly chosen = output<ElementKind>();

  protected readonly groups = computed(() =>
    groups.map(({ group, title }) => ({
      title,
      kinds: elementKinds.filter(
        (kind) =>
          kind.group === group && (kind.use === 'both' || kind.use === this.store.document()?.signaling),
      ),
    })),
  );
}
