import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { Glyph } from '../marks/glyph';
import { Toasts } from './toasts';

/** Shows the toasts; the region itself is always there, so that screen readers hear what comes into it. */
@Component({
  selector: 'tg-toast-list',
  imports: [Glyph],
  changeDetection: ChangeDetectionStrategy.OnPush,
  host: { role: 'status', 'aria-live': 'polite' },
  template: `
    @for (toast of toasts.shown(); track toast.id) {
      <div class="toast" [attr.data-tone]="toast.tone">
        <span>{{ toast.text }}</span>
        <button type="button" aria-label="Close this note" (click)="toasts.close(toast.id)">
          <tg-glyph name="close" />
        </button>
      </div>
    }
  `,
  styles: `
    :host {
      position: fixed;
      z-index: 1100;
      bottom: var(--tg-space-5);
      left: var(--tg-gutter);
      display: grid;
      justify-items: start;
      gap: var(--tg-space-2);
      max-width: min(520px, calc(100vw - 2 * var(--tg-gutter)));
    }
    .toast {
      display: flex;
      align-items: center;
      gap: var(--tg-space-3);
      padding: 10px 10px 10px 16px;
      border-radius: var(--tg-radius);
      background: var(--tg-ink);
      color: var(--tg-ground);
      box-shadow: inset 3px 0 var(--tg-copper);
      animation: rise 0.18s ease-out;
    }
    .toast[data-tone='failure'] {
      box-shadow: inset 3px 0 var(--tg-oxide);
    }
    span {
      flex: 1;
    }
    button {
      display: inline-flex;
      padding: 6px;
      border: 0;
      border-radius: var(--tg-radius);
      background: none;
      color: inherit;
      cursor: pointer;
    }
    button:focus-visible {
      outline-color: var(--tg-ground);
      outline-offset: 0;
    }
    @keyframes rise {
      from {
        opacity: 0;
        transform: translateY(6px);
      }
    }
  `,
})
export class ToastList {
  protected readonly toasts = inject(Toasts);
}
