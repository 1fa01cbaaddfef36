import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import type { ChannelVerdict, StandingCounts as Counts } from '@tollgate/contracts';
import { VerdictMark } from './verdict-mark';

interface Count {
  readonly verdict: ChannelVerdict;
  readonly number: number;
  readonly words: string;
}

/** How many channels hold, exceed, could not be judged or are not checked: four marks with numbers that align down a table. */
@Component({
  selector: 'tg-standing-counts',
  imports: [VerdictMark],
  changeDetection: ChangeDetectionStrategy.OnPush,
  host: { role: 'list' },
  template: `
    @for (count of list(); track count.verdict) {
      <span role="listitem" class="count" [class.none]="count.number === 0" [title]="count.words">
        <tg-verdict-mark [verdict]="count.verdict" />
        <span aria-hidden="true">{{ count.number }}</span>
        <span class="tg-visually-hidden">{{ count.words }}</span>
      </span>
    }
  `,
  styles: `
    :host {
      display: inline-grid;
      grid-template-columns: repeat(4, 58px);
      font-variant-numeric: tabular-nums;
    }
    .count {
      display: inline-flex;
      align-items: baseline;
      gap: 7px;
    }
    tg-verdict-mark {
      align-self: center;
    }
    .none {
      --tg-mark-size: 13px;

      color: var(--tg-slate);
      filter: grayscale(1);
    }
    .none tg-verdict-mark {
      margin: 0 1px;
      opacity: 0.4;
    }
  `,
})
export class StandingCounts {
  readonly counts = input.required<Counts>();

  protected readonly list = computed<readonly Count[]>(() => {
    const { holds, exceeds, notJudged, notChecked } = this.counts();
    return [
      { verdict: 'holds', number: holds, words: `${holds} ${holds === 1 ? 'holds' : 'hold'}` },
      { verdict: 'exceeds', number: exceeds, words: `${exceeds} ${exceeds === 1 ? 'exceeds' : 'exceed'}` },
      { verdict: 'not-judged', number: notJudged, words: `${notJudged} not judged` },
      { verdict: 'not-checked', number: notChecked, words: `${notChecked} not checked` },
    ];
  });
}
