import { ChangeDetectionStrategy, Component, inject, input, output, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatDialog } from '@angular/material/dialog';
import { bounds, type Channel } from '@tollgate/contracts';
import { ApiClient } from '../api/api-client';
import { apiProblemOf } from '../api/api-problem';
import { ImportProblems, type ImportProblemsData } from './import-problems';

/** Takes a channel file (.json), or one zipped with its Touchstone parts (.zip); all or nothing. */
@Component({
  selector: 'tg-import-channel',
  imports: [MatButton],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <button matButton="outlined" type="button" [disabled]="busy()" (click)="file.click()">
      {{ busy() ? 'Importing' : 'Import' }}
    </button>
    <input
      #file
      class="tg-visually-hidden"
      type="file"
      accept=".json,.zip,application/json,application/zip"
      tabindex="-1"
      aria-label="Channel file to import"
      (change)="take(file)"
    />
  `,
})
export class ImportChannel {
  private readonly api = inject(ApiClient);
  private readonly dialog = inject(MatDialog);

  readonly revisionId = input.required<string>();
  readonly imported = output<Channel>();

  protected readonly busy = signal(false);

  protected take(picker: HTMLInputElement): void {
    const file = picker.files?.[0];
    // The same file may be chosen again once it is mended.
    picker.value = '';
    if (!file) return;
    if (file.size > bounds.uploadBytes) {
      this.tell(file.name, 'The file is larger than 64 MB.', []);
      return;
    }
    this.busy.set(true);
    const type = file.name.toLowerCase().endsWith('.zip') ? 'application/zip' : 'application/json';
    this.api.upload<Channel>(`/revisions/${this.revisionId()}/import`, file, type).subscribe({
      next: (channel) => {
        this.busy.set(false);
        this.imported.emit(channel);
      },
      error: (error: unknown) => {
        this.busy.set(false);
        const { problem } = apiProblemOf(error);
        this.tell(file.name, problem.detail, problem.fields);
      },
    });
  }

  private tell(fileName: string, detail: string, fields: ImportProblemsData['fields']): void {
    this.dialog.open<ImportProblems, ImportProblemsData>(ImportProblems, {
      data: { fileName, detail, fields },
    });
  }
}
