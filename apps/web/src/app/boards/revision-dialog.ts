import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { api, type Revision, type RevisionSummary } from '@tollgate/contracts';
import { ApiClient } from '../api/api-client';
import { ChoiceField, type Choice } from '../forms/choice-field';
import { FormFailure } from '../forms/form-failure';
import { formOf, requestOf } from '../forms/schema-validators';
import { Submission } from '../forms/submission';
import { TextField } from '../forms/text-field';

/** For a new revision: its board and what may be copied. For a change: the revision. */
export type RevisionDialogData =
  | { readonly boardId: string; readonly copies: readonly Pick<RevisionSummary, 'id' | 'letter'>[] }
  | { readonly revision: Pick<RevisionSummary, 'id' | 'letter' | 'releaseOn'> };

/** A revision's letter, release date and what it starts from; of a revision that exists, its release date. */
@Component({
  selector: 'tg-revision-dialog',
  imports: [ChoiceField, FormFailure, MatButton, MatDialogModule, ReactiveFormsModule, TextField],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './revision-dialog.html',
  styleUrl: '../forms/form-layout.scss',
})
export class RevisionDialog {
  private readonly api = inject(ApiClient);
  private readonly ref = inject<MatDialogRef<RevisionDialog, Revision>>(MatDialogRef);
  private readonly data = inject<RevisionDialogData>(MAT_DIALOG_DATA);

  protected readonly existing = 'revision' in this.data ? this.data.revision : undefined;
  protected readonly heading = this.existing ? `Revision ${this.existing.letter}` : 'New revision';
  protected readonly action = this.existing ? 'Save' : 'Create the revision';
  protected readonly choices: readonly Choice[] =
    'copies' in this.data
      ? this.data.copies.map((copy) => ({ value: copy.id, title: `Revision ${copy.letter}` }))
      : [];
  protected readonly form = formOf(api.revisionCreate, {
    letter: '',
    releaseOn: this.existing?.releaseOn ?? '',
    copyFrom: this.choices[0]?.value ?? '',
  });
  protected readonly submission = new Submission(this.form);

  dirty(): boolean {
    return this.form.dirty;
  }

  protected submit(): void {
    this.submission.send(
      () => this.request(),
      (saved) => this.ref.close(saved),
    );
  }

  private request() {
    if ('boardId' in this.data) {
      const body = requestOf(api.revisionCreate, this.form);
      return this.api.post<Revision>(`/boards/${this.data.boardId}/revisions`, body);
    }
    const releaseOn = this.form.controls.releaseOn.value || null;
    return this.api.patch<Revision>(`/revisions/${this.data.revision.id}`, { releaseOn });
  }
}
