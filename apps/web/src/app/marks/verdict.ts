import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import type { ChannelVerdict } from '@tollgate/contracts';
import { VerdictMark } from './verdict-mark';
import { verdictWord } from './verdict-words';

/** Mark and word of a verdict. `detail` follows in the same tone: ", 1.84 dB left at 12.9 GHz". */
@Component({
  selector: 'tg-verdict',
  imports: [VerdictMark],
  changeDetection: ChangeDetectionStrategy.OnPush,
  host: { '[attr.data-verdict]': 'verdict()' },
  template: `<tg-verdict-mark [verdict]="verdict()" /><span>{{ text() }}</span>`,
  styles: `
    :host {
      display: inline-flex;
      align-items: baseline;
      gap: 8px;
      color: var(--tg-slate);
    }
    tg-verdict-mark {
      align-self: center;
    }
    :host([data-verdict='holds']) {
      color: var(--tg-verdigris-word);
    }
    :host([data-verdict='exceeds']) {
      color: var(--tg-oxide);
    }
    :host([data-verdict='inside-guard-band']) {
      color: var(--tg-ochre-word);
    }
  `,
})
export class Verdict {
  readonly verdict = input.required<ChannelVerdict>();
  /** Status of the limit behind the verdict. */
  readonly status = input<string | null>();
  readonly detail = input('');

  protected readonly text = computed(() => {
    const word = verdictWord(this.verdict(), this.status());
    return this.detail() === '' ? word : `${word}, ${this.detail()}`;
  });
}
