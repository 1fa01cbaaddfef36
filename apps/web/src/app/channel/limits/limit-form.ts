import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import { bounds, type Limit } from '@tollgate/contracts';
import { pathText, withValue, type Path } from '../document/at-path';
import { ChannelStore } from '../document/channel-store';
import type { PlacedLimit } from '../document/element-edits';
import { PickEntry } from '../entries/pick-entry';
import { QuantityEntry } from '../entries/quantity-entry';
import { TextEntry } from '../entries/text-entry';
import * as forms from './limit-forms';
import { PointsField } from './points-field';
import { sourceWords } from './verdict-lines';

export interface LimitChange {
  readonly limit: PlacedLimit;
  readonly key: string;
}

/** One limit: what it is on, its numbers as a formula, as points or at one frequency, and where it comes from. */
@Component({
  selector: 'tg-limit-form',
  imports: [PickEntry, PointsField, QuantityEntry, TextEntry],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './limit-form.html',
  styleUrl: './limit-form.scss',
})
export class LimitForm {
  private readonly store = inject(ChannelStore);

  readonly limit = input.required<PlacedLimit>();
  readonly base = input.required<string>();
  readonly differential = input(false);
  readonly disabled = input(false);
  readonly changed = output<LimitChange>();

  protected readonly forms = forms;
  protected readonly form = computed(() => forms.formOf(this.limit()));
  protected readonly statusPicks = forms.statusPicks;
  protected readonly maySplit = computed(() => (this.limit().segments?.length ?? 0) < bounds.segments);
  protected readonly ofSet = computed(() => {
    const { source } = this.limit();
    return typeof source === 'object' && source.itemRevision !== undefined;
  });
  protected readonly sourceText = computed(() => {
    const { source } = this.limit();
    return typeof source === 'string' ? source : sourceWords(source?.text);
  });
  protected readonly problem = computed(
    () => this.store.problemAt(this.base()) || this.problemAt('source.itemRevision'),
  );

  /** A number of the limit: from then on it is no longer the mask set's. */
  protected setNumber(path: Path, value: unknown): void {
    this.emit(forms.asOwnNumbers(withValue(this.limit(), path, value)), pathText(path));
  }

  protected set(path: Path, value: unknown): void {
    this.emit(withValue(this.limit(), path, value), pathText(path));
  }

  protected setForm(form: string | undefined): void {
    this.emit(forms.asOwnNumbers(forms.inForm(this.limit(), form as forms.Form)), '');
  }

  protected setQuantity(quantity: string | undefined): void {
    this.emit(forms.asOwnNumbers(forms.ofQuantity(this.limit(), quantity as Limit['quantity'])), '');
  }

  protected setSource(text: string | undefined): void {
    const { source } = this.limit();
    const rest = typeof source === 'object' ? source : {};
    const next = text === undefined ? { ...rest, text: undefined } : { ...rest, text };
    const kept = Object.fromEntries(Object.entries(next).filter(([, value]) => value !== undefined));
    this.set(['source'], Object.keys(kept).length ? kept : undefined);
  }

  protected addSegment(): void {
    const segments = this.limit().segments ?? [];
    const fromHz = segments.at(-1)?.toHz ?? 50e6;
    this.setNumber(
      ['segments'],
      [...segments, { fromHz, toHz: 2 * fromHz, formula: segments.at(-1)?.formula ?? '10' }],
    );
  }

  protected removeSegment(index: number): void {
    this.setNumber(
      ['segments'],
      (this.limit().segments ?? []).filter((_, i) => i !== index),
    );
  }

  protected problemAt(path: string): string {
    return this.store.problemAt(`${this.base()}.${path}`);
  }

  private emit(limit: PlacedLimit, key: string): void {
    this.changed.emit({ limit, key });
  }
}
