import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { api, type Board } from '@tollgate/contracts';
import { ApiClient } from '../api/api-client';
import { FormFailure } from '../forms/form-failure';
import { formOf, requestOf } from '../forms/schema-validators';
import { Submission } from '../forms/submission';
import { TextField } from '../forms/text-field';

/** Left out for a new board. */
export interface BoardDialogData {
  readonly board?: Pick<Board, 'id' | 'name' | 'description'>;
}

/** A board's name and description, new or changed; gives the board as stored. */
@Component({
  selector: 'tg-board-dialog',
  imports: [FormFailure, MatButton, MatDialogModule, ReactiveFormsModule, TextField],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './board-dialog.html',
  styleUrl: '../forms/form-layout.scss',
})
export class BoardDialog {
  private readonly api = inject(ApiClient);
  private readonly ref = inject<MatDialogRef<BoardDialog, Board>>(MatDialogRef);
  private readonly board = inject<BoardDialogData>(MAT_DIALOG_DATA).board;

  protected readonly heading = this.board ? 'Board' : 'New board';
  protected readonly action = this.board ? 'Save' : 'Create the board';
  protected readonly form = formOf(api.boardCreate, {
    name: this.board?.name ?? '',
    description: this.board?.description ?? '',
  });
  protected readonly submission = new Submission(this.form);

  dirty(): boolean {
    return this.form.dirty;
  }

  protected submit(): void {
    const body = () => requestOf(api.boardCreate, this.form);
    this.submission.send(
      () =>
        this.board
          ? this.api.patch<Board>(`/boards/${this.board.id}`, body())
          : this.api.post<Board>('/boards', body()),
      (saved) => this.ref.close(saved),
    );
  }
}
