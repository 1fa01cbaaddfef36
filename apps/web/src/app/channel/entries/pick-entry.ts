import { ChangeDetectionStrategy, Component, input, output } from '@angular/core';

export interface Pick {
  readonly value: string;
  readonly title: string;
}

let next = 0;

/** One of a list, by the browser's own select. */
@Component({
  selector: 'tg-pick-entry',
  changeDetection: ChangeDetectionStrategy.OnPush,
  host: { class: 'choice', '[class.wide]': 'wide()' },
  template: `
    <label [for]="id">{{ label() }}</label>
    <select
      [id]="id"
      [disabled]="disabled()"
      [attr.data-path]="path()"
      [attr.aria-invalid]="problem() ? 'true' : null"
      [attr.aria-describedby]="id + '-note'"
      (change)="take($event)"
    >
      @if (none()) {
        <option value="" [selected]="!value()">{{ none() }}</option>
      }
      @for (pick of picks(); track pick.value) {
        <option [value]="pick.value" [selected]="pick.value === value()">{{ pick.title }}</option>
      }
    </select>
    <span class="error" [id]="id + '-note'">{{ problem() }}</span>
  `,
  styleUrl: './entry.scss',
})
export class PickEntry {
  readonly label = input.required<string>();
  readonly value = input.required<string | undefined>();
  readonly picks = input.required<readonly Pick[]>();
  readonly path = input.required<string>();
  /** Words of the empty choice; left out, there is none. */
  readonly none = input('');
  readonly wide = input(false);
  readonly disabled = input(false);
  readonly problem = input('');
  readonly valueChange = output<string | undefined>();

  protected readonly id = `tg-pick-${next++}`;

  protected take(event: Event): void {
    this.valueChange.emit((event.target as HTMLSelectElement).value || undefined);
  }
}
