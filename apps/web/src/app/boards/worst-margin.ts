import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { RevisionSummary } from '@tollgate/contracts';
import { formatDb } from '@tollgate/quantities';
import { paths } from '../paths';

/** The smallest margin of a revision, the limit it is against, and the channel that has it. */
@Component({
  selector: 'tg-worst-margin',
  imports: [RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @if (worst(); as worst) {
      <span class="margin" [class.over]="worst.marginDb < 0">{{ margin() }}</span>
      <span class="limit">
        {{ worst.limitTitle }}, <a [routerLink]="paths.channel(worst.channelId)">{{ worst.channelName }}</a>
      </span>
    } @else {
      <span class="limit">none judged</span>
    }
  `,
  styles: `
    :host {
      display: block;
      font-variant-numeric: tabular-nums;
    }
    .margin {
      display: block;
      font-weight: 600;
      white-space: nowrap;
    }
    .over {
      color: var(--tg-oxide);
    }
    .limit {
      display: block;
      color: var(--tg-slate);
      font-size: var(--tg-text-small);
      overflow-wrap: anywhere;
    }
    a {
      color: inherit;
    }
  `,
})
export class WorstMargin {
  readonly worst = input.required<RevisionSummary['worst']>();

  protected readonly paths = paths;
  protected readonly margin = computed(() => formatDb(this.worst()?.marginDb ?? null));
}
