import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { FormGroup } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import type { Observable } from 'rxjs';
import { FormFailure } from '../forms/form-failure';
import { Submission } from '../forms/submission';

export interface ConfirmationData {
  readonly heading: string;
  /** What will happen, and what will not be lost. */
  readonly text: string;
  /** The verb on the button. */
  readonly action: string;
  readonly run: () => Observable<unknown>;
}

/** Asks before something that others will notice; does it itself, and closes with true once it is done. */
@Component({
  selector: 'tg-confirmation',
  imports: [FormFailure, MatButton, MatDialogModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <h2 mat-dialog-title>{{ data.heading }}</h2>
    <mat-dialog-content>
      <p>{{ data.text }}</p>
      <tg-form-failure [failure]="submission.failure()" />
    </mat-dialog-content>
    <mat-dialog-actions>
      <button matButton="outlined" type="button" mat-dialog-close>Cancel</button>
      <button matButton="filled" type="button" [disabled]="submission.busy()" (click)="confirm()">
        {{ data.action }}
      </button>
    </mat-dialog-actions>
  `,
  styles: `
    tg-form-failure:not(:empty) {
      margin-top: var(--tg-space-3);
    }
  `,
})
export class Confirmation {
  private readonly ref = inject<MatDialogRef<Confirmation, boolean>>(MatDialogRef);
  protected readonly data = inject<ConfirmationData>(MAT_DIALOG_DATA);
  protected readonly submission = new Submission(new FormGroup({}));

  protected confirm(): void {
    this.submission.send(this.data.run, () => this.ref.close(true));
  }
}
