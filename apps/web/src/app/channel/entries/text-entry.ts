import { ChangeDetectionStrategy, Component, input, output } from '@angular/core';

let next = 0;

/** A line of text, or several. */
@Component({
  selector: 'tg-text-entry',
  changeDetection: ChangeDetectionStrategy.OnPush,
  host: { '[class.wide]': 'wide()' },
  template: `
    <label [for]="id">{{ label() }}</label>
    @if (rows() > 1) {
      <textarea
        [id]="id"
        [rows]="rows()"
        [value]="value() ?? ''"
        [disabled]="disabled()"
        [attr.data-path]="path()"
        [attr.aria-invalid]="problem() ? 'true' : null"
        [attr.aria-describedby]="id + '-note'"
        (input)="take($event)"
      ></textarea>
    } @else {
      <input
        [id]="id"
        [type]="type()"
        autocomplete="off"
        [value]="value() ?? ''"
        [placeholder]="placeholder()"
        [disabled]="disabled()"
        [attr.data-path]="path()"
        [attr.aria-invalid]="problem() ? 'true' : null"
        [attr.aria-describedby]="id + '-note'"
        (input)="take($event)"
      />
    }
    <span class="error" [id]="id + '-note'">{{ problem() }}</span>
  `,
  styleUrl: './entry.scss',
})
export class TextEntry {
  readonly label = input.required<string>();
  readonly value = input.required<string | undefined>();
  readonly path = input.required<string>();
  readonly type = input<'text' | 'date' | 'number'>('text');
  readonly rows = input(1);
  /** The label stands above the field. */
  readonly wide = input(false);
  readonly placeholder = input('');
  readonly disabled = input(false);
  readonly problem = input('');
  /** Undefined where the field is empty. */
  readonly valueChange = output<string | undefined>();

  protected readonly id = `tg-text-${next++}`;

  protected take(event: Event): void {
    this.valueChange.emit((event.target as HTMLInputElement).value || undefined);
  }
}
