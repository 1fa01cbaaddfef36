import { DatePipe } from '@angular/common';
import { ChangeDetectionStrategy, Component, computed, effect, inject, input } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import type { Channel, ChannelSummary, Link, Revision } from '@tollgate/contracts';
import { formatDb, formatQuantity } from '@tollgate/quantities';
import { map } from 'rxjs';
import { ApiClient } from '../api/api-client';
import { EventStream } from '../api/event-stream';
import { readAgain } from '../api/read-again';
import { ReleaseDate } from '../boards/release-date';
import { Confirmation, type ConfirmationData } from '../dialogs/confirmation';
import { Dialogs } from '../dialogs/dialogs';
import { routedDialogs } from '../dialogs/routed-dialogs';
import { Verdict } from '../marks/verdict';
import { paths } from '../paths';
import { Page } from '../shell/page';
import { PageTitle } from '../shell/page-title';
import type { Step } from '../shell/trail';
import { Failure } from '../states/failure';
import { Loading } from '../states/loading';
import { Toasts } from '../states/toasts';
import { Cell } from '../table/cell';
import type { Column } from '../table/column';
import { DataTable } from '../table/data-table';
import { ChannelDialog, type ChannelDialogData } from './channel-dialog';
import { ImportChannel } from './import-channel';
import { LinkDialog, type LinkDialogData } from './link-dialog';
import { MoveDialog, type MoveDialogData } from './move-dialog';

const signalingWords = { differential: 'pair', 'single-ended': 'single-ended' } as const;

/** A board's revision: its channels by link, each with its verdict. */
@Component({
  selector: 'tg-revision',
  imports: [
    Cell,
    DataTable,
    DatePipe,
    Failure,
    ImportChannel,
    Loading,
    MatButton,
    Page,
    ReleaseDate,
    RouterLink,
    Verdict,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './revision.html',
  styleUrl: './revision.scss',
})
export class RevisionPage {
  private readonly api = inject(ApiClient);
  private readonly dialogs = inject(Dialogs);
  private readonly router = inject(Router);
  private readonly toasts = inject(Toasts);

  /** From the address. */
  readonly revisionId = input.required<string>();

  protected readonly paths = paths;
  protected readonly formatDb = formatDb;
  protected readonly source = rxResource({
    params: () => this.revisionId(),
    stream: ({ params }) => this.api.get<Revision>(`/revisions/${params}`),
  });
  protected readonly revision = computed(() => (this.source.hasValue() ? this.source.value() : undefined));
  protected readonly channels = rxResource({
    params: () => this.revision(),
    stream: ({ params }) =>
      this.api
        .get<{ items: ChannelSummary[] }>(`/revisions/${params.id}/channels`)
        .pipe(map(({ items }) => byLink(items, params.links))),
  });

  protected readonly trail = computed((): Step[] => {
    const revision = this.revision();
    const board = revision ? [{ name: revision.boardName, link: paths.board(revision.boardId) }] : [];
    return [{ name: 'Boards', link: paths.boards }, ...board];
  });
  protected readonly heading = computed(() => `Revision ${this.revision()?.letter ?? ''}`);
  protected readonly others = computed(() =>
    (this.revision()?.siblings ?? []).filter((each) => each.id !== this.revisionId()),
  );
  protected readonly openLinks = computed(() =>
    (this.revision()?.links ?? []).filter((link) => !link.archived),
  );

  protected readonly columns = {
    verdict: { key: 'verdict', title: 'Verdict', width: '210px', sortBy: (row) => row.verdict },
    name: { key: 'name', title: 'Channel', width: '30%', sortBy: (row) => row.name },
    margin: { key: 'margin', title: 'Worst margin', sortBy: (row) => row.worstMarginDb },
    standing: {
      key: 'standing',
      title: 'Weakest model',
      width: '120px',
      sortBy: (row) => row.weakestStanding,
      text: (row) => row.weakestStanding ?? 'none',
    },
    changed: { key: 'changed', title: 'Changed', width: '150px', sortBy: (row) => row.changedAt },
    more: { key: 'more', title: 'Actions', hiddenTitle: true, width: '120px', align: 'end' },
  } as const satisfies Record<string, Column<ChannelSummary>>;
  protected readonly columnList = Object.values(this.columns);
  protected readonly rowKey = (row: ChannelSummary) => row.id;
  protected readonly filterBy = (row: ChannelSummary) =>
    [row.name, row.verdict, row.worstLimitTitle ?? '', row.weakestStanding ?? '', this.linkName(row)].join(
      ' ',
    );
  protected readonly linkName = (row: ChannelSummary) => {
    if (row.archived) return 'Archived';
    return this.revision()?.links.find((link) => link.id === row.linkId)?.name ?? 'Without a link';
  };

  constructor() {
    const title = inject(PageTitle);
    effect(() => {
      const revision = this.revision();
      if (revision) title.set(`${revision.boardName}, revision ${revision.letter}`);
    });
    readAgain(
      inject(EventStream).about(() => ({ revisionId: this.revisionId() })),
      this.source,
      this.channels,
    );
    routedDialogs({
      'new-channel': () => this.openNewChannel(),
      'new-link': () => this.openLink(),
      'edit-link': (id) => this.openLink(id),
      'move-channel': (id) => this.openMove(id),
      'archive-channel': (id) => this.openArchive(id),
    });
  }

  protected marginWords(row: ChannelSummary): string {
    const at =
      row.worstFrequencyHz === null
        ? ''
        : ` at ${formatQuantity(row.worstFrequencyHz, 'frequency', { digits: 4 })}`;
    return `${row.worstLimitTitle ?? ''}${at}`;
  }

  protected signaling(row: ChannelSummary): string {
    return signalingWords[row.signaling];
  }

  protected imported(channel: Channel): void {
    this.toasts.done(`${channel.name} is imported.`);
    void this.router.navigateByUrl(paths.channel(channel.id));
  }

  private openNewChannel() {
    const revision = this.revision();
    if (!revision?.can.createChannels) return undefined;
    const ref = this.dialogs.open<ChannelDialog, ChannelDialogData, Channel>(ChannelDialog, { revision });
    ref.afterClosed().subscribe((made) => {
      if (made) void this.router.navigateByUrl(paths.channel(made.id));
    });
    return ref;
  }

  private openLink(id?: string) {
    const revision = this.revision();
    const link = revision?.links.find((each) => each.id === id);
    if (!revision?.can.changeLinks || (id && !link)) return undefined;
    const ref = this.dialogs.open<LinkDialog, LinkDialogData, Link>(LinkDialog, {
      revisionId: revision.id,
      link,
    });
    ref.afterClosed().subscribe((saved) => saved && this.source.reload());
    return ref;
  }

  private openMove(id: string) {
    const channel = this.channelOf(id);
    const links = this.revision()?.links;
    if (!channel || !links || !this.revision()?.can.createChannels) return undefined;
    const ref = this.dialogs.open<MoveDialog, MoveDialogData, boolean>(MoveDialog, { channel, links });
    ref.afterClosed().subscribe((moved) => moved && this.channels.reload());
    return ref;
  }

  private openArchive(id: string) {
    const channel = this.channelOf(id);
    if (!channel || !this.revision()?.can.createChannels) return undefined;
    const archived = !channel.archived;
    const ref = this.dialogs.open<Confirmation, ConfirmationData, boolean>(Confirmation, {
      heading: archived ? `Archive ${channel.name}?` : `Bring ${channel.name} back?`,
      text: archived
        ? 'It no longer counts among the channels of the revision. Nothing of it is lost, and it can be brought back.'
        : 'It counts among the channels of the revision again.',
      action: archived ? 'Archive the channel' : 'Bring it back',
      run: () => this.api.patch(`/channels/${channel.id}`, { archived }),
    });
    ref.afterClosed().subscribe((done) => done && this.channels.reload());
    return ref;
  }

  private channelOf(id: string): ChannelSummary | undefined {
    return this.channels.hasValue() ? this.channels.value()?.find((each) => each.id === id) : undefined;
  }
}

/** In the order of the links, those without one next, archived ones last. */
function byLink(items: readonly ChannelSummary[], links: readonly Link[]): readonly ChannelSummary[] {
  const place = (row: ChannelSummary) => {
    if (row.archived) return links.length + 1;
    const at = links.findIndex((link) => link.id === row.linkId);
    return at < 0 ? links.length : at;
  };
  return [...items].sort((a, b) => place(a) - place(b));
}
