import { ChangeDetectionStrategy, Component, computed, effect, inject, input } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import type { Board as BoardReply, Revision } from '@tollgate/contracts';
import { ApiClient } from '../api/api-client';
import { EventStream } from '../api/event-stream';
import { readAgain } from '../api/read-again';
import { Confirmation, type ConfirmationData } from '../dialogs/confirmation';
import { Dialogs } from '../dialogs/dialogs';
import { routedDialogs } from '../dialogs/routed-dialogs';
import { paths } from '../paths';
import { Page } from '../shell/page';
import { PageTitle } from '../shell/page-title';
import type { Step } from '../shell/trail';
import { Failure } from '../states/failure';
import { Loading } from '../states/loading';
import { Toasts } from '../states/toasts';
import { BoardDialog, type BoardDialogData } from './board-dialog';
import { BoardMembers } from './board-members';
import { BoardRevisions } from './board-revisions';
import { MemberDialog, type MemberDialogData } from './member-dialog';
import { RevisionDialog, type RevisionDialogData } from './revision-dialog';

/** One board: its revisions, newest first, and its members. */
@Component({
  selector: 'tg-board',
  imports: [BoardMembers, BoardRevisions, Failure, Loading, MatButton, Page, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './board.html',
  styleUrl: './board.scss',
})
export class Board {
  private readonly api = inject(ApiClient);
  private readonly dialogs = inject(Dialogs);
  private readonly toasts = inject(Toasts);

  /** From the address. */
  readonly boardId = input.required<string>();

  protected readonly trail: readonly Step[] = [{ name: 'Boards', link: paths.boards }];
  protected readonly source = rxResource({
    params: () => this.boardId(),
    stream: ({ params }) => this.api.get<BoardReply>(`/boards/${params}`),
  });
  protected readonly board = computed(() => (this.source.hasValue() ? this.source.value() : undefined));

  /** Newest first. */
  protected readonly revisions = computed(() => [...(this.board()?.revisions ?? [])].reverse());

  constructor() {
    const title = inject(PageTitle);
    effect(() => {
      const board = this.board();
      if (board) title.set(board.name);
    });
    readAgain(
      inject(EventStream).about(() => ({ boardId: this.boardId() })),
      this.source,
    );
    routedDialogs({
      'edit-board': () => this.openEdit(),
      'archive-board': () => this.openArchive(),
      'new-revision': () => this.openNewRevision(),
      'edit-revision': (id) => this.openRevision(id),
      'add-member': () => this.openAddMember(),
      'remove-member': (id) => this.openRemoveMember(id),
    });
  }

  private openEdit() {
    const board = this.board();
    if (!board?.can.change) return undefined;
    const ref = this.dialogs.open<BoardDialog, BoardDialogData, BoardReply>(BoardDialog, { board });
    ref.afterClosed().subscribe((saved) => this.source.set(saved ?? this.board()));
    return ref;
  }

  private openArchive() {
    const board = this.board();
    if (!board?.can.change) return undefined;
    const archived = !board.archived;
    return this.confirm({
      heading: archived ? `Archive ${board.name}?` : `Bring ${board.name} back?`,
      text: archived
        ? 'It moves to the end of the list and can be brought back. Nothing of it is lost.'
        : 'It stands among the boards on the way to release again.',
      action: archived ? 'Archive the board' : 'Bring it back',
      run: () => this.api.patch(`/boards/${board.id}`, { archived }),
    });
  }

  private openNewRevision() {
    const board = this.board();
    if (!board?.can.createRevision) return undefined;
    return this.openRevisionDialog({ boardId: board.id, copies: this.revisions() });
  }

  private openRevision(id: string) {
    const revision = this.board()?.revisions.find((each) => each.id === id);
    return revision && this.board()?.can.change ? this.openRevisionDialog({ revision }) : undefined;
  }

  private openRevisionDialog(data: RevisionDialogData) {
    const ref = this.dialogs.open<RevisionDialog, RevisionDialogData, Revision>(RevisionDialog, data);
    ref.afterClosed().subscribe((saved) => {
      if (!saved) return;
      this.toasts.done(`Revision ${saved.letter} is saved.`);
      this.source.reload();
    });
    return ref;
  }

  private openAddMember() {
    const board = this.board();
    if (!board?.can.manageMembers) return undefined;
    const memberIds = board.members.map((member) => member.personId);
    const ref = this.dialogs.open<MemberDialog, MemberDialogData, boolean>(MemberDialog, {
      boardId: board.id,
      memberIds,
    });
    ref.afterClosed().subscribe((added) => added && this.source.reload());
    return ref;
  }

  private openRemoveMember(personId: string) {
    const board = this.board();
    const member = board?.members.find((each) => each.personId === personId);
    if (!board?.can.manageMembers || !member) return undefined;
    return this.confirm({
      heading: `Remove ${member.name} from this board?`,
      text: 'The board closes to them at once. What they did on it stays in the record, and they can be added again.',
      action: 'Remove the member',
      run: () => this.api.delete(`/boards/${board.id}/members/${personId}`),
    });
  }

  private confirm(data: ConfirmationData) {
    const ref = this.dialogs.open<Confirmation, ConfirmationData, boolean>(Confirmation, data);
    ref.afterClosed().subscribe((done) => done && this.source.reload());
    return ref;
  }
}
