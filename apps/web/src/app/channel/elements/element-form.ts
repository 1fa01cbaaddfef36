import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { kindDescription, standings, type ChannelElement, type Source } from '@tollgate/contracts';
import { CheckRunner } from '../document/check-runner';
import { ChannelStore } from '../document/channel-store';
import { withElement, withElementValue } from '../document/element-edits';
import { pathText, type Path } from '../document/at-path';
import { PickEntry } from '../entries/pick-entry';
import { QuantityEntry } from '../entries/quantity-entry';
import { TextEntry } from '../entries/text-entry';
import { BoardFields } from './board-fields';
import { CircuitEditor } from './circuit-editor';
import { ElementQuantities } from './element-quantities';
import { ModelNote } from './model-note';
import { PartFields } from './part-fields';

const allotmentField = { dimension: 'loss', label: 'Allotted', unit: 'dB', min: 0, max: 1000 } as const;

/** Everything about the selected element: its quantities, where they come from, what the budget gave it. */
@Component({
  selector: 'tg-element-form',
  imports: [
    BoardFields,
    CircuitEditor,
    ElementQuantities,
    ModelNote,
    PartFields,
    PickEntry,
    QuantityEntry,
    TextEntry,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './element-form.html',
  styleUrl: './element-form.scss',
})
export class ElementForm {
  private readonly check = inject(CheckRunner);
  protected readonly store = inject(ChannelStore);
  protected readonly allotmentField = allotmentField;
  protected readonly standingPicks = standings.map((value) => ({ value, title: value }));

  protected readonly element = this.store.selected;
  protected readonly kind = computed(() => {
    const element = this.element();
    return element && kindDescription(element.kind);
  });
  protected readonly locked = computed(() => !this.store.mayChange());
  protected readonly standing = computed(() =>
    this.check.view()?.elementStandings.find((each) => each.element === this.element()?.id),
  );
  protected readonly source = computed(() => {
    const source = this.element()?.source;
    return typeof source === 'string' ? { text: source } : (source ?? {});
  });
  protected readonly base = computed(() => `elements[${this.store.selectedIndex()}]`);
  protected readonly problem = computed(() => this.store.problemAt(this.base()));

  protected set(path: Path, value: unknown): void {
    const id = this.store.selectedId();
    if (id) {
      this.store.edit((document) => withElementValue(document, id, path, value), `${id} ${pathText(path)}`);
    }
  }

  protected replace(change: (element: ChannelElement) => ChannelElement): void {
    const id = this.store.selectedId();
    if (id) this.store.edit((document) => withElement(document, id, change));
  }

  protected setSource(name: 'text' | 'date', value: string | undefined): void {
    const source = Object.fromEntries(
      Object.entries({ ...this.source(), [name]: value }).filter(([, each]) => each !== undefined),
    ) as Source;
    this.set(['source'], Object.keys(source).length ? source : undefined);
  }

  protected problemAt(path: string): string {
    return this.store.problemAt(`${this.base()}.${path}`);
  }
}
