import {
  ChangeDetectionStrategy,
  Component,
  computed,
  inject,
  input,
  linkedSignal,
  output,
} from '@angular/core';
import { UnreadTexts } from './unread-texts';

/** What a person's text came to. */
export type Written<Value> =
  { readonly ok: true; readonly value: Value | undefined } | { readonly ok: false; readonly message: string };

let next = 0;

/** A value that is more than one quantity, written in words of its own; taken when the field is left. What can't be read stays. */
@Component({
  selector: 'tg-written-entry',
  changeDetection: ChangeDetectionStrategy.OnPush,
  host: { '[class.wide]': 'wide()' },
  template: `
    <label [for]="id">{{ label() }}</label>
    <input
      type="text"
      autocomplete="off"
      spellcheck="false"
      [id]="id"
      [attr.data-path]="path()"
      [value]="text()"
      [placeholder]="placeholder()"
      [disabled]="disabled()"
      [attr.aria-invalid]="message() ? 'true' : null"
      [attr.aria-describedby]="id + '-note'"
      (input)="hold($event)"
      (change)="take()"
    />
    <span class="error" [id]="id + '-note'">{{ message() }}</span>
  `,
  styleUrl: './entry.scss',
})
export class WrittenEntry<Value> {
  private readonly unread = inject(UnreadTexts, { optional: true });

  readonly label = input.required<string>();
  readonly path = input.required<string>();
  readonly scope = input('');
  /** The value as it is written. */
  readonly written = input.required<string>();
  readonly read = input.required<(text: string) => Written<Value>>();
  readonly placeholder = input('');
  readonly wide = input(false);
  readonly disabled = input(false);
  readonly problem = input('');
  readonly valueChange = output<Value | undefined>();

  protected readonly id = `tg-written-${next++}`;
  private readonly typed = linkedSignal<string, string | undefined>({
    source: () => `${this.scope()} ${this.path()} ${this.written()}`,
    computation: () => this.unread?.get(this.key()),
  });
  private readonly key = computed(() => `${this.scope()} ${this.path()}`);
  private readonly refusal = linkedSignal<string, string>({
    source: () => `${this.key()} ${this.written()}`,
    computation: () => '',
  });
  protected readonly text = computed(() => this.typed() ?? this.written());
  protected readonly message = computed(() => this.refusal() || this.problem());

  protected hold(event: Event): void {
    this.typed.set((event.target as HTMLInputElement).value);
  }

  protected take(): void {
    const text = this.text();
    const read = this.read()(text);
    this.refusal.set(read.ok ? '' : read.message);
    this.unread?.set(this.key(), read.ok ? undefined : text);
    if (!read.ok) return;
    this.typed.set(undefined);
    this.valueChange.emit(read.value);
  }
}
