import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { apiProblemOf } from '../api/api-problem';

/** A read that failed: what happened, the id it has in the log, and a way on. */
@Component({
  selector: 'tg-failure',
  imports: [MatButton],
  changeDetection: ChangeDetectionStrategy.OnPush,
  host: { role: 'alert' },
  template: `
    <h2>{{ heading() }}</h2>
    <p>{{ problem().detail }}</p>
    @if (problem().instance) {
      <p class="trace">Noted in the log as {{ problem().instance }}</p>
    }
    @if (mayRetry()) {
      <button matButton="outlined" type="button" (click)="retry.emit()">Try again</button>
    }
  `,
  styles: `
    :host {
      display: block;
      max-width: 62ch;
      margin: var(--tg-space-5) 0;
      padding-left: var(--tg-space-4);
      border-left: 3px solid var(--tg-oxide);
    }
    p {
      margin-top: var(--tg-space-1);
    }
    .trace {
      color: var(--tg-slate);
      font-size: var(--tg-text-small);
    }
    button {
      margin-top: var(--tg-space-4);
    }
  `,
})
export class Failure {
  /** Whatever a resource or request failed with. */
  readonly error = input.required<unknown>();
  readonly retry = output<void>();

  protected readonly problem = computed(() => apiProblemOf(this.error()).problem);
  protected readonly heading = computed(() =>
    this.problem().status === 404 ? 'There is nothing here to see' : 'This could not be read',
  );
  protected readonly mayRetry = computed(() => ![403, 404].includes(this.problem().status));
}
