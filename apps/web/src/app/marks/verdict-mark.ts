import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import type { ChannelVerdict } from '@tollgate/contracts';

/**
 * The sign of a verdict, told apart by shape and not by colour: ring = holds, lozenge = exceeds, half-ring = inside the
 * guard band, barred ring = not judged, dashed ring = not checked. Decorative: its word must stand beside it
 * (`tg-verdict` brings both).
 */
@Component({
  selector: 'tg-verdict-mark',
  changeDetection: ChangeDetectionStrategy.OnPush,
  host: { '[attr.data-verdict]': 'verdict()' },
  template: `
    <svg viewBox="0 0 16 16" aria-hidden="true" focusable="false">
      @switch (verdict()) {
        @case ('holds') {
          <circle cx="8" cy="8" r="5.6" stroke-width="2.8" />
        }
        @case ('exceeds') {
          <path class="solid" d="M8 .9 15.1 8 8 15.1.9 8Z" />
        }
        @case ('inside-guard-band') {
          <circle class="faint" cx="8" cy="8" r="5.6" stroke-width="2.8" />
          <path d="M8 13.6A5.6 5.6 0 0 1 8 2.4" stroke-width="2.8" />
        }
        @case ('not-judged') {
          <circle cx="8" cy="8" r="6.1" stroke-width="1.6" />
          <path d="M4.9 8h6.2" stroke-width="2" />
        }
        @case ('not-checked') {
          <circle cx="8" cy="8" r="6.1" stroke-width="1.7" stroke-dasharray="2.7 2.09" />
        }
      }
    </svg>
  `,
  styles: `
    :host {
      display: inline-flex;
      flex: none;
      color: var(--tg-slate);
    }
    :host([data-verdict='holds']) {
      color: var(--tg-verdigris);
    }
    :host([data-verdict='exceeds']) {
      color: var(--tg-oxide);
    }
    :host([data-verdict='inside-guard-band']) {
      color: var(--tg-ochre);
    }
    svg {
      width: var(--tg-mark-size, 15px);
      height: var(--tg-mark-size, 15px);
      fill: none;
      stroke: currentcolor;
    }
    .solid {
      fill: currentcolor;
      stroke: none;
    }
    .faint {
      opacity: 0.28;
    }
  `,
})
export class VerdictMark {
  readonly verdict = input.required<ChannelVerdict>();
}
