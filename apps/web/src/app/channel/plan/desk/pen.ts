import { computed, inject, Injectable, signal } from '@angular/core';
import { samePoint, tidyPoint, type Point } from '@tollgate/geometry';
import { farEnd, withTraceAppended } from '../edits/append';
import { PlanBoard } from '../board/plan-board';
import { PlanDesk } from './plan-desk';

/** Draws the next trace from the far end of the channel: corners are set one after the other, by pointer or by keys. */
@Injectable()
export class Pen {
  private readonly board = inject(PlanBoard);
  private readonly desk = inject(PlanDesk);
  private readonly set = signal<readonly Point[] | undefined>(undefined);
  private readonly tip = signal<Point | undefined>(undefined);

  /** Corners that are set; undefined while nothing is drawn. */
  readonly corners = this.set.asReadonly();
  readonly at = this.tip.asReadonly();
  readonly active = computed(() => this.set() !== undefined);
  /** Corners and the piece on its way. */
  readonly line = computed(() => {
    const [corners, tip] = [this.set(), this.tip()];
    return corners && (tip ? [...corners, tip] : corners);
  });

  /** Begins at the far end; where nothing is placed yet, at the first corner that is set. */
  start(at?: Point): void {
    const document = this.desk.document();
    if (!document || !this.desk.store.mayChange()) return;
    const end = farEnd(document, this.desk.layout());
    this.set.set(end ? [end.point] : []);
    this.tip.set(end?.point ?? at ?? this.middle());
    this.desk.said.set(
      `Drawing a trace${end ? ' from the far end' : ''}. Arrows move the pen, Enter sets a corner, Enter twice ends, Escape gives up.`,
    );
  }

  move(to: Point): void {
    if (this.active()) this.tip.set(tidyPoint(to));
  }

  /** Sets a corner where the pen is; a second one at the same place ends the trace. */
  corner(): void {
    const [corners, tip] = [this.set(), this.tip()];
    if (!corners || !tip) return;
    const last = corners.at(-1);
    if (last && samePoint(last, tip)) {
      this.end();
      return;
    }
    this.set.set([...corners, tip]);
    this.desk.said.set(`Corner ${corners.length + 1} at ${this.words(tip)}`);
  }

  /** Takes the last corner back; without one, gives up. */
  back(): void {
    const corners = this.set() ?? [];
    if (corners.length <= 1) this.stop();
    else this.set.set(corners.slice(0, -1));
  }

  /** Writes what is set as the channel's next trace. */
  end(): boolean {
    const corners = this.set() ?? [];
    this.stop();
    if (corners.length < 2) return false;
    let id = '';
    this.desk.edit((document) => {
      const result = withTraceAppended(document, corners, this.board.stackup());
      id = result.id;
      return result.document;
    });
    this.desk.select(id);
    this.desk.said.set(`${id} drawn, ${corners.length} corners`);
    return true;
  }

  stop(): void {
    this.set.set(undefined);
    this.tip.set(undefined);
    this.desk.guides.set([]);
  }

  private middle(): Point {
    const [width, height] = this.desk.view.size();
    return this.desk.snap(this.desk.view.toPoint(width / 2, height / 2), []).point;
  }

  private words([x, y]: Point): string {
    return `${this.desk.view.number(x)}, ${this.desk.view.written(y)}`;
  }
}
