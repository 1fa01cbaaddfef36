import { inject, Injectable, signal } from '@angular/core';
import { kindDescription, type ElementKind } from '@tollgate/contracts';
import { nearestPlace, type Point } from '@tollgate/geometry';
import { PlanBoard } from '../board/plan-board';
import { withPartAppended, withPartInTrace } from '../edits/append';
import { withLayer } from '../edits/layers';
import { planLayout } from '../layout/plan-layout';
import { bodyOf } from '../layout/bodies';
import { PlanDesk, type PlanChange } from './plan-desk';
import { Pen } from './pen';

const ontoPx = 9;

/** Puts new elements on the plan: at the far end, where they are dropped, or into the trace they are dropped on. */
@Injectable()
export class Placing {
  private readonly board = inject(PlanBoard);
  private readonly desk = inject(PlanDesk);
  private readonly pen = inject(Pen);

  /** What is being dragged out of the tray, and where its near pin would come to lie. */
  readonly carried = signal<{ readonly kind: ElementKind; readonly at: Point | undefined } | undefined>(
    undefined,
  );

  /** At the far end; a trace is drawn from there. */
  append(kind: ElementKind): void {
    if (!this.desk.store.mayChange()) return;
    if (this.pen.active()) this.pen.end();
    if (bodyOf(kind) === 'trace') {
      this.pen.start();
      return;
    }
    this.place(kind, this.desk.blank() ? this.middle() : undefined);
  }

  /** A via where the pen is, and on with the trace on the layer it leads to. */
  viaAtPen(): void {
    const { pen } = this;
    const tip = pen.at();
    const last = pen.corners()?.at(-1);
    if (tip && last && (tip[0] !== last[0] || tip[1] !== last[1])) pen.corner();
    if ((pen.corners()?.length ?? 0) < 2) return;
    pen.end();
    this.place('via');
    pen.start();
  }

  carry(kind: ElementKind, px: readonly [number, number] | undefined, free: boolean): void {
    const at = px && this.desk.snap(this.desk.view.toPoint(px[0], px[1]), [], undefined, free);
    this.desk.guides.set(at?.guides ?? []);
    this.carried.set({ kind, at: at?.point });
  }

  drop(px: readonly [number, number] | undefined): void {
    const carried = this.carried();
    this.carried.set(undefined);
    this.desk.guides.set([]);
    if (!carried?.at || !px) return;
    if (bodyOf(carried.kind) === 'trace') {
      this.pen.start(carried.at);
      this.pen.move(carried.at);
      this.pen.corner();
      return;
    }
    const onto = this.traceUnder(this.desk.view.toPoint(px[0], px[1]));
    if (onto && this.into(carried.kind, onto)) return;
    this.place(carried.kind, carried.at);
  }

  private place(kind: ElementKind, at?: Point): void {
    let id = '';
    this.desk.edit((document, layout) => {
      const result = withPartAppended(document, layout, kind, at, this.board.stackup());
      id = result.id;
      return result.document;
    });
    this.chosen(id, kind, 'placed');
  }

  private into(kind: ElementKind, onto: { id: string; piece: number; point: Point }): boolean {
    let id = '';
    const change: PlanChange = (document) => {
      const result = withPartInTrace(document, onto.id, onto.piece, onto.point, kind);
      if (!result) return document;
      id = result.id;
      const via = result.document.elements.findIndex((element) => element.id === id);
      const [part, rest] = [result.document.elements[via], result.document.elements[via + 1]];
      if (part?.kind !== 'via' || rest?.kind !== 'trace') return result.document;
      // What lies behind a via is on the layer it leads to, with a via back where the channel goes on.
      const layout = planLayout(result.document);
      return withLayer(result.document, layout, rest.id, part.toLayer);
    };
    this.desk.edit(change);
    if (!id) return false;
    this.chosen(id, kind, `set into ${onto.id}`);
    return true;
  }

  private chosen(id: string, kind: ElementKind, how: string): void {
    this.desk.select(id);
    this.desk.said.set(`${id}, ${kindDescription(kind).title}, ${how}`);
    const item = this.desk.itemOf(id);
    if (item) this.desk.view.reveal(item.far);
  }

  private traceUnder(point: Point): { id: string; piece: number; point: Point } | undefined {
    const reachM = ontoPx / this.desk.view.pxPerM();
    for (const item of this.desk.layout().items) {
      if (item.body !== 'trace' || !item.drawn) continue;
      const place = nearestPlace(item.points, point);
      if (place && place.distanceM <= reachM) return { id: item.id, piece: place.piece, point: place.point };
    }
    return undefined;
  }

  private middle(): Point {
    const [width, height] = this.desk.view.size();
    return this.desk.snap(this.desk.view.toPoint(width * 0.2, height / 2), []).point;
  }
}
