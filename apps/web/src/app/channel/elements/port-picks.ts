import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';
import type { PortPicks } from '@tollgate/contracts';

interface Seat {
  readonly name: string;
  readonly title: string;
}

const pairSeats: readonly Seat[] = [
  { name: 'nearP', title: 'near p' },
  { name: 'nearN', title: 'near n' },
  { name: 'farP', title: 'far p' },
  { name: 'farN', title: 'far n' },
];
const singleSeats: readonly Seat[] = [
  { name: 'near', title: 'near' },
  { name: 'far', title: 'far' },
];

/** Which ports of a file of many the channel runs through; the rest are ended in the file's reference. */
@Component({
  selector: 'tg-port-picks',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @if (ports() > 2) {
      <label class="check">
        <input
          type="checkbox"
          [checked]="picks() !== undefined"
          [disabled]="disabled()"
          (change)="toggle()"
        />
        Pick the ports one by one
      </label>
    }
    @if (picks()) {
      <div class="seats">
        @for (seat of seats(); track seat.name) {
          <label>
            <span>{{ seat.title }}</span>
            <select
              [disabled]="disabled()"
              [attr.data-path]="'ports.' + seat.name"
              (change)="pick(seat, $event)"
            >
              @for (port of numbers(); track port) {
                <option [value]="port" [selected]="port === portOf(seat)">{{ port }}</option>
              }
            </select>
          </label>
        }
      </div>
    } @else if (required()) {
      <p class="error">This file has {{ ports() }} ports: pick those the channel runs through.</p>
    }
    @if (problem()) {
      <p class="error">{{ problem() }}</p>
    }
  `,
  styles: `
    .check {
      display: flex;
      align-items: baseline;
      gap: 8px;
      padding: 3px 0;
      color: var(--tg-slate);
      font-size: var(--tg-text-small);
    }
    input {
      accent-color: var(--tg-copper);
    }
    .seats {
      display: grid;
      grid-template-columns: repeat(4, 1fr);
      gap: 8px;
      padding: 4px 0;
      font-size: var(--tg-text-small);
    }
    .seats span {
      display: block;
      color: var(--tg-slate);
    }
    select {
      width: 100%;
      height: 28px;
      border: 1px solid var(--tg-outline);
      border-radius: var(--tg-radius);
      background: var(--tg-surface);
      color: var(--tg-ink);
      font: inherit;
    }
    .error {
      color: var(--tg-oxide);
      font-size: 12.5px;
    }
  `,
})
export class PortPicksFields {
  readonly ports = input.required<number>();
  readonly picks = input.required<PortPicks | undefined>();
  readonly differential = input.required<boolean>();
  /** There is no other way to say the order. */
  readonly required = input(false);
  readonly disabled = input(false);
  readonly problem = input('');
  readonly changed = output<PortPicks | undefined>();

  protected readonly seats = computed(() =>
    this.differential() && this.ports() >= 4 ? pairSeats : singleSeats,
  );
  protected readonly numbers = computed(() => Array.from({ length: this.ports() }, (_, i) => i + 1));

  protected portOf(seat: Seat): number | undefined {
    return (this.picks() as Record<string, number> | undefined)?.[seat.name];
  }

  protected toggle(): void {
    if (this.picks()) {
      this.changed.emit(undefined);
      return;
    }
    const starts = this.seats().length === 4 ? [1, 3, 2, 4] : [1, 2];
    const entries = this.seats().map((seat, i) => [seat.name, starts[i]] as const);
    this.changed.emit(Object.fromEntries(entries) as PortPicks);
  }

  protected pick(seat: Seat, event: Event): void {
    const port = Number((event.target as HTMLSelectElement).value);
    this.changed.emit({ ...this.picks()!, [seat.name]: port });
  }
}
