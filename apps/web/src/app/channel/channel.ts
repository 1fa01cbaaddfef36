import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  ElementRef,
  inject,
  input,
  untracked,
} from '@angular/core';
import { rxResource, takeUntilDestroyed, toSignal } from '@angular/core/rxjs-interop';
import { ActivatedRoute, Router, RouterLink } from '@angular/router';
import type { Channel } from '@tollgate/contracts';
import { filter, switchMap } from 'rxjs';
import { ApiClient } from '../api/api-client';
import { EventStream } from '../api/event-stream';
import { Bar } from '../shell/bar-content';
import { Page } from '../shell/page';
import { PageTitle } from '../shell/page-title';
import { Failure } from '../states/failure';
import { Loading } from '../states/loading';
import { ChannelBar } from './channel-bar';
import { ChannelFoot } from './channel-foot';
import { ChannelStore } from './document/channel-store';
import { CheckRunner } from './document/check-runner';
import { BoardFiles } from './elements/board-files';
import { ElementForm } from './elements/element-form';
import { ElementList } from './elements/element-list';
import { UnreadTexts } from './entries/unread-texts';
import { LedgerTable } from './ledger/ledger';
import { LimitEditor } from './limits/limit-editor';
import { Verdicts } from './limits/verdicts';
import { Plan } from './plan/plan';
import { Response } from './response/response';
import { ChannelSaving } from './saving/channel-saving';
import { DraftNote } from './saving/draft-note';
import { Settings } from './settings/settings';
import { Strip } from './strip/strip';

const sides = ['elements', 'limits', 'settings'] as const;
type Side = (typeof sides)[number];
const sideTitles: Readonly<Record<Side, string>> = {
  elements: 'Elements',
  limits: 'Limits',
  settings: 'Settings',
};

/** One channel as an instrument: what it is made of on the left, what it comes to on the right. */
@Component({
  selector: 'tg-channel',
  imports: [
    Bar,
    ChannelBar,
    ChannelFoot,
    DraftNote,
    ElementForm,
    ElementList,
    Failure,
    LedgerTable,
    LimitEditor,
    Loading,
    Page,
    Plan,
    Response,
    RouterLink,
    Settings,
    Strip,
    Verdicts,
  ],
  providers: [BoardFiles, ChannelSaving, ChannelStore, CheckRunner, UnreadTexts],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './channel.html',
  styleUrl: './channel.scss',
  host: { '(document:keydown)': 'key($event)', '(window:beforeunload)': 'leave($event)' },
})
export class ChannelPage {
  private readonly api = inject(ApiClient);
  protected readonly check = inject(CheckRunner);
  private readonly query = toSignal(inject(ActivatedRoute).queryParamMap, { requireSync: true });
  private readonly host = inject<ElementRef<HTMLElement>>(ElementRef);
  private readonly router = inject(Router);
  protected readonly saving = inject(ChannelSaving);
  protected readonly store = inject(ChannelStore);

  /** From the address. */
  readonly channelId = input.required<string>();

  protected readonly sides = sides;
  protected readonly sideTitles = sideTitles;
  protected readonly side = computed(
    () => sides.find((side) => side === this.query().get('side')) ?? 'elements',
  );
  protected readonly source = rxResource({
    params: () => this.channelId(),
    stream: ({ params }) => this.read(params),
  });

  constructor() {
    const title = inject(PageTitle);
    effect(() => {
      const channel = this.source.hasValue() ? this.source.value() : undefined;
      if (channel) untracked(() => this.open(channel));
    });
    effect(() => {
      const document = this.store.document();
      if (document) title.set(`${document.name}, ${this.store.channel()?.boardName ?? ''}`);
    });
    inject(EventStream)
      .about(() => ({ channelId: this.channelId() }))
      .pipe(
        filter((event) => event.version === null || event.version > (this.store.channel()?.version ?? 0)),
        switchMap(() => this.read(this.channelId())),
        takeUntilDestroyed(),
      )
      .subscribe((channel) => this.takeIn(channel));
  }

  protected key(event: KeyboardEvent): void {
    if (!(event.ctrlKey || event.metaKey) || event.altKey) return;
    const key = event.key.toLowerCase();
    const again = key === 'y' || (key === 'z' && event.shiftKey);
    if (!again && key !== 'z') return;
    // A dialog's fields have their own.
    if (event.target instanceof Element && event.target.closest('.cdk-overlay-container')) return;
    event.preventDefault();
    // A field's own half-typed text is written first: undo is of the document.
    if (event.target instanceof HTMLElement) event.target.dispatchEvent(new FocusEvent('blur'));
    if (again) this.store.redo();
    else this.store.undo();
  }

  /** From the plan to the fields of what is selected. */
  protected async editFields(): Promise<void> {
    await this.router.navigate([], {
      queryParams: { side: null },
      queryParamsHandling: 'merge',
      replaceUrl: true,
    });
    const fields = this.host.nativeElement.querySelector('tg-element-form');
    fields?.querySelector<HTMLElement>('input:enabled, select:enabled')?.focus();
  }

  protected leave(event: BeforeUnloadEvent): void {
    if (!this.saving.dirty()) return;
    this.saving.save();
    event.preventDefault();
  }

  private read(id: string) {
    return this.api.get<Channel>(`/channels/${id}`);
  }

  private open(channel: Channel): void {
    this.check.show(channel);
    this.store.open(channel);
  }

  private takeIn(channel: Channel): void {
    if (!this.saving.dirty() && channel.version > (this.store.channel()?.version ?? 0))
      this.check.show(channel);
    this.saving.takeIn(channel);
  }
}
