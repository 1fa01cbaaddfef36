import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { api, type CompleteStackup, type StackupVersion } from '@tollgate/contracts';
import { catchError, of, throwError } from 'rxjs';
import { ApiClient } from '../../api/api-client';
import { apiProblemOf } from '../../api/api-problem';
import { ChoiceField } from '../../forms/choice-field';
import { FormFailure } from '../../forms/form-failure';
import { formOf, requestOf } from '../../forms/schema-validators';
import { Submission } from '../../forms/submission';
import { TextField } from '../../forms/text-field';

export interface SaveDialogData {
  readonly revisionId: string;
  /** The version it is saved over; 0 for none. */
  readonly seen: number;
  readonly kind: StackupVersion['kind'];
  readonly stackup: CompleteStackup;
  /** What is changed, a sentence each. */
  readonly changes: readonly string[];
}

/** The version as it was stored, or one that someone else saved in the meantime. */
export type SaveOutcome = { readonly saved: StackupVersion } | { readonly overtaken: StackupVersion };

/** What a person answers; the document comes from the screen. */
const answers = api.stackupCreate.omit({ document: true });

/** Saves the next version: what it speaks of, and why it is made. */
@Component({
  selector: 'tg-save-dialog',
  imports: [ChoiceField, FormFailure, MatButton, MatDialogModule, ReactiveFormsModule, TextField],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <h2 mat-dialog-title>Save as version {{ data.seen + 1 }}</h2>
    <form [formGroup]="form" (ngSubmit)="submit()" novalidate>
      <mat-dialog-content class="tg-form">
        <tg-choice-field label="Kind" [choices]="kinds" [control]="form.controls.kind" />
        <tg-text-field
          label="Why"
          hint="For those who come after: what changed, and on whose word."
          [rows]="3"
          [control]="form.controls.why"
        />
        @if (data.changes.length) {
          <div>
            <p class="note">Against version {{ data.seen }}:</p>
            <ul class="changes">
              @for (change of data.changes.slice(0, 8); track $index) {
                <li>{{ change }}</li>
              }
              @if (data.changes.length > 8) {
                <li>and {{ data.changes.length - 8 }} more</li>
              }
            </ul>
          </div>
        }
        <p class="note">
          A version is never changed. The checks of the revision's drafts go out of date with it; what was
          submitted stays as it was.
        </p>
        <tg-form-failure [failure]="submission.failure()" />
      </mat-dialog-content>
      <mat-dialog-actions>
        <button matButton="outlined" type="button" mat-dialog-close>Cancel</button>
        <button matButton="filled" type="submit" [disabled]="submission.busy()">Save the version</button>
      </mat-dialog-actions>
    </form>
  `,
  styleUrls: ['../../forms/form-layout.scss', './dialogs.scss'],
})
export class SaveDialog {
  private readonly api = inject(ApiClient);
  private readonly ref = inject<MatDialogRef<SaveDialog, SaveOutcome>>(MatDialogRef);
  protected readonly data = inject<SaveDialogData>(MAT_DIALOG_DATA);
  protected readonly kinds = api.stackupKinds.map((value) => ({
    value,
    title: api.stackupKindTitles[value],
  }));
  protected readonly form = formOf(answers, { kind: this.data.kind, why: '' });
  protected readonly submission = new Submission(this.form);

  dirty(): boolean {
    return this.form.dirty;
  }

  protected submit(): void {
    const { revisionId, seen, stackup } = this.data;
    this.submission.send(
      () => {
        const body = { ...requestOf(answers, this.form), document: stackup };
        return this.api.post<StackupVersion>(`/revisions/${revisionId}/stackups`, body, seen).pipe(
          catchError((error: unknown) => {
            const { status, problem } = apiProblemOf(error);
            const current = problem.current as StackupVersion | null | undefined;
            return status === 412 && current ? of({ overtaken: current }) : throwError(() => error);
          }),
        );
      },
      (reply) => this.ref.close('overtaken' in reply ? reply : { saved: reply }),
    );
  }
}
