import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule } from '@angular/material/dialog';
import type { FieldProblem } from '@tollgate/contracts';

export interface ImportProblemsData {
  readonly fileName: string;
  readonly detail: string;
  readonly fields: readonly FieldProblem[];
}

/** Why a file was not imported: where in it, what, and how to mend it. */
@Component({
  selector: 'tg-import-problems',
  imports: [MatButton, MatDialogModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <h2 mat-dialog-title>{{ data.fileName }} was not imported</h2>
    <mat-dialog-content>
      <p>{{ data.detail }} Nothing of it was kept.</p>
      @if (data.fields.length) {
        <ul>
          @for (field of data.fields; track $index) {
            <li>
              @if (field.path) {
                <code>{{ field.path }}</code>
              }
              {{ field.message }} {{ field.mend }}
            </li>
          }
        </ul>
      }
    </mat-dialog-content>
    <mat-dialog-actions><button matButton="filled" mat-dialog-close>Close</button></mat-dialog-actions>
  `,
  styles: `
    ul {
      padding-left: var(--tg-space-4);
      overflow-wrap: anywhere;
    }
    code {
      color: var(--tg-copper);
    }
  `,
})
export class ImportProblems {
  protected readonly data = inject<ImportProblemsData>(MAT_DIALOG_DATA);
}
