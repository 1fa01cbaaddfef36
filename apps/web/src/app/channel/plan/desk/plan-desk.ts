import { computed, inject, Injectable, signal } from '@angular/core';
import type { CompleteChannel } from '@tollgate/contracts';
import { boxOf, samePoint, snapped, type Guide, type Point, type Snapped } from '@tollgate/geometry';
import { ChannelStore } from '../../document/channel-store';
import { dragKey } from '../../document/undo-list';
import { PlanBoard } from '../board/plan-board';
import { isBlank } from '../edits/append';
import { planLayout, type PlanItem, type PlanLayout } from '../layout/plan-layout';
import { PlanView } from '../view/plan-view';

/** What the arrow keys have hold of: an element, or one vertex of a trace. */
export interface Grip {
  readonly id: string;
  readonly vertex?: number;
}

/** A change of the plan, made anew on whatever document it meets, so that what others save meanwhile is kept. */
export type PlanChange = (document: CompleteChannel, layout: PlanLayout) => CompleteChannel;

const snapPx = 7;
let drags = 0;

/** What is going on at the plan: the layout shown, what is held, an unfinished drag; every edit goes through here to the document. */
@Injectable()
export class PlanDesk {
  private readonly board = inject(PlanBoard);
  readonly store = inject(ChannelStore);
  readonly view = inject(PlanView);

  private readonly gesture = signal<{ readonly key: string; readonly change: PlanChange } | undefined>(
    undefined,
  );
  private committed = false;

  readonly grip = signal<Grip | undefined>(undefined);
  readonly guides = signal<readonly Guide[]>([]);
  /** Said to those who do not see the plan. */
  readonly said = signal('');

  readonly document = computed(() => {
    const document = this.store.document();
    const gesture = this.gesture();
    return document && gesture ? this.changed(document, gesture.change) : document;
  });
  readonly layout = computed((): PlanLayout => {
    const document = this.document();
    return document ? planLayout(document, this.board.box()) : { items: [], gaps: [], inScale: true };
  });
  /** Nothing is drawn yet: the channel is as a new one comes. */
  readonly blank = computed(() => {
    const document = this.store.document();
    return document !== undefined && isBlank(document);
  });
  readonly dragging = computed(() => this.gesture() !== undefined);
  readonly selected = computed(() => this.itemOf(this.store.selectedId()));

  itemOf(id: string | undefined): PlanItem | undefined {
    return this.layout().items.find((item) => item.id === id);
  }

  /** One edit, one step back; edits of the same `key` in quick succession are one. */
  edit(change: PlanChange, key = ''): void {
    this.store.edit((document) => this.changed(document, change), key);
  }

  select(id: string, vertex?: number): void {
    this.store.select(id);
    this.grip.set(vertex === undefined ? { id } : { id, vertex });
  }

  /** A drag on its way: shown at once, written when the pointer rests or lets go. */
  drag(change: PlanChange): void {
    const key = this.gesture()?.key ?? `${dragKey}${++drags}`;
    this.gesture.set({ key, change });
  }

  /** What a drag has come to so far, checked and saved like any edit. */
  rest(): void {
    const gesture = this.gesture();
    if (!gesture) return;
    const before = this.store.document();
    this.edit(gesture.change, gesture.key);
    this.committed ||= this.store.document() !== before;
  }

  drop(): void {
    this.rest();
    this.letGo();
  }

  /** The drag never happened. */
  cancel(): void {
    const undo = this.committed;
    this.letGo();
    if (undo) this.store.undo();
  }

  /** Where a moved point comes to rest; what moves along is no ground to rest on. */
  snap(point: Point, moving: readonly Point[], from?: Point, free = false): Snapped {
    if (free) return { point, to: 'nothing', guides: [] };
    const rests = (each: Point) => !moving.some((other) => samePoint(each, other));
    const { items } = this.layout();
    const pins = items.flatMap((item) => [item.near, item.far]).filter(rests);
    const corners = items
      .flatMap((item) => (item.body === 'trace' && item.drawn ? item.points : [item.near]))
      .filter(rests);
    const reachM = snapPx / this.view.pxPerM();
    const aligned = from ? [from, ...corners] : corners;
    return snapped(point, { gridM: this.view.gridM(), pins, aligned, reachM, from });
  }

  /** Everything that is drawn, and the board. */
  fitAll(): void {
    const points = this.layout().items.flatMap((item) =>
      item.body === 'trace' ? item.points : [item.near, item.far],
    );
    const corners = this.board.corners();
    const box = boxOf([...points, ...corners]);
    this.view.fit(box ?? { x0: 0, y0: 0, x1: 0.16, y1: 0.1 });
  }

  private changed(document: CompleteChannel, change: PlanChange): CompleteChannel {
    return change(document, planLayout(document, this.board.box()));
  }

  private letGo(): void {
    this.gesture.set(undefined);
    this.guides.set([]);
    this.committed = false;
  }
}
