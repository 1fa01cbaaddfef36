import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { RouterLink } from '@angular/router';
import { api, type CompleteChannel, type StackupVersion, type StackupVersions } from '@tollgate/contracts';
import { ApiClient } from '../../api/api-client';
import { apiProblemOf } from '../../api/api-problem';
import { paths } from '../../paths';
import { Toasts } from '../../states/toasts';
import { ChannelStore } from '../document/channel-store';
import { PickEntry } from '../entries/pick-entry';

/** Which version of the revision's stackup the channel's layers are; another one is taken as an edit, and undone as one. */
@Component({
  selector: 'tg-stackup-choice',
  imports: [PickEntry, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tg-pick-entry
      label="Layers"
      path="library.stackupVersion"
      [none]="own()"
      [value]="current()"
      [picks]="picks()"
      [disabled]="disabled() || !picks().length"
      (valueChange)="take($event)"
    />
    @if (link(); as link) {
      <a [routerLink]="link">The revision's stackup</a>
    }
  `,
  styles: `
    a {
      font-size: var(--tg-text-small);
    }
  `,
})
export class StackupChoice {
  private readonly api = inject(ApiClient);
  private readonly store = inject(ChannelStore);
  private readonly toasts = inject(Toasts);

  readonly disabled = input(false);

  private readonly source = rxResource({
    params: () => this.store.channel()?.revisionId,
    stream: ({ params }) => this.api.get<StackupVersions>(`/revisions/${params}/stackups`),
  });
  protected readonly picks = computed(() =>
    (this.source.hasValue() ? this.source.value().items : []).map(({ id, number, kind }, i) => ({
      value: id,
      title: `version ${number}, ${api.stackupKindTitles[kind].toLowerCase()}${i === 0 ? ' (newest)' : ''}`,
    })),
  );
  protected readonly current = computed(() => {
    const named = this.store.document()?.library?.stackupVersion;
    return this.picks().some(({ value }) => value === named) ? named : undefined;
  });
  protected readonly own = computed(() => {
    const layers = this.store.document()?.stackup?.layers?.length ?? 0;
    return layers ? `${layers} of its own` : 'none';
  });
  protected readonly link = computed(() => {
    const revisionId = this.store.channel()?.revisionId;
    return revisionId && paths.stackup(revisionId);
  });

  protected take(versionId: string | undefined): void {
    if (versionId === undefined) {
      this.store.edit(withoutReference);
      return;
    }
    this.api.get<StackupVersion>(`/stackups/${versionId}`).subscribe({
      next: (version) => this.store.edit((document) => withVersion(document, version)),
      error: (error: unknown) => this.toasts.failure(apiProblemOf(error).message),
    });
  }
}

/** A stackup that names no temperature leaves the channel its own. */
function withVersion(document: CompleteChannel, version: StackupVersion): CompleteChannel {
  const temperatureC = version.document.temperatureC ?? document.stackup?.temperatureC;
  return {
    ...document,
    stackup: { ...(temperatureC === undefined ? {} : { temperatureC }), ...version.document },
    library: { ...document.library, stackupVersion: version.id },
  };
}

/** The layers stay; they no longer follow a version. */
function withoutReference(document: CompleteChannel): CompleteChannel {
  const { stackupVersion: _version, ...library } = document.library ?? {};
  const { library: _library, ...rest } = document;
  return Object.keys(library).length ? { ...rest, library } : rest;
}
