import {
  ChangeDetectionStrategy,
  Component,
  computed,
  inject,
  input,
  linkedSignal,
  output,
  signal,
} from '@angular/core';
import type { QuantityField } from '@tollgate/contracts';
import { formatQuantity } from '@tollgate/quantities';
import { readEntry, unitIn } from './read-entry';
import { UnreadTexts } from './unread-texts';

let next = 0;

/** A quantity as text with its unit. What cannot be read stays in the field with the reason, and changes nothing. */
@Component({
  selector: 'tg-quantity-entry',
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './quantity-entry.html',
  styleUrl: './entry.scss',
})
export class QuantityEntry {
  private readonly unread = inject(UnreadTexts, { optional: true });

  readonly field = input.required<QuantityField>();
  readonly value = input.required<number | undefined>();
  /** Where the value stands in what the form edits; also its `data-path`. */
  readonly path = input.required<string>();
  /** What the path is inside of, such as an element's id. */
  readonly scope = input('');
  readonly label = input('');
  readonly optional = input(false);
  /** What an empty field stands for, where the schema has a default. */
  readonly fallback = input<number | undefined>();
  readonly placeholder = input('');
  readonly disabled = input(false);
  /** What the last check says of the value. */
  readonly problem = input('');
  readonly valueChange = output<number | undefined>();

  protected readonly id = `tg-entry-${next++}`;
  private readonly focused = signal(false);
  /** What is in the field while a person types, or what could not be read. */
  private readonly typed = linkedSignal<{ key: string; value: number | undefined }, string | undefined>({
    source: () => ({ key: `${this.scope()} ${this.path()}`, value: this.value() }),
    computation: ({ key, value }, previous) => {
      if (previous?.source.key !== key) return this.unread?.get(key);
      if (value === previous.source.value || value === this.emitted) return previous.value;
      // Changed from elsewhere, such as by an undo: what was typed is of the past.
      this.unread?.set(key, undefined);
      return undefined;
    },
  });
  private emitted: number | undefined;
  private readonly unit = linkedSignal<string, string | undefined>({
    source: () => `${this.scope()} ${this.path()}`,
    computation: () => undefined,
  });
  private readonly written = computed(() => {
    const value = this.value();
    if (value === undefined) return '';
    const { dimension } = this.field();
    return formatQuantity(value, dimension, { unit: this.unit(), digits: 9 });
  });
  protected readonly text = computed(() => this.typed() ?? this.written());
  protected readonly message = computed(() => {
    const typed = this.typed();
    const read = typed === undefined ? undefined : this.read(typed);
    return read && !read.ok && !(this.focused() && typed === '') ? read.message : this.problem();
  });

  protected take(event: Event): void {
    const text = (event.target as HTMLInputElement).value;
    const read = this.read(text);
    this.typed.set(text);
    this.unread?.set(`${this.scope()} ${this.path()}`, read.ok ? undefined : text);
    if (!read.ok || read.value === this.value()) return;
    this.emitted = read.value ?? this.fallback();
    this.valueChange.emit(read.value);
  }

  protected enter(): void {
    this.focused.set(true);
  }

  /** What was read is written as it is understood; what was not stays. */
  protected leave(): void {
    this.focused.set(false);
    const typed = this.typed();
    if (typed === undefined || !this.read(typed).ok) return;
    this.unit.set(unitIn(typed, this.field()) ?? this.unit());
    this.typed.set(undefined);
  }

  private read(text: string) {
    const shown = unitIn(this.written(), this.field()) ?? this.field().unit;
    return readEntry(text, this.field(), this.optional(), shown);
  }
}
