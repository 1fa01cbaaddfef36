import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { FormControl, FormGroup, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import type { ChannelSummary, Link } from '@tollgate/contracts';
import { ApiClient } from '../api/api-client';
import { ChoiceField } from '../forms/choice-field';
import { FormFailure } from '../forms/form-failure';
import { Submission } from '../forms/submission';

export interface MoveDialogData {
  readonly channel: Pick<ChannelSummary, 'id' | 'name' | 'linkId'>;
  readonly links: readonly Link[];
}

/** Which link a channel belongs to. */
@Component({
  selector: 'tg-move-dialog',
  imports: [ChoiceField, FormFailure, MatButton, MatDialogModule, ReactiveFormsModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <h2 mat-dialog-title>Link of {{ data.channel.name }}</h2>
    <form [formGroup]="form" (ngSubmit)="submit()" novalidate>
      <mat-dialog-content class="tg-form">
        <tg-choice-field label="Link" none="No link" [choices]="choices" [control]="form.controls.linkId" />
        <tg-form-failure [failure]="submission.failure()" />
      </mat-dialog-content>
      <mat-dialog-actions>
        <button matButton="outlined" type="button" mat-dialog-close>Cancel</button>
        <button matButton="filled" type="submit" [disabled]="submission.busy()">Move</button>
      </mat-dialog-actions>
    </form>
  `,
  styleUrl: '../forms/form-layout.scss',
})
export class MoveDialog {
  private readonly api = inject(ApiClient);
  private readonly ref = inject<MatDialogRef<MoveDialog, boolean>>(MatDialogRef);
  protected readonly data = inject<MoveDialogData>(MAT_DIALOG_DATA);
  protected readonly choices = this.data.links
    .filter((link) => !link.archived)
    .map(({ id, name }) => ({ value: id, title: name }));
  protected readonly form = new FormGroup({
    linkId: new FormControl(this.data.channel.linkId ?? '', { nonNullable: true }),
  });
  protected readonly submission = new Submission(this.form);

  dirty(): boolean {
    return this.form.dirty;
  }

  protected submit(): void {
    const linkId = this.form.controls.linkId.value || null;
    this.submission.send(
      () => this.api.patch(`/channels/${this.data.channel.id}`, { linkId }),
      () => this.ref.close(true),
    );
  }
}
