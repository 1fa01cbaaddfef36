import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { RevisionSummary } from '@tollgate/contracts';
import { StandingCounts } from '../marks/standing-counts';
import { paths } from '../paths';
import { Cell } from '../table/cell';
import type { Column } from '../table/column';
import { DataTable } from '../table/data-table';
import { ReleaseDate } from './release-date';
import { WorstMargin } from './worst-margin';

/** The revisions of a board, with where their channels stand. */
@Component({
  selector: 'tg-board-revisions',
  imports: [Cell, DataTable, ReleaseDate, RouterLink, StandingCounts, WorstMargin],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './board-revisions.html',
  styleUrl: './board-list.scss',
})
export class BoardRevisions {
  /** Newest first. */
  readonly revisions = input.required<readonly RevisionSummary[]>();
  readonly mayEdit = input.required<boolean>();

  protected readonly paths = paths;
  protected readonly columns = {
    letter: { key: 'letter', title: 'Revision', width: '34%', sortBy: (revision) => revision.letter },
    channels: { key: 'channels', title: 'Channels', width: '248px', sortBy: (revision) => revision.channels },
    worst: {
      key: 'worst',
      title: 'Worst margin',
      sortBy: (revision) => revision.worst?.marginDb ?? null,
    },
    release: { key: 'release', title: 'Release', width: '130px', sortBy: (revision) => revision.releaseOn },
    change: { key: 'change', title: 'Change', hiddenTitle: true, width: '80px', align: 'end' },
  } as const satisfies Record<string, Column<RevisionSummary>>;
  protected readonly columnList = Object.values(this.columns);
  protected readonly rowKey = (revision: RevisionSummary) => revision.id;

  protected note(revision: RevisionSummary): string {
    const channels = `${revision.channels} ${revision.channels === 1 ? 'channel' : 'channels'}`;
    return revision.archived ? `${channels}, archived` : channels;
  }
}
