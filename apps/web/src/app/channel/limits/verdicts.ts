import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { Verdict } from '../../marks/verdict';
import { CheckRunner } from '../document/check-runner';
import { cornerWords, limitFacts, marginWords, partWords, rangesWords, sourceWords } from './verdict-lines';

/** What each limit came to, what was not judged, and what to be careful about. */
@Component({
  selector: 'tg-verdicts',
  imports: [Verdict],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './verdicts.html',
  styleUrl: './verdicts.scss',
})
export class Verdicts {
  protected readonly check = inject(CheckRunner);

  protected readonly lines = computed(() =>
    (this.check.view()?.limits ?? []).map((limit) => ({
      limit,
      margin: marginWords(limit),
      corner: cornerWords(limit),
      facts: limitFacts(limit),
      missing: rangesWords(limit.missingHz),
      exceeds: rangesWords(limit.exceedsHz),
      source: sourceWords(limit.source),
    })),
  );
  protected readonly beyond = computed(() => [
    ...new Set((this.check.view()?.limits ?? []).flatMap((limit) => limit.beyond)),
  ]);
  protected readonly parts = computed(() =>
    (this.check.view()?.parts ?? []).map((part) => ({ element: part.element, words: partWords(part) })),
  );
  protected readonly warnings = computed(() => [
    ...new Set((this.check.view()?.warnings ?? []).map((warning) => warning.message)),
  ]);
}
