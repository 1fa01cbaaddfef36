import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import type { Board, BoardSummary } from '@tollgate/contracts';
import { filter, map } from 'rxjs';
import { ApiClient } from '../api/api-client';
import { EventStream, pollEvent } from '../api/event-stream';
import { readAgain } from '../api/read-again';
import { Dialogs } from '../dialogs/dialogs';
import { routedDialogs } from '../dialogs/routed-dialogs';
import { StandingCounts } from '../marks/standing-counts';
import { paths } from '../paths';
import { SessionStore } from '../session/session-store';
import { Page } from '../shell/page';
import { Cell } from '../table/cell';
import type { Column } from '../table/column';
import { DataTable } from '../table/data-table';
import { BoardDialog, type BoardDialogData } from './board-dialog';
import { daysTo, daysWords } from './release';
import { ReleaseDate } from './release-date';
import { WorstMargin } from './worst-margin';

/** What is on the way to release: every board one is a member of, with where its latest revision stands. */
@Component({
  selector: 'tg-board-list',
  imports: [Cell, DataTable, MatButton, Page, ReleaseDate, RouterLink, StandingCounts, WorstMargin],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './board-list.html',
  styleUrl: './board-list.scss',
})
export class BoardList {
  private readonly api = inject(ApiClient);
  private readonly router = inject(Router);
  private readonly dialogs = inject(Dialogs);
  private readonly session = inject(SessionStore);

  protected readonly paths = paths;
  protected readonly mayCreate = computed(() => this.session.may('boards.create'));
  protected readonly boards = rxResource({
    stream: () =>
      this.api.get<{ items: BoardSummary[] }>('/boards').pipe(map(({ items }) => archivedLast(items))),
  });
  private readonly rows = computed(() => (this.boards.hasValue() ? this.boards.value() : []));
  protected readonly groupBy = computed(() =>
    this.rows().some((board) => board.archived) ? groupTitle : undefined,
  );
  protected readonly next = computed(() => nextRelease(this.rows(), new Date()));

  protected readonly columns = {
    name: { key: 'name', title: 'Board', width: '34%', sortBy: (board) => board.name },
    revision: { key: 'revision', title: 'Revision', width: '84px' },
    channels: {
      key: 'channels',
      title: 'Channels',
      width: '248px',
      sortBy: (board) => board.latest?.channels ?? null,
    },
    worst: { key: 'worst', title: 'Worst margin', sortBy: (board) => board.latest?.worst?.marginDb ?? null },
    release: {
      key: 'release',
      title: 'Release',
      width: '130px',
      sortBy: (board) => board.latest?.releaseOn ?? null,
    },
  } as const satisfies Record<string, Column<BoardSummary>>;
  protected readonly columnList = Object.values(this.columns);
  protected readonly rowKey = (board: BoardSummary) => board.id;
  protected readonly filterBy = (board: BoardSummary) => `${board.name} ${board.description}`;

  constructor() {
    const events = inject(EventStream).events;
    readAgain(
      events.pipe(filter((event) => event.what === pollEvent || event.boardId !== null)),
      this.boards,
    );
    routedDialogs({ 'new-board': () => this.openNew() });
  }

  private openNew() {
    const ref = this.dialogs.open<BoardDialog, BoardDialogData, Board>(BoardDialog, {});
    ref.afterClosed().subscribe((board) => {
      if (board) void this.router.navigateByUrl(paths.board(board.id));
    });
    return ref;
  }
}

function archivedLast(boards: readonly BoardSummary[]): readonly BoardSummary[] {
  return [...boards].sort((a, b) => Number(a.archived) - Number(b.archived));
}

function groupTitle(board: BoardSummary): string {
  return board.archived ? 'Archived' : 'On the way to release';
}

function nextRelease(boards: readonly BoardSummary[], now: Date): string {
  const coming = boards
    .flatMap((board) =>
      board.archived || !board.latest?.releaseOn ? [] : [{ board, on: board.latest.releaseOn }],
    )
    .filter(({ on }) => daysTo(on, now) >= 0)
    .sort((a, b) => a.on.localeCompare(b.on))[0];
  if (!coming) return '';
  const { board, on } = coming;
  return `Next release: ${board.name}, revision ${board.latest?.letter ?? ''}, ${daysWords(daysTo(on, now))}.`;
}
