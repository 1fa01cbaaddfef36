import { ChangeDetectionStrategy, Component, input } from '@angular/core';

/** Nothing here yet: says what would be here; its content is the one action that brings it. */
@Component({
  selector: 'tg-empty',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <p class="headline">{{ headline() }}</p>
    @if (detail()) {
      <p>{{ detail() }}</p>
    }
    <div class="action"><ng-content /></div>
  `,
  styles: `
    :host {
      display: block;
      max-width: 58ch;
      padding: var(--tg-space-6) 0;
      color: var(--tg-slate);
    }
    .headline {
      margin-bottom: var(--tg-space-1);
      color: var(--tg-ink);
      font-size: var(--tg-text-large);
    }
    .action {
      margin-top: var(--tg-space-4);
    }
    .action:empty {
      display: none;
    }
  `,
})
export class Empty {
  readonly headline = input.required<string>();
  readonly detail = input('');
}
