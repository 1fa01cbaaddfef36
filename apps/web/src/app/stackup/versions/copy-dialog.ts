import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { FormGroup } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { api, type StackupSource, type StackupVersion } from '@tollgate/contracts';
import { formatQuantity } from '@tollgate/quantities';
import { catchError, map, of, throwError } from 'rxjs';
import { ApiClient } from '../../api/api-client';
import { apiProblemOf } from '../../api/api-problem';
import { FormFailure } from '../../forms/form-failure';
import { Submission } from '../../forms/submission';
import { Failure } from '../../states/failure';
import { Loading } from '../../states/loading';
import type { SaveOutcome } from './save-dialog';

export interface CopyDialogData {
  readonly revisionId: string;
  readonly seen: number;
}

/** The newest stackup of another revision becomes the next version of this one. */
@Component({
  selector: 'tg-copy-dialog',
  imports: [Failure, FormFailure, Loading, MatButton, MatDialogModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <h2 mat-dialog-title>Copy a stackup</h2>
    <mat-dialog-content>
      @if (source.error(); as error) {
        <tg-failure [error]="error" (retry)="source.reload()" />
      } @else if (!source.hasValue()) {
        <tg-loading label="Reading the stackups of your boards" />
      } @else if (choices().length === 0) {
        <p>No other revision of your boards has a stackup yet.</p>
      } @else {
        <fieldset class="sources">
          <legend class="tg-visually-hidden">Stackup to copy</legend>
          @for (each of choices(); track each.id) {
            <label class="source">
              <input
                type="radio"
                name="source"
                [checked]="each.id === chosen()"
                (change)="chosen.set(each.id)"
              />
              <strong>{{ each.title }}</strong>
              <span>{{ each.detail }}</span>
            </label>
          }
        </fieldset>
      }
      <tg-form-failure [failure]="submission.failure()" />
    </mat-dialog-content>
    <mat-dialog-actions>
      <button matButton="outlined" type="button" mat-dialog-close>Cancel</button>
      <button matButton="filled" type="button" [disabled]="!chosen() || submission.busy()" (click)="copy()">
        Copy as version {{ data.seen + 1 }}
      </button>
    </mat-dialog-actions>
  `,
  styleUrl: './dialogs.scss',
})
export class CopyDialog {
  private readonly api = inject(ApiClient);
  private readonly ref = inject<MatDialogRef<CopyDialog, SaveOutcome>>(MatDialogRef);
  protected readonly data = inject<CopyDialogData>(MAT_DIALOG_DATA);
  protected readonly submission = new Submission(new FormGroup({}));
  protected readonly chosen = signal('');
  protected readonly source = rxResource({
    stream: () => this.api.get<{ items: StackupSource[] }>('/stackups').pipe(map(({ items }) => items)),
  });
  protected readonly choices = computed(() =>
    (this.source.hasValue() ? this.source.value() : [])
      .filter(({ revisionId }) => revisionId !== this.data.revisionId)
      .map(({ boardName, revisionLetter, version }) => ({
        id: version.id,
        title: `${boardName}, revision ${revisionLetter}`,
        detail: `${api.stackupKindTitles[version.kind]}, version ${version.number}: ${version.copperLayers} copper layers, ${formatQuantity(version.thicknessM, 'length', { unit: 'mm', digits: 4 })}. ${version.why}`,
      })),
  );

  protected copy(): void {
    const { revisionId, seen } = this.data;
    this.submission.send(
      () =>
        this.api
          .post<StackupVersion>(
            `/revisions/${revisionId}/stackups/copy`,
            { fromVersionId: this.chosen() },
            seen,
          )
          .pipe(
            catchError((error: unknown) => {
              const { status, problem } = apiProblemOf(error);
              const current = problem.current as StackupVersion | null | undefined;
              return status === 412 && current ? of({ overtaken: current }) : throwError(() => error);
            }),
          ),
      (reply) => this.ref.close('overtaken' in reply ? reply : { saved: reply }),
    );
  }
}
