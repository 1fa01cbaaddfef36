import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { formatDb, formatQuantity } from '@tollgate/quantities';
import { ChannelStore } from '../document/channel-store';
import { CheckRunner } from '../document/check-runner';
import { ledgerLines, spoilsLines } from './ledger-rows';

/** Who takes how much of the budget, at the evaluation frequency or where a limit is nearest. */
@Component({
  selector: 'tg-ledger',
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './ledger.html',
  styleUrl: './ledger.scss',
})
export class LedgerTable {
  private readonly check = inject(CheckRunner);
  protected readonly store = inject(ChannelStore);
  private readonly wanted = signal('');

  protected readonly choices = computed(() => {
    const view = this.check.view();
    const tolls = (view?.ledger ?? []).map((ledger, i) => {
      const at = formatQuantity(ledger.atHz, 'frequency', { digits: 5 });
      const limit = view?.limits.find((each) => each.id === ledger.limitId);
      const evaluation = i === 0 && ledger.atHz === view?.evaluationHz;
      return {
        key: String(i),
        title: evaluation || !limit ? at : `${at}, worst of ${limit.title}`,
      };
    });
    const spoiled = (view?.spoils ?? []).map(({ atHz, limitId }, i) => {
      const at = formatQuantity(atHz, 'frequency', { digits: 5 });
      const title = view?.limits.find(({ id }) => id === limitId)?.title ?? limitId;
      return { key: `spoils ${i}`, title: `${at}, spoils ${title}` };
    });
    return [...tolls, ...spoiled];
  });
  protected readonly key = computed(() =>
    this.choices().some(({ key }) => key === this.wanted()) ? this.wanted() : (this.choices()[0]?.key ?? ''),
  );
  protected readonly ledger = computed(() => this.check.view()?.ledger[Number(this.key())]);
  protected readonly lines = computed(() => {
    const [ledger, view, document] = [this.ledger(), this.check.view(), this.store.document()];
    return ledger && view && document ? ledgerLines(ledger, view, document) : [];
  });
  protected readonly spoils = computed(() => {
    const [word, index] = this.key().split(' ');
    return word === 'spoils' ? this.check.view()?.spoils[Number(index)] : undefined;
  });
  protected readonly spoilsLines = computed(() => {
    const [spoils, view, document] = [this.spoils(), this.check.view(), this.store.document()];
    return spoils && view && document ? spoilsLines(spoils, view, document) : [];
  });
  protected readonly head = computed(() => {
    const spoils = this.spoils();
    if (spoils) return `return loss ${formatDb(spoils.returnLossDb)}`;
    const ledger = this.ledger();
    if (ledger?.limitDb === undefined) return '';
    return `limit ${formatDb(ledger.limitDb)}`;
  });
  protected readonly reflectionAllotment = computed(() => {
    const allotted = this.store.document()?.reflectionAllotmentDb;
    return allotted === undefined ? '' : formatDb(allotted, false);
  });
  protected readonly left = computed(() => {
    const ledger = this.ledger();
    if (typeof ledger?.limitDb !== 'number' || ledger.totalDb === null) return undefined;
    const leftDb = ledger.limitDb - ledger.totalDb;
    return { leftDb, words: leftDb < 0 ? `${formatDb(-leftDb)} over` : `${formatDb(leftDb)} left` };
  });

  protected readonly db = (value: number | null | undefined) =>
    value === undefined ? '' : formatDb(value, false);

  protected choose(event: Event): void {
    this.wanted.set((event.target as HTMLSelectElement).value);
  }

  protected clash(reserve: number | null | undefined): boolean {
    return typeof reserve === 'number' && reserve < 0;
  }
}
