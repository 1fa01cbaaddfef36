import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { fieldWords, valueWords } from '../document/field-words';
import type { Conflict, Side } from './merge';

export interface ConflictDialogData {
  readonly conflicts: readonly Conflict[];
  readonly who: string;
}

/** What two people changed at the same time, one line a field; mine is chosen until theirs is. */
@Component({
  selector: 'tg-conflict-dialog',
  imports: [MatButton, MatDialogModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './conflict-dialog.html',
  styleUrl: './conflict-dialog.scss',
})
export class ConflictDialog {
  private readonly ref = inject<MatDialogRef<ConflictDialog, ReadonlyMap<string, Side>>>(MatDialogRef);
  protected readonly data = inject<ConflictDialogData>(MAT_DIALOG_DATA);
  protected readonly choices = signal<ReadonlyMap<string, Side>>(new Map());
  protected readonly fieldWords = fieldWords;

  /** Escape would leave the two edits apart: the person chooses first. */
  dirty(): boolean {
    return true;
  }

  protected words(conflict: Conflict, side: Side): string {
    return valueWords(conflict.field, conflict[side]);
  }

  protected sideOf(conflict: Conflict): Side {
    return this.choices().get(conflict.key) ?? 'mine';
  }

  protected choose(conflict: Conflict, side: Side): void {
    this.choices.update((choices) => new Map(choices).set(conflict.key, side));
  }

  protected done(): void {
    this.ref.close(this.choices());
  }
}
