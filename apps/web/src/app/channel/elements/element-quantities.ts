import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import { elementQuantities, type ChannelElement } from '@tollgate/contracts';
import { pathText, valueAt, type Path } from '../document/at-path';
import { ChannelStore } from '../document/channel-store';
import { PickEntry } from '../entries/pick-entry';
import { QuantityEntry } from '../entries/quantity-entry';

export interface FieldChange {
  readonly path: Path;
  readonly value: unknown;
}

const branchTitles: Readonly<Record<string, string>> = {
  near: 'Near arm',
  far: 'Far arm',
  shunt: 'To ground',
  series: 'Through',
  load: 'Load at its end',
  p: 'Leg p',
  n: 'Leg n',
  evenLoss: 'Even-mode loss',
  oddLoss: 'Odd-mode loss',
  backdrill: 'Backdrill',
  pads: 'Pads, as copper',
};

const endPicks = [
  { value: 'open', title: 'open' },
  { value: 'short', title: 'shorted' },
  { value: 'load', title: 'a load' },
];
const shapePicks = [
  { value: 'sqrt', title: 'as the root of f' },
  { value: 'linear', title: 'as f' },
];

/** The quantities of one element, nested ones under their branch's name; of a stub and a budgeted loss also the choice. */
@Component({
  selector: 'tg-element-quantities',
  imports: [PickEntry, QuantityEntry],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './element-quantities.html',
  styles: `
    h4 {
      margin: 8px 0 2px;
      font-size: var(--tg-text-small);
      font-weight: 600;
    }
  `,
})
export class ElementQuantities {
  private readonly store = inject(ChannelStore);

  readonly element = input.required<ChannelElement>();
  /** Path of the element in the document, for what the check says of it. */
  readonly base = input.required<string>();
  readonly scope = input.required<string>();
  readonly disabled = input(false);
  readonly changed = output<FieldChange>();

  protected readonly endPicks = endPicks;
  protected readonly shapePicks = shapePicks;

  protected readonly groups = computed(() => {
    const element = this.element();
    const hidden = element.kind === 'stub' && element.end !== 'load' ? 'load' : undefined;
    const fields = elementQuantities(element.kind).filter((field) => field.path[0] !== hidden);
    const heads = [...new Set(fields.map((field) => (field.path.length > 1 ? field.path[0]! : '')))];
    return heads.map((head) => ({
      head,
      title: branchTitles[head] ?? head,
      rows: fields
        .filter((field) => (field.path.length > 1 ? field.path[0] : '') === head)
        .map((field) => ({
          field,
          text: pathText(field.path),
          value: valueAt(element, field.path) as number | undefined,
          problem: this.store.problemAt(`${this.base()}.${pathText(field.path)}`),
        })),
      problem: head === '' ? '' : this.store.problemAt(`${this.base()}.${head}`),
    }));
  });

  protected setEnd(end: string | undefined): void {
    const { load: _load, ...rest } = this.element() as Extract<ChannelElement, { kind: 'stub' }>;
    const value = end === 'load' ? { ...rest, end, load: { resistanceOhm: 50 } } : { ...rest, end };
    this.changed.emit({ path: [], value });
  }
}
