import { DatePipe } from '@angular/common';
import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { api, type StackupVersion, type StackupVersionSummary } from '@tollgate/contracts';
import { formatQuantity } from '@tollgate/quantities';
import { ApiClient } from '../../api/api-client';
import { apiProblemOf } from '../../api/api-problem';
import { Toasts } from '../../states/toasts';
import { Cell } from '../../table/cell';
import type { Column } from '../../table/column';
import { DataTable } from '../../table/data-table';
import { differencesOf } from '../document/differences';
import { StackupStore } from '../document/stackup-store';

/** The versions of the stackup, newest first: who made which and why, what differs from one, and its layers taken up again. */
@Component({
  selector: 'tg-stackup-versions',
  imports: [Cell, DataTable, DatePipe],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './versions.html',
  styleUrl: './versions.scss',
})
export class Versions {
  private readonly api = inject(ApiClient);
  private readonly toasts = inject(Toasts);
  protected readonly store = inject(StackupStore);

  protected readonly kindTitles = api.stackupKindTitles;
  protected readonly rows = computed(() => this.store.versions()?.items ?? []);
  protected readonly columns = {
    number: { key: 'number', title: 'Version', width: '80px', text: (row) => String(row.number) },
    kind: { key: 'kind', title: 'Kind', width: '170px', text: (row) => api.stackupKindTitles[row.kind] },
    why: { key: 'why', title: 'Why', text: (row) => row.why },
    size: { key: 'size', title: 'Size', width: '160px', text: (row) => sizeOf(row) },
    made: { key: 'made', title: 'Saved', width: '170px' },
    more: { key: 'more', title: 'Actions', hiddenTitle: true, width: '170px', align: 'end' },
  } as const satisfies Record<string, Column<StackupVersionSummary>>;
  protected readonly columnList = Object.values(this.columns);
  protected readonly rowKey = (row: StackupVersionSummary) => row.id;

  /** What differs between a version and what is on the screen. */
  private readonly compared = signal<StackupVersion | undefined>(undefined);
  protected readonly comparison = computed(() => {
    const version = this.compared();
    const stackup = this.store.stackup();
    if (!version || !stackup) return undefined;
    return { number: version.number, changes: differencesOf(version.document, stackup) };
  });

  protected compare(row: StackupVersionSummary): void {
    this.read(row, (version) => this.compared.set(version));
  }

  protected close(): void {
    this.compared.set(undefined);
  }

  protected takeUp(row: StackupVersionSummary): void {
    this.read(row, (version) => {
      this.store.put(version.document);
      this.toasts.done(
        `The layers of version ${version.number} are on the desk; save them as the next version to keep them.`,
      );
    });
  }

  private read(row: StackupVersionSummary, then: (version: StackupVersion) => void): void {
    this.api.get<StackupVersion>(`/stackups/${row.id}`).subscribe({
      next: then,
      error: (error: unknown) => this.toasts.failure(apiProblemOf(error).message),
    });
  }
}

function sizeOf({ copperLayers, thicknessM }: StackupVersionSummary): string {
  return `${copperLayers} copper, ${formatQuantity(thicknessM, 'length', { unit: 'mm', digits: 4 })}`;
}
