import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import {
  elementKinds,
  kindDescription,
  newElement,
  type CircuitElement,
  type ElementKind,
} from '@tollgate/contracts';
import { withValue } from '../document/at-path';
import { ChannelStore } from '../document/channel-store';
import { Glyph } from '../../marks/glyph';
import { ElementQuantities, type FieldChange } from './element-quantities';

/** The circuit a connector is made of: a short list of circuit kinds, each with its quantities. */
@Component({
  selector: 'tg-circuit-editor',
  imports: [ElementQuantities, Glyph],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './circuit-editor.html',
  styleUrl: './circuit-editor.scss',
})
export class CircuitEditor {
  private readonly store = inject(ChannelStore);

  readonly circuit = input.required<readonly CircuitElement[]>();
  readonly base = input.required<string>();
  readonly scope = input.required<string>();
  readonly disabled = input(false);
  readonly changed = output<readonly CircuitElement[]>();

  protected readonly kinds = computed(() =>
    elementKinds.filter(
      (kind) =>
        (kind.group === 'circuit' || kind.kind === 'budget-loss') &&
        (kind.use === 'both' || kind.use === this.store.document()?.signaling),
    ),
  );

  protected title(element: CircuitElement): string {
    return kindDescription(element.kind).title;
  }

  protected add(event: Event): void {
    const select = event.target as HTMLSelectElement;
    const kind = select.value as ElementKind;
    select.value = '';
    const signaling = this.store.document()?.signaling ?? 'single-ended';
    this.changed.emit([...this.circuit(), newElement(kind, signaling) as CircuitElement]);
  }

  protected set(index: number, { path, value }: FieldChange): void {
    this.changed.emit(this.circuit().map((each, i) => (i === index ? withValue(each, path, value) : each)));
  }

  protected remove(index: number): void {
    this.changed.emit(this.circuit().filter((_, i) => i !== index));
  }

  protected move(index: number, by: number): void {
    const circuit = this.circuit().slice();
    const [moved] = circuit.splice(index, 1);
    circuit.splice(index + by, 0, moved!);
    this.changed.emit(circuit);
  }
}
