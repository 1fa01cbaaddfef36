import { ChangeDetectionStrategy, Component, input } from '@angular/core';

/** Something is on its way. It appears only after a moment, so that quick answers do not flicker. */
@Component({
  selector: 'tg-loading',
  changeDetection: ChangeDetectionStrategy.OnPush,
  host: { role: 'status' },
  template: `<span class="bar" aria-hidden="true"></span><span>{{ label() }}</span>`,
  styles: `
    :host {
      display: flex;
      align-items: center;
      gap: 12px;
      padding: var(--tg-space-5) 0;
      color: var(--tg-slate);
      animation: appear 0.2s 0.25s both;
    }
    .bar {
      width: 56px;
      height: 3px;
      border-radius: 2px;
      background: linear-gradient(90deg, var(--tg-rule) 40%, var(--tg-copper) 50%, var(--tg-rule) 60%);
      background-size: 250% 100%;
      animation: run 1.3s linear infinite;
    }
    @keyframes run {
      from {
        background-position: 100% 0;
      }
      to {
        background-position: 0 0;
      }
    }
    @keyframes appear {
      from {
        opacity: 0;
      }
    }
  `,
})
export class Loading {
  readonly label = input('Loading');
}
