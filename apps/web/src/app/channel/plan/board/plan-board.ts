import { computed, inject, Injectable } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import type { PlanChannel, Revision, StackupVersion, StackupVersions } from '@tollgate/contracts';
import { boxOf, type Box, type Point } from '@tollgate/geometry';
import { filter, map, of, switchMap } from 'rxjs';
import { ApiClient } from '../../../api/api-client';
import { EventStream } from '../../../api/event-stream';
import { readAgain } from '../../../api/read-again';
import { ChannelStore } from '../../document/channel-store';

/** What the channel lies on: the revision's outline, its other channels, and its stackup for a channel without one. */
@Injectable()
export class PlanBoard {
  private readonly api = inject(ApiClient);
  private readonly store = inject(ChannelStore);
  private readonly revisionId = computed(() => this.store.channel()?.revisionId);
  private readonly channelId = computed(() => this.store.channel()?.id);

  private readonly revisionSource = rxResource({
    params: () => this.revisionId(),
    stream: ({ params }) => this.api.get<Revision>(`/revisions/${params}`),
  });
  private readonly planSource = rxResource({
    params: () => this.revisionId(),
    stream: ({ params }) =>
      this.api.get<{ items: PlanChannel[] }>(`/revisions/${params}/plan`).pipe(map(({ items }) => items)),
  });
  private readonly stackupSource = rxResource({
    params: () => {
      const layers = this.store.document()?.stackup?.layers ?? [];
      return layers.length === 0 && this.store.mayChange() ? this.revisionId() : undefined;
    },
    stream: ({ params }) =>
      this.api
        .get<StackupVersions>(`/revisions/${params}/stackups`)
        .pipe(
          switchMap(({ items }) =>
            items[0] ? this.api.get<StackupVersion>(`/stackups/${items[0].id}`) : of(undefined),
          ),
        ),
  });

  readonly revision = computed(() =>
    this.revisionSource.hasValue() ? this.revisionSource.value() : undefined,
  );
  /** Everything the first look needs is there, or cannot be had. */
  readonly settled = computed(
    () => this.revisionSource.hasValue() || this.revisionSource.error() !== undefined,
  );
  readonly corners = computed((): readonly Point[] => this.revision()?.outline?.cornersM ?? []);
  readonly box = computed((): Box | undefined => boxOf(this.corners()));
  readonly mayOutline = computed(() => this.revision()?.can.change === true && !this.revision()?.archived);
  readonly others = computed(() => {
    const own = this.channelId();
    const all = this.planSource.hasValue() ? this.planSource.value() : [];
    return all.filter(({ id }) => id !== own);
  });
  /** The newest stackup of the revision, where the channel has none. */
  readonly stackup = computed(() => (this.stackupSource.hasValue() ? this.stackupSource.value() : undefined));

  constructor() {
    // What is saved here oneself is on the screen already.
    const events = inject(EventStream)
      .about(() => ({ revisionId: this.revisionId() ?? '' }))
      .pipe(filter(({ channelId }) => channelId === null || channelId !== this.channelId()));
    readAgain(events, this.revisionSource, this.planSource);
  }

  /** Shows what was saved at once. */
  took(revision: Revision): void {
    this.revisionSource.set(revision);
  }
}
