import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { PlanView } from '../view/plan-view';
import { ticks } from './ground-lines';

/** Coordinates along the upper and left edge of the plan. */
@Component({
  selector: 'tg-plan-rulers',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <svg aria-hidden="true" focusable="false">
      <rect class="strip" width="100%" height="18" />
      <rect class="strip" width="34" height="100%" />
      @for (tick of across(); track tick.text) {
        <path class="tick" [attr.d]="'M' + tick.px + ' 14v4'" />
        <text text-anchor="middle" y="12" [attr.x]="tick.px">{{ tick.text }}</text>
      }
      @for (tick of down(); track tick.text) {
        <path class="tick" [attr.d]="'M30 ' + tick.px + 'h4'" />
        <text text-anchor="end" x="28" dy="0.35em" [attr.y]="tick.px">{{ tick.text }}</text>
      }
      <rect class="strip" width="34" height="18" />
      <text text-anchor="middle" x="17" y="12">{{ view.unit() }}</text>
    </svg>
  `,
  styles: `
    :host,
    svg {
      display: block;
      position: absolute;
      inset: 0;
      width: 100%;
      height: 100%;
      pointer-events: none;
    }
    .strip {
      fill: color-mix(in srgb, var(--tg-ground) 88%, transparent);
    }
    .tick {
      stroke: var(--tg-outline);
    }
    text {
      fill: var(--tg-slate);
      font-size: 12px;
      font-variant-numeric: tabular-nums;
    }
  `,
})
export class PlanRulers {
  protected readonly view = inject(PlanView);
  protected readonly across = computed(() => this.along(0));
  protected readonly down = computed(() => this.along(1));

  private along(axis: 0 | 1) {
    const { view } = this;
    return ticks(view.origin()[axis], view.size()[axis], view.pxPerM(), view.unit());
  }
}
