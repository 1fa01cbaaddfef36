import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import type { MaskSet, Signaling } from '@tollgate/contracts';
import { ApiClient } from '../../api/api-client';
import { Failure } from '../../states/failure';
import { Loading } from '../../states/loading';
import { quantityTitle } from './verdict-lines';

export interface MaskSetDialogData {
  readonly signaling: Signaling;
}
export interface MaskSetChoice {
  readonly set: MaskSet;
  /** Places of the chosen limits in the set. */
  readonly chosen: ReadonlySet<number>;
}

/** The mask sets there are; one is chosen, and which of its limits. */
@Component({
  selector: 'tg-mask-set-dialog',
  imports: [Failure, Loading, MatButton, MatDialogModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './mask-set-dialog.html',
  styleUrl: './mask-set-dialog.scss',
})
export class MaskSetDialog {
  private readonly api = inject(ApiClient);
  private readonly ref = inject<MatDialogRef<MaskSetDialog, MaskSetChoice>>(MatDialogRef);
  protected readonly data = inject<MaskSetDialogData>(MAT_DIALOG_DATA);
  protected readonly source = rxResource({ stream: () => this.api.get<{ items: MaskSet[] }>('/mask-sets') });
  protected readonly wanted = signal('');
  protected readonly chosenId = signal<string | undefined>(undefined);
  protected readonly left = signal<ReadonlySet<number>>(new Set());
  protected readonly quantityTitle = quantityTitle;

  protected readonly sets = computed(() => {
    const words = this.wanted().toLowerCase().split(/\s+/).filter(Boolean);
    const items = this.source.hasValue() ? this.source.value().items : [];
    return items.filter((set) => {
      const text = `${set.title} ${set.standard} ${set.clause} ${set.key} ${set.status}`.toLowerCase();
      return words.every((word) => text.includes(word));
    });
  });
  protected readonly chosen = computed(() => this.sets().find((set) => set.id === this.chosenId()));
  protected readonly count = computed(() => (this.chosen()?.limits.length ?? 0) - this.left().size);

  protected filter(event: Event): void {
    this.wanted.set((event.target as HTMLInputElement).value);
  }

  protected choose(set: MaskSet): void {
    this.chosenId.set(set.id);
    this.left.set(new Set());
  }

  protected toggle(index: number): void {
    this.left.update((left) => {
      const next = new Set(left);
      if (!next.delete(index)) next.add(index);
      return next;
    });
  }

  protected take(): void {
    const set = this.chosen();
    if (!set) return;
    const chosen = new Set(set.limits.map((_, i) => i).filter((i) => !this.left().has(i)));
    this.ref.close({ set, chosen });
  }
}
