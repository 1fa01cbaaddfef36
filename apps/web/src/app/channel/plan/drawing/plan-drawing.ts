import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { callOf } from '../../elements/element-words';
import { PlanDesk } from '../desk/plan-desk';
import type { PlanNode, PlanTrace } from '../layout/plan-layout';
import { Pen } from '../desk/pen';
import { traceWords } from '../desk/plan-words';
import { mm, pathText } from './path-text';
import { captionPlace, nodePicture, roomyNames, tracePicture, type Name } from './pictures';

/** The channel itself: its traces, vias and parts, the handles of what is selected, and what a drag or the pen is about to do. */
@Component({
  selector: 'tg-plan-drawing',
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './plan-drawing.html',
  styleUrl: './plan-drawing.scss',
})
export class PlanDrawing {
  protected readonly desk = inject(PlanDesk);
  protected readonly pen = inject(Pen);
  protected readonly store = this.desk.store;
  protected readonly view = this.desk.view;
  protected readonly mm = mm;

  private readonly pairs = computed(() => this.desk.document()?.signaling === 'differential');
  protected readonly traces = computed(() =>
    this.desk
      .layout()
      .items.filter((item): item is PlanTrace => item.body === 'trace')
      .map((item) => tracePicture(item, this.pairs(), this.view.pxPerM())),
  );
  protected readonly nodes = computed(() => {
    const document = this.desk.document();
    if (!document) return [];
    return this.desk
      .layout()
      .items.filter((item): item is PlanNode => item.body !== 'trace')
      .map((item) => nodePicture(item, document, this.view.pxPerM()));
  });
  protected readonly gaps = computed(() =>
    this.desk.layout().gaps.map(({ from, to, afterId }) => ({ afterId, line: pathText([from, to]) })),
  );
  protected readonly titles = computed(
    () => new Map(this.desk.document()?.elements.map((element) => [element.id, callOf(element)])),
  );
  /** A screen pixel in mm. */
  protected readonly px = computed(() => 1e3 / this.view.pxPerM());

  /** The vertices of the selected trace, and the middles of its longer pieces. */
  protected readonly handles = computed(() => {
    const item = this.desk.selected();
    if (!item || item.body !== 'trace' || !item.drawn || !this.store.mayChange()) return undefined;
    const grip = this.desk.grip();
    const places = item.points.map((point) => this.view.toPx(point));
    const vertices = places.map(([x, y], k) => ({
      k,
      x,
      y,
      held: grip?.id === item.id && grip.vertex === k,
    }));
    const middles = places.slice(1).flatMap(([x, y], k) => {
      const [fromX, fromY] = places[k]!;
      return Math.hypot(x - fromX, y - fromY) < 36 ? [] : [{ k, x: (x + fromX) / 2, y: (y + fromY) / 2 }];
    });
    return { id: item.id, vertices, middles };
  });

  protected readonly names = computed(() => {
    const first = this.store.selectedId();
    const names = this.nodes().map(({ item, halfWidth }): Name => {
      const [x, y] = this.view.toPx(item.at);
      const off = (halfWidth / this.px()) * 0.8;
      return { id: item.id, text: item.id, x: x + off + 2, y: y - off - 3 };
    });
    return roomyNames(names.sort((a, b) => Number(b.id === first) - Number(a.id === first)));
  });

  /** What the selected or hovered trace is, beside its longest piece. */
  protected readonly caption = computed(() => {
    const item = this.desk.itemOf(this.store.hoveredId()) ?? this.desk.selected();
    if (item?.body !== 'trace' || this.pen.line()) return undefined;
    const [x, y] = this.view.toPx(captionPlace(item.points));
    return { text: traceWords(item, this.view), x, y: y + 20 };
  });

  protected readonly penLine = computed(() => {
    const line = this.pen.line();
    return line && line.length > 1 ? pathText(line) : undefined;
  });
  protected readonly penAt = computed(() => {
    const at = this.pen.at();
    return at && this.view.toPx(at);
  });
  protected readonly guideLines = computed(() =>
    this.desk.guides().map(({ from, to }) => {
      const [[x1, y1], [x2, y2]] = [this.view.toPx(from), this.view.toPx(to)];
      return { x1, y1, x2, y2 };
    }),
  );
}
