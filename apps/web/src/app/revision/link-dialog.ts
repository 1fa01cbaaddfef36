import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { api, type Link } from '@tollgate/contracts';
import { ApiClient } from '../api/api-client';
import { FormFailure } from '../forms/form-failure';
import { formOf, requestOf } from '../forms/schema-validators';
import { Submission } from '../forms/submission';
import { TextField } from '../forms/text-field';

/** The link that is renamed; left out for a new one. */
export interface LinkDialogData {
  readonly revisionId: string;
  readonly link?: Link;
}

/** The name of a link, which groups the lanes between two ends. */
@Component({
  selector: 'tg-link-dialog',
  imports: [FormFailure, MatButton, MatDialogModule, ReactiveFormsModule, TextField],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <h2 mat-dialog-title>{{ data.link ? 'Rename the link' : 'New link' }}</h2>
    <form [formGroup]="form" (ngSubmit)="submit()" novalidate>
      <mat-dialog-content class="tg-form">
        <tg-text-field
          label="Name"
          hint="What it joins, such as Switch to mezzanine."
          [control]="form.controls.name"
        />
        <tg-form-failure [failure]="submission.failure()" />
      </mat-dialog-content>
      <mat-dialog-actions>
        <button matButton="outlined" type="button" mat-dialog-close>Cancel</button>
        <button matButton="filled" type="submit" [disabled]="submission.busy()">Save</button>
      </mat-dialog-actions>
    </form>
  `,
  styleUrl: '../forms/form-layout.scss',
})
export class LinkDialog {
  private readonly api = inject(ApiClient);
  private readonly ref = inject<MatDialogRef<LinkDialog, Link>>(MatDialogRef);
  protected readonly data = inject<LinkDialogData>(MAT_DIALOG_DATA);
  protected readonly form = formOf(api.linkCreate, { name: this.data.link?.name ?? '' });
  protected readonly submission = new Submission(this.form);

  dirty(): boolean {
    return this.form.dirty;
  }

  protected submit(): void {
    const { link, revisionId } = this.data;
    this.submission.send(
      () => {
        const body = requestOf(api.linkCreate, this.form);
        return link
          ? this.api.patch<Link>(`/links/${link.id}`, body)
          : this.api.post<Link>(`/revisions/${revisionId}/links`, body);
      },
      (saved) => this.ref.close(saved),
    );
  }
}
