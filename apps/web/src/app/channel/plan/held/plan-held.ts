import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { samePoint, type Point } from '@tollgate/geometry';
import { PickEntry } from '../../entries/pick-entry';
import { QuantityEntry } from '../../entries/quantity-entry';
import { PlanDesk } from '../desk/plan-desk';
import { traceWords } from '../desk/plan-words';
import { signalLayers, withLayer } from '../edits/layers';
import { withNodeAt, withVertexAt } from '../edits/move';
import { withDrawnAsShown, withLengthAsDrawn } from '../edits/vertices';

const coordinate = { dimension: 'length', unit: 'mm', min: -10, max: 10 } as const;
const fields = { x: { ...coordinate, label: 'x' }, y: { ...coordinate, label: 'y' } } as const;

/** The selected element as a line of words and fields: its layer, its place, and whether its length is typed. */
@Component({
  selector: 'tg-plan-held',
  imports: [PickEntry, QuantityEntry],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './plan-held.html',
  styleUrl: './plan-held.scss',
})
export class PlanHeld {
  protected readonly desk = inject(PlanDesk);
  protected readonly store = this.desk.store;
  protected readonly fields = fields;

  protected readonly item = computed(() => (this.desk.blank() ? undefined : this.desk.selected()));
  protected readonly trace = computed(() => {
    const item = this.item();
    const element = this.store.selected();
    return item?.body === 'trace' && element?.kind === 'trace' ? item : undefined;
  });
  protected readonly words = computed(() => {
    const item = this.item();
    return item?.body === 'trace' ? traceWords(item, this.desk.view) : '';
  });
  protected readonly layers = computed(() => {
    const document = this.store.document();
    const own = this.trace()?.layer ?? '';
    const names = document ? signalLayers(document) : [];
    return (names.includes(own) || own === '' ? names : [own, ...names]).map((value) => ({
      value,
      title: value,
    }));
  });
  protected readonly vertex = computed(() => {
    const [item, grip] = [this.trace(), this.desk.grip()];
    if (!item?.drawn || grip?.id !== item.id || grip.vertex === undefined) return undefined;
    return grip.vertex < item.points.length ? grip.vertex : undefined;
  });
  /** Where the held vertex or part stands. */
  protected readonly place = computed((): Point | undefined => {
    const item = this.item();
    if (item && item.body !== 'trace') return item.at;
    const vertex = this.vertex();
    return vertex === undefined ? undefined : this.trace()?.points[vertex];
  });
  protected readonly scope = computed(() => `plan ${this.item()?.id ?? ''} ${this.vertex() ?? ''}`);

  protected setLayer(layer: string | undefined): void {
    const id = this.trace()?.id;
    if (id && layer) this.desk.edit((document, layout) => withLayer(document, layout, id, layer));
  }

  protected setPlace(axis: 0 | 1, value: number | undefined): void {
    const [item, place, vertex] = [this.item(), this.place(), this.vertex()];
    if (!item || !place || value === undefined) return;
    const to: Point = axis === 0 ? [value, place[1]] : [place[0], value];
    if (samePoint(to, place)) return;
    this.desk.edit(
      (document, layout) =>
        vertex === undefined
          ? withNodeAt(document, layout, item.id, to)
          : withVertexAt(document, layout, item.id, vertex, to),
      `${this.scope()} ${axis}`,
    );
  }

  protected follow(): void {
    const id = this.trace()?.id;
    if (id) this.desk.edit((document) => withLengthAsDrawn(document, id));
  }

  protected draw(): void {
    const { id } = this.trace() ?? {};
    if (!id) return;
    this.desk.edit((document, layout) => {
      const item = layout.items.find((each) => each.id === id);
      return item?.body === 'trace' ? withDrawnAsShown(document, item) : document;
    });
  }
}
