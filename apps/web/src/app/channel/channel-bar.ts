import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { formatDb, formatQuantity } from '@tollgate/quantities';
import { ApiClient, downloadName } from '../api/api-client';
import { Glyph } from '../marks/glyph';
import { Verdict } from '../marks/verdict';
import { paths } from '../paths';
import type { Step } from '../shell/trail';
import { ChannelStore } from './document/channel-store';
import { CheckRunner } from './document/check-runner';
import { ChannelSaving } from './saving/channel-saving';

/** The top bar of a channel: where it is, its name, its verdict, whether it is saved, and the way back. */
@Component({
  selector: 'tg-channel-bar',
  imports: [Glyph, MatButton, RouterLink, Verdict],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './channel-bar.html',
  styleUrl: './channel-bar.scss',
})
export class ChannelBar {
  private readonly api = inject(ApiClient);
  protected readonly check = inject(CheckRunner);
  protected readonly saving = inject(ChannelSaving);
  protected readonly store = inject(ChannelStore);

  protected readonly trail = computed<readonly Step[]>(() => {
    const channel = this.store.channel();
    if (!channel) return [];
    return [
      { name: channel.boardName, link: paths.board(channel.boardId) },
      { name: `revision ${channel.revisionLetter}`, link: paths.revision(channel.revisionId) },
    ];
  });
  protected readonly name = computed(() => this.store.document()?.name ?? '');
  protected readonly worst = computed(() =>
    this.check.view()?.limits.find((limit) => limit.id === this.check.view()?.worstLimitId),
  );
  protected readonly margin = computed(() => {
    const view = this.check.view();
    if (!view || view.worstMarginDb === null || view.worstFrequencyHz === null) return '';
    const left = view.worstMarginDb < 0 ? 'over' : 'left';
    const at = formatQuantity(view.worstFrequencyHz, 'frequency', { digits: 3 });
    return `${formatDb(Math.abs(view.worstMarginDb))} ${left} at ${at}`;
  });
  protected readonly saved = computed(() => {
    switch (this.saving.state()) {
      case 'saving':
        return 'Saving';
      case 'changed':
        return 'Not saved yet';
      case 'away':
        return 'Not saved: server away, draft kept';
      case 'refused':
        return 'Not saved: needs mending';
      case 'saved':
        return `Saved ${clock(this.store.channel()?.changedAt)}`;
    }
  });

  protected rename(event: Event): void {
    const name = (event.target as HTMLInputElement).value.trim();
    if (name) this.store.edit((document) => ({ ...document, name }), 'name');
    else (event.target as HTMLInputElement).value = this.name();
  }

  protected download(): void {
    const channel = this.store.channel();
    if (!channel) return;
    this.api.download(`/channels/${channel.id}/export`).subscribe(({ body, headers }) => {
      if (!body) return;
      const link = document.createElement('a');
      link.href = URL.createObjectURL(body);
      link.download = downloadName(headers, 'channel.json');
      link.click();
      setTimeout(() => URL.revokeObjectURL(link.href), 1000);
    });
  }
}

function clock(instant: string | undefined): string {
  return instant === undefined
    ? ''
    : new Date(instant).toLocaleTimeString('en-GB', { hour: '2-digit', minute: '2-digit' });
}
