import { ChangeDetectionStrategy, Component } from '@angular/core';

/** The product's own drawing: a copper bar, raised, on two posts. Decorative; its name stands beside it. */
@Component({
  selector: 'tg-gate-mark',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <svg viewBox="0 0 32 28" aria-hidden="true" focusable="false">
      <path class="post" d="M8 11.5v13.5M24 14v11" />
      <path class="bar" d="M4 11 29 4.4" />
      <circle class="pivot" cx="8" cy="10" r="3" />
    </svg>
  `,
  styles: `
    :host {
      display: inline-flex;
    }
    svg {
      width: 30px;
      height: 26px;
      fill: none;
      stroke-linecap: round;
    }
    .post {
      stroke: var(--tg-ink);
      stroke-width: 2.4;
    }
    .bar {
      stroke: var(--tg-copper);
      stroke-width: 3;
    }
    .pivot {
      fill: var(--tg-ink);
    }
  `,
})
export class GateMark {}
