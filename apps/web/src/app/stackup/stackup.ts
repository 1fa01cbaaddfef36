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
import { rxResource, takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { RouterLink } from '@angular/router';
import type { Revision, StackupUsed, StackupVersion, StackupVersions } from '@tollgate/contracts';
import { auditTime, forkJoin, map, of, switchMap, tap, type Observable } from 'rxjs';
import { ApiClient } from '../api/api-client';
import { EventStream } from '../api/event-stream';
import { UnreadTexts } from '../channel/entries/unread-texts';
import { Confirmation, type ConfirmationData } from '../dialogs/confirmation';
import { Dialogs } from '../dialogs/dialogs';
import { routedDialogs } from '../dialogs/routed-dialogs';
import { Bar } from '../shell/bar-content';
import { Page } from '../shell/page';
import { PageTitle } from '../shell/page-title';
import { Failure } from '../states/failure';
import { Loading } from '../states/loading';
import { Toasts } from '../states/toasts';
import { Desk } from './desk/desk';
import { DeskRunner } from './desk/desk-runner';
import { differencesOf } from './document/differences';
import { StackupStore } from './document/stackup-store';
import { StackDrawing } from './drawing/stack-drawing';
import { LayerTable } from './layers/layer-table';
import { StackupBar } from './stackup-bar';
import { StackupNotes } from './stackup-notes';
import { StackupStart } from './stackup-start';
import { CopyDialog, type CopyDialogData } from './versions/copy-dialog';
import { SaveDialog, type SaveDialogData, type SaveOutcome } from './versions/save-dialog';
import { Versions } from './versions/versions';

interface Read {
  readonly revision: Revision;
  readonly versions: StackupVersions;
  readonly newest: StackupVersion | undefined;
}

/** A revision's stackup: its layers beside their drawing, the cross-section desk below, and its versions. */
@Component({
  selector: 'tg-stackup',
  imports: [
    Bar,
    Desk,
    Failure,
    LayerTable,
    Loading,
    Page,
    RouterLink,
    StackDrawing,
    StackupBar,
    StackupNotes,
    StackupStart,
    Versions,
  ],
  providers: [DeskRunner, StackupStore, UnreadTexts],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './stackup.html',
  styleUrl: './stackup.scss',
  host: { '(document:keydown)': 'key($event)' },
})
export class StackupPage {
  private readonly api = inject(ApiClient);
  private readonly dialogs = inject(Dialogs);
  private readonly toasts = inject(Toasts);
  protected readonly store = inject(StackupStore);
  protected readonly runner = inject(DeskRunner);
  private readonly host = inject<ElementRef<HTMLElement>>(ElementRef);

  /** From the address. */
  readonly revisionId = input.required<string>();

  protected readonly source = rxResource({
    params: () => this.revisionId(),
    stream: ({ params }) => this.read(params),
  });
  protected readonly revision = computed(() =>
    this.source.hasValue() ? this.source.value().revision : undefined,
  );
  protected readonly atDesk = computed(() => {
    const section = this.runner.section();
    if (!section) return '';
    const { differentialOhm, z0Ohm } = section.figures;
    return differentialOhm === null
      ? `${z0Ohm?.toFixed(1)} ohm`
      : `${differentialOhm.toFixed(1)} ohm differential`;
  });

  constructor() {
    const title = inject(PageTitle);
    effect(() => {
      const read = this.source.hasValue() ? this.source.value() : undefined;
      if (!read) return;
      title.set(`Stackup, ${read.revision.boardName}, revision ${read.revision.letter}`);
      untracked(() => {
        this.store.versions.set(read.versions);
        this.store.open(read.revision.id, read.newest);
      });
    });
    inject(EventStream)
      .about(() => ({ revisionId: this.revisionId() }))
      .pipe(
        auditTime(500),
        switchMap(() => this.read(this.revisionId())),
        takeUntilDestroyed(),
      )
      .subscribe((read) => this.takeIn(read));
    routedDialogs({ save: () => this.openSave(), copy: () => this.openCopy(), use: () => this.openUse() });
  }

  protected key(event: KeyboardEvent): void {
    if (!(event.ctrlKey || event.metaKey) || event.altKey) return;
    const key = event.key.toLowerCase();
    const again = key === 'y' || (key === 'z' && event.shiftKey);
    if (!again && key !== 'z') return;
    // A dialog's fields have their own.
    if (event.target instanceof Element && event.target.closest('.cdk-overlay-container')) return;
    event.preventDefault();
    // A field's own half-typed text is written first: undo is of the stackup.
    if (event.target instanceof HTMLElement) event.target.dispatchEvent(new FocusEvent('blur'));
    if (again) this.store.redo();
    else this.store.undo();
  }

  private read(revisionId: string): Observable<Read> {
    return forkJoin({
      revision: this.api.get<Revision>(`/revisions/${revisionId}`),
      versions: this.api.get<StackupVersions>(`/revisions/${revisionId}/stackups`),
    }).pipe(
      switchMap(({ revision, versions }) => {
        const [newest] = versions.items;
        if (!newest) return of({ revision, versions, newest: undefined });
        return this.api
          .get<StackupVersion>(`/stackups/${newest.id}`)
          .pipe(map((version) => ({ revision, versions, newest: version })));
      }),
    );
  }

  /** Someone saved a version, or a channel: shown at once, unless there are edits here. */
  private takeIn({ versions, newest }: Read): void {
    this.store.versions.set(versions);
    const known = this.store.base()?.number ?? 0;
    if (!newest || newest.number <= known) return;
    if (this.store.dirty()) this.store.overtaking.set(newest);
    else {
      this.store.settle(newest);
      this.toasts.done(`${newest.createdBy} saved version ${newest.number}; you see it as it is now.`);
    }
  }

  private openSave() {
    const stackup = this.store.stackup();
    if (!stackup || !this.store.mayChange() || !this.store.dirty()) return undefined;
    const unread = this.host.nativeElement.querySelector<HTMLElement>(
      'tg-layer-table input[aria-invalid="true"]',
    );
    if (unread) {
      unread.focus();
      this.toasts.failure('A value of the layers could not be taken; mend it first.');
      return undefined;
    }
    if (this.store.problems().length) {
      const { message, mend } = this.store.problems()[0]!;
      this.toasts.failure(`Mend the layers first: ${message} ${mend ?? ''}`.trim());
      return undefined;
    }
    const base = this.store.base();
    return this.openFor(SaveDialog, {
      revisionId: this.revisionId(),
      seen: base?.number ?? 0,
      kind: base?.kind ?? 'design',
      stackup,
      changes: base ? differencesOf(base.document, stackup) : [],
    } satisfies SaveDialogData);
  }

  private openCopy() {
    if (!this.store.mayChange()) return undefined;
    return this.openFor(CopyDialog, {
      revisionId: this.revisionId(),
      seen: this.store.base()?.number ?? 0,
    } satisfies CopyDialogData);
  }

  private openFor<Content extends object, Data>(component: new () => Content, data: Data) {
    const ref = this.dialogs.open<Content, Data, SaveOutcome>(component, data, '560px');
    ref.afterClosed().subscribe((outcome) => {
      if (!outcome) return;
      if ('overtaken' in outcome) {
        this.store.overtaking.set(outcome.overtaken);
        return;
      }
      this.store.settle(outcome.saved);
      this.toasts.done(`Version ${outcome.saved.number} is saved.`);
      this.readVersions().subscribe();
    });
    return ref;
  }

  private openUse() {
    const versions = this.store.versions();
    const newest = versions?.items[0];
    if (!versions?.can.use || !newest) return undefined;
    const { total } = versions.drafts;
    const ref = this.dialogs.open<Confirmation, ConfirmationData, boolean>(Confirmation, {
      heading: `Use version ${newest.number} in ${total === 1 ? 'the channel' : `the ${total} channels`} of this revision?`,
      text: 'Each channel takes these layers as its next version and is checked again; from then on it follows this stackup. What was submitted stays as it was.',
      action: 'Use it',
      run: () =>
        this.api
          .post<StackupUsed>(`/revisions/${this.revisionId()}/stackups/use`)
          .pipe(
            tap(({ changed, number }) =>
              this.toasts.done(
                changed.length
                  ? `${changed.length} channel${changed.length === 1 ? '' : 's'} took version ${number}.`
                  : `All channels had version ${number} already.`,
              ),
            ),
          ),
    });
    ref.afterClosed().subscribe((done) => done && this.readVersions().subscribe());
    return ref;
  }

  private readVersions(): Observable<StackupVersions> {
    return this.api
      .get<StackupVersions>(`/revisions/${this.revisionId()}/stackups`)
      .pipe(tap((versions) => this.store.versions.set(versions)));
  }
}
