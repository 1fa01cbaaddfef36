import { inject, Injectable } from '@angular/core';
import type { Point } from '@tollgate/geometry';
import { withNodeAt, withVertexAt } from '../edits/move';
import { withVertexInserted } from '../edits/vertices';
import { Cursor } from '../desk/cursor';
import { Pen } from '../desk/pen';
import { PlanDesk } from '../desk/plan-desk';
import type { PlanNode, PlanTrace } from '../layout/plan-layout';

/** What a pressed pointer is about. */
type Press =
  | { readonly about: 'ground'; x: number; y: number; moved: boolean }
  | { readonly about: 'node'; readonly item: PlanNode; readonly grab: Point; moved: boolean }
  | { readonly about: 'vertex'; readonly item: PlanTrace; readonly vertex: number; moved: boolean }
  | { readonly about: 'middle'; readonly item: PlanTrace; readonly piece: number; moved: boolean };

const slackPx = 3;
const restMs = 140;

/**
 * Mouse, pen and fingers on the plan. Listens by itself and writes signals, so that a drag renews the drawing and nothing
 * else of the screen.
 */
@Injectable()
export class PlanPointer {
  private readonly desk = inject(PlanDesk);
  private readonly pen = inject(Pen);
  private readonly cursor = inject(Cursor);
  private readonly view = this.desk.view;
  private readonly fingers = new Map<number, readonly [number, number]>();
  private press: Press | undefined;
  private from: readonly [number, number] = [0, 0];
  private rest: ReturnType<typeof setTimeout> | undefined;
  private stage: HTMLElement | undefined;
  /** Space is held: the pointer moves the view, whatever lies under it. */
  panning = false;

  attach(stage: HTMLElement): () => void {
    this.stage = stage;
    const stop = new AbortController();
    const { signal } = stop;
    stage.addEventListener('pointerdown', (event) => this.down(event), { signal });
    stage.addEventListener('pointermove', (event) => this.move(event), { signal });
    stage.addEventListener('pointerup', (event) => this.up(event), { signal });
    stage.addEventListener('pointercancel', (event) => this.lost(event), { signal });
    stage.addEventListener('pointerleave', () => this.leave(), { signal });
    stage.addEventListener('dblclick', () => this.pen.active() && this.pen.end(), { signal });
    stage.addEventListener('wheel', (event) => this.wheel(event), { signal, passive: false });
    return () => {
      stop.abort();
      clearTimeout(this.rest);
    };
  }

  /** Escape while something is dragged. */
  giveUp(): boolean {
    if (!this.press || !this.desk.dragging()) return false;
    this.press = undefined;
    clearTimeout(this.rest);
    this.desk.cancel();
    return true;
  }

  /** Where an event lies on the stage, in px. */
  at(event: MouseEvent): readonly [number, number] {
    const box = this.stage!.getBoundingClientRect();
    return [event.clientX - box.left, event.clientY - box.top];
  }

  private down(event: PointerEvent): void {
    const [x, y] = this.at(event);
    this.fingers.set(event.pointerId, [x, y]);
    this.stage?.setPointerCapture(event.pointerId);
    if (this.fingers.size > 1) {
      this.giveUp();
      this.press = undefined;
      return;
    }
    this.from = [x, y];
    this.press = this.pressed(event, x, y);
  }

  private pressed(event: PointerEvent, x: number, y: number): Press {
    const ground: Press = { about: 'ground', x, y, moved: false };
    if (event.button !== 0 || this.panning || this.pen.active()) return ground;
    const target = event.target instanceof Element ? event.target.closest('[data-item]') : null;
    const item = this.desk.itemOf(target?.getAttribute('data-item') ?? undefined);
    if (!target || !item) return ground;
    const number = (name: string) => Number(target.getAttribute(name) ?? -1);
    if (item.body !== 'trace') {
      this.desk.select(item.id);
      const [px, py] = this.view.toPx(item.at);
      return { about: 'node', item, grab: [x - px, y - py], moved: false };
    }
    const [vertex, piece] = [number('data-vertex'), number('data-middle')];
    this.desk.select(item.id, vertex >= 0 ? vertex : undefined);
    if (vertex >= 0) return { about: 'vertex', item, vertex, moved: false };
    if (piece >= 0) return { about: 'middle', item, piece, moved: false };
    return ground;
  }

  private move(event: PointerEvent): void {
    const [x, y] = this.at(event);
    const before = this.fingers.get(event.pointerId);
    if (before) this.fingers.set(event.pointerId, [x, y]);
    if (this.fingers.size === 2) {
      this.pinch(event.pointerId, before!, [x, y]);
      return;
    }
    this.cursor.show(this.view.toPoint(x, y));
    const press = this.press;
    if (!press) {
      if (this.pen.active()) this.lead(x, y, event.altKey);
      else this.hover(event);
      return;
    }
    press.moved ||= Math.hypot(x - this.from[0], y - this.from[1]) > slackPx;
    if (!press.moved) return;
    if (press.about === 'ground') {
      this.view.panBy(x - press.x, y - press.y);
      [press.x, press.y] = [x, y];
    } else if (this.desk.store.mayChange()) {
      this.drag(press, x, y, event.altKey);
    }
  }

  private drag(press: Exclude<Press, { about: 'ground' }>, x: number, y: number, free: boolean): void {
    if (press.about === 'node') {
      const { item, grab } = press;
      const now = this.desk.itemOf(item.id) as PlanNode;
      const wanted = this.view.toPoint(x - grab[0], y - grab[1]);
      const to = this.taken(wanted, [now.at, now.near, now.far], undefined, free);
      this.desk.drag((document, layout) => withNodeAt(document, layout, item.id, to));
    } else {
      const { item } = press;
      const wanted = this.view.toPoint(x, y);
      const vertex = press.about === 'vertex' ? press.vertex : press.piece + 1;
      const now = this.desk.itemOf(item.id) as PlanTrace;
      const moving = press.about === 'vertex' || this.desk.dragging() ? [now.points[vertex]!] : [];
      const from = press.about === 'vertex' ? item.points[vertex - 1] : item.points[press.piece];
      const to = this.taken(wanted, moving, from, free);
      const count = item.points.length;
      this.desk.drag((document, layout) => {
        if (press.about === 'vertex') return withVertexAt(document, layout, item.id, vertex, to);
        const path = pathOf(document, item.id);
        const set = path === count ? withVertexInserted(document, item.id, press.piece, to) : document;
        return withVertexAt(set, layout, item.id, vertex, to);
      });
      this.desk.grip.set({ id: item.id, vertex });
    }
    clearTimeout(this.rest);
    this.rest = setTimeout(() => this.desk.rest(), restMs);
  }

  private taken(wanted: Point, moving: readonly Point[], from: Point | undefined, free: boolean): Point {
    const rest = this.desk.snap(wanted, moving, from, free);
    this.desk.guides.set(rest.guides);
    return rest.point;
  }

  private lead(x: number, y: number, free: boolean): void {
    const last = this.pen.corners()?.at(-1);
    this.pen.move(this.taken(this.view.toPoint(x, y), [], last, free));
  }

  private up(event: PointerEvent): void {
    this.fingers.delete(event.pointerId);
    const press = this.press;
    this.press = undefined;
    clearTimeout(this.rest);
    if (!press) return;
    if (press.about !== 'ground') {
      if (press.moved) this.desk.drop();
      return;
    }
    if (press.moved || event.button !== 0) return;
    if (this.pen.active()) {
      const [x, y] = this.at(event);
      this.lead(x, y, event.altKey);
      this.pen.corner();
    } else if (!this.itemUnder(event)) {
      this.desk.grip.set(undefined);
    }
  }

  private lost(event: PointerEvent): void {
    this.fingers.delete(event.pointerId);
    if (this.press && this.press.about !== 'ground') this.desk.cancel();
    this.press = undefined;
  }

  private leave(): void {
    if (this.press) return;
    this.cursor.show(undefined);
    this.desk.store.hoveredId.set(undefined);
  }

  private hover(event: PointerEvent): void {
    const id = this.itemUnder(event);
    if (this.desk.store.hoveredId() !== id) this.desk.store.hoveredId.set(id);
  }

  private itemUnder(event: MouseEvent): string | undefined {
    const under = document.elementFromPoint(event.clientX, event.clientY);
    return under?.closest('[data-item]')?.getAttribute('data-item') ?? undefined;
  }

  private wheel(event: WheelEvent): void {
    event.preventDefault();
    if (event.shiftKey) {
      this.view.panBy(-event.deltaY - event.deltaX, 0);
      return;
    }
    // A pinch on a touchpad arrives as a wheel with Ctrl, in small steps.
    const strength = event.ctrlKey ? 0.01 : event.deltaMode === WheelEvent.DOM_DELTA_LINE ? 0.05 : 0.0016;
    this.view.zoomBy(Math.exp(-event.deltaY * strength), this.at(event));
  }

  private pinch(id: number, before: readonly [number, number], now: readonly [number, number]): void {
    const other = [...this.fingers].find(([each]) => each !== id)?.[1];
    if (!other) return;
    const apart = (at: readonly [number, number]) =>
      Math.max(1, Math.hypot(at[0] - other[0], at[1] - other[1]));
    this.view.panBy((now[0] - before[0]) / 2, (now[1] - before[1]) / 2);
    this.view.zoomBy(apart(now) / apart(before), [(now[0] + other[0]) / 2, (now[1] + other[1]) / 2]);
  }
}

function pathOf(document: { elements: readonly { id: string; path?: unknown }[] }, id: string): number {
  const path = document.elements.find((element) => element.id === id)?.path;
  return Array.isArray(path) ? path.length : 0;
}
