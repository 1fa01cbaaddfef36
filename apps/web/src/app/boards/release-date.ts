import { DatePipe } from '@angular/common';
import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { daysTo, daysWords } from './release';

/** When a revision is released, and how long that is from today. */
@Component({
  selector: 'tg-release-date',
  imports: [DatePipe],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @if (on(); as date) {
      <span class="date">{{ date | date: 'd MMM y' }}</span>
      <span class="days" [class.over]="days() < 0 && !passed()">{{ words() }}</span>
    } @else {
      <span class="days">no date</span>
    }
  `,
  styles: `
    :host {
      display: block;
      font-variant-numeric: tabular-nums;
    }
    span {
      display: block;
      white-space: nowrap;
    }
    .days {
      color: var(--tg-slate);
      font-size: var(--tg-text-small);
    }
    .over {
      color: var(--tg-oxide);
    }
  `,
})
export class ReleaseDate {
  readonly on = input.required<string | null>();
  /** A later revision has taken its place: a date gone by is no delay. */
  readonly passed = input(false);

  protected readonly days = computed(() => daysTo(this.on() ?? '', new Date()));
  protected readonly words = computed(() => daysWords(this.days(), this.passed()));
}
