import { inject, Injectable } from '@angular/core';
import type { ElementKind } from '@tollgate/contracts';
import { between, shifted, type Point } from '@tollgate/geometry';
import { withoutElement } from '../../document/element-edits';
import { Pen } from '../desk/pen';
import { Placing } from '../desk/placing';
import { PlanDesk, type Grip } from '../desk/plan-desk';
import { movable, withNodeAt, withShifted, withVertexAt } from '../edits/move';
import { signalLayers, withLayer } from '../edits/layers';
import { withVertexInserted, withoutVertex } from '../edits/vertices';
import type { PlanItem } from '../layout/plan-layout';

const arrows: Readonly<Record<string, Point>> = {
  ArrowLeft: [-1, 0],
  ArrowRight: [1, 0],
  ArrowUp: [0, -1],
  ArrowDown: [0, 1],
};
/** The letter an element's id begins with puts a new one at the far end. */
const letters: Readonly<Record<string, ElementKind>> = {
  t: 'trace',
  v: 'via',
  c: 'capacitor',
  j: 'connector',
};
const panPx = 40;

/** The plan by keyboard. Answers whether it took the key. */
@Injectable()
export class PlanKeys {
  private readonly desk = inject(PlanDesk);
  private readonly pen = inject(Pen);
  private readonly placing = inject(Placing);

  take(event: KeyboardEvent): boolean {
    if (event.ctrlKey || event.metaKey || event.altKey) return false;
    const key = event.key.length === 1 ? event.key.toLowerCase() : event.key;
    if (this.view(key)) return true;
    if (this.pen.active()) return this.drawing(key, event.shiftKey);
    return this.arrow(key, event.shiftKey) || this.edit(key, event.shiftKey) || this.walk(key);
  }

  private view(key: string): boolean {
    const { view } = this.desk;
    if (key === '+' || key === '=') view.zoomBy(1.25);
    else if (key === '-') view.zoomBy(0.8);
    else if (key === '0') this.desk.fitAll();
    else return false;
    return true;
  }

  private drawing(key: string, large: boolean): boolean {
    const { pen } = this;
    const arrow = arrows[key];
    if (arrow) {
      const by = this.step(arrow, large);
      const at = pen.at();
      if (at) {
        pen.move(shifted(at, by));
        this.desk.view.reveal(pen.at()!);
        this.desk.said.set(this.words(pen.at()!));
      }
    } else if (key === 'Enter') pen.corner();
    else if (key === 'Backspace') pen.back();
    else if (key === 'Escape') pen.stop();
    else if (key === 'v') this.placing.viaAtPen();
    else return false;
    return true;
  }

  private arrow(key: string, large: boolean): boolean {
    const arrow = arrows[key];
    if (!arrow) return false;
    const grip = this.desk.grip();
    const item = this.desk.itemOf(grip?.id);
    if (!grip || !item) {
      const px = large ? 5 * panPx : panPx;
      this.desk.view.panBy(-arrow[0] * px, -arrow[1] * px);
      return true;
    }
    if (!this.desk.store.mayChange()) return true;
    if (!movable(item)) {
      this.desk.said.set(`${item.id} is not drawn: its length is typed.`);
      return true;
    }
    const by = this.step(arrow, large);
    const { id, vertex } = grip;
    const place = vertex === undefined || item.body !== 'trace' ? undefined : item.points[vertex];
    this.desk.edit(
      (document, layout) =>
        place && vertex !== undefined
          ? withVertexAt(document, layout, id, vertex, shifted(place, by))
          : withShifted(document, layout, id, by),
      `nudge ${id} ${vertex ?? ''}`,
    );
    this.tell(vertex);
    return true;
  }

  private edit(key: string, reversed: boolean): boolean {
    const item = this.desk.selected();
    const kind = letters[key];
    if (!this.desk.store.mayChange()) return false;
    if (kind) this.placing.append(kind);
    else if ((key === 'Delete' || key === 'Backspace') && item) this.remove(item);
    else if (key === 'i' && item) this.insert(item);
    else if (key === 'r' && item && item.body !== 'trace') {
      const turn = item.rotationDeg + (reversed ? -45 : 45);
      this.desk.edit((document, layout) => withNodeAt(document, layout, item.id, item.at, turn));
      this.desk.said.set(`${item.id} turned to ${(turn + 360) % 360}°`);
    } else if (key === 'l' && item?.body === 'trace') this.flip(item.id, item.layer, reversed);
    else return false;
    return true;
  }

  /** To the next element or vertex and back, and out of hold. */
  private walk(key: string): boolean {
    if (key === 'Escape') {
      if (!this.desk.grip()) return false;
      this.desk.grip.set(undefined);
      return true;
    }
    if (key !== '.' && key !== ',') return false;
    const places = this.desk
      .layout()
      .items.flatMap((item) => [
        { id: item.id, vertex: undefined as number | undefined },
        ...(item.body === 'trace' && item.drawn && item.id === this.desk.store.selectedId()
          ? item.points.map((_, vertex) => ({ id: item.id, vertex }))
          : []),
      ]);
    const grip: Partial<Grip> = this.desk.grip() ?? { id: this.desk.store.selectedId() };
    const now = places.findIndex(({ id, vertex }) => id === grip.id && vertex === grip.vertex);
    const next = this.desk.grip() ? places[now + (key === '.' ? 1 : -1)] : places[now];
    if (next) {
      this.desk.select(next.id, next.vertex);
      this.tell(next.vertex);
    }
    return true;
  }

  private remove(item: PlanItem): void {
    const grip = this.desk.grip();
    const { id } = item;
    if (grip?.id === id && grip.vertex !== undefined) {
      const { vertex } = grip;
      this.desk.edit((document) => withoutVertex(document, id, vertex));
      this.desk.select(id, Math.max(0, vertex - 1));
      this.desk.said.set(`Vertex ${vertex + 1} of ${id} removed`);
      return;
    }
    const { items } = this.desk.layout();
    if (items.length === 1) {
      this.desk.said.set('A channel keeps at least one element.');
      return;
    }
    const beside = items[item.index + 1] ?? items[item.index - 1];
    this.desk.edit((document) => withoutElement(document, id));
    if (beside) this.desk.select(beside.id);
    this.desk.said.set(`${id} removed. Ctrl and Z brings it back.`);
  }

  /** A vertex in the middle of the piece behind the one that is held. */
  private insert(item: PlanItem): void {
    if (item.body !== 'trace' || !item.drawn) return;
    const piece = Math.min(this.desk.grip()?.vertex ?? 0, item.points.length - 2);
    const middle = between(item.points[piece]!, item.points[piece + 1]!, 0.5);
    this.desk.edit((document) => withVertexInserted(document, item.id, piece, middle));
    this.desk.select(item.id, piece + 1);
    this.tell(piece + 1);
  }

  private flip(id: string, layer: string, reversed: boolean): void {
    const document = this.desk.store.document();
    const signals = document ? signalLayers(document) : [];
    const next = signals[(signals.indexOf(layer) + (reversed ? signals.length - 1 : 1)) % signals.length];
    if (!next || next === layer) return;
    this.desk.edit((now, layout) => withLayer(now, layout, id, next));
    this.desk.said.set(`${id} is on ${next} now`);
  }

  private step([x, y]: Point, large: boolean): Point {
    const stepM = this.desk.view.gridM() * (large ? 10 : 1);
    return [x * stepM, y * stepM];
  }

  private tell(vertex: number | undefined): void {
    const item = this.desk.selected();
    if (!item) return;
    const place = item.body === 'trace' ? item.points[vertex ?? 0]! : item.at;
    this.desk.view.reveal(place);
    const which = vertex === undefined ? item.id : `${item.id} vertex ${vertex + 1}`;
    this.desk.said.set(`${which} at ${this.words(place)}`);
  }

  private words([x, y]: Point): string {
    return `${this.desk.view.number(x)}, ${this.desk.view.written(y)}`;
  }
}
