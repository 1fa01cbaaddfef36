import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { formatDb, formatQuantity } from '@tollgate/quantities';
import { CheckRunner } from '../document/check-runner';
import { nearestPoint } from './chart-data';
import type { Range } from './chart-options';
import { LossChart, type Trace } from './loss-chart';
import { NumbersTable } from './numbers-table';

/** Insertion loss and return loss of the last check, one above the other on one frequency axis. */
@Component({
  selector: 'tg-response',
  imports: [LossChart, NumbersTable],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './response.html',
  styleUrl: './response.scss',
})
export class Response {
  protected readonly check = inject(CheckRunner);

  protected readonly log = signal(false);
  protected readonly asTable = signal(false);
  /** Both charts show the same frequencies. */
  protected readonly range = signal<Range | undefined>(undefined);
  protected readonly pointed = signal<number | undefined>(undefined);

  protected readonly through: readonly Trace[] = [
    { curve: 'insertionLossDb', title: 'Insertion loss', tone: 'copper' },
  ];
  protected readonly reflected: readonly Trace[] = [
    { curve: 'returnLossFarDb', title: 'far', tone: 'slate' },
    { curve: 'returnLossNearDb', title: 'near', tone: 'copper' },
  ];

  /** What stands under the crosshair. */
  protected readonly readout = computed(() => {
    const view = this.check.view();
    const at = this.pointed();
    if (!view || at === undefined) return undefined;
    const i = nearestPoint(view, at);
    const { insertionLossDb, returnLossNearDb, returnLossFarDb } = view.curves;
    return {
      ghz: (view.frequenciesHz[i] ?? 0) / 1e9,
      frequency: formatQuantity(view.frequenciesHz[i] ?? 0, 'frequency', { digits: 5 }),
      through: formatDb(insertionLossDb[i] ?? null),
      near: formatDb(returnLossNearDb[i] ?? null, false),
      far: formatDb(returnLossFarDb[i] ?? null),
    };
  });
  protected readonly crosshair = computed(() => this.readout()?.ghz);

  protected switchLog(): void {
    this.log.set(!this.log());
    this.range.set(undefined);
  }

  /** The bench waits for this mark: the new curve is on the canvas. */
  protected painted(): void {
    performance.mark('tg-curve-painted');
  }
}
