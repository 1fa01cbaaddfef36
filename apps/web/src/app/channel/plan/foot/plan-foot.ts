import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { formatQuantity } from '@tollgate/quantities';
import { CheckRunner } from '../../document/check-runner';
import { Cursor } from '../desk/cursor';
import { PlanDesk } from '../desk/plan-desk';
import { lengthsOf, mismatchM } from '../desk/plan-words';
import { planLayout } from '../layout/plan-layout';
import { grids, type PlanUnit } from '../view/plan-view';

const lightMPerS = 299_792_458;
const units: readonly PlanUnit[] = ['mm', 'mil'];

/** Under the plan: where the pointer is, the grid, the unit, and how long the channel is. */
@Component({
  selector: 'tg-plan-foot',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <span class="at">{{ at() }}</span>
    <label>
      grid
      <select (change)="grid($event)">
        @for (step of steps(); track step) {
          <option [value]="step" [selected]="step === view.gridM()">{{ gridText(step) }}</option>
        }
      </select>
    </label>
    <span class="units" role="group" aria-label="Unit of the plan">
      @for (unit of units; track unit) {
        <button type="button" [attr.aria-pressed]="unit === view.unit()" (click)="view.setUnit(unit)">
          {{ unit }}
        </button>
      }
    </span>
    <span class="length">{{ lengths() }}</span>
  `,
  styleUrl: './plan-foot.scss',
})
export class PlanFoot {
  private readonly check = inject(CheckRunner);
  private readonly cursor = inject(Cursor);
  private readonly desk = inject(PlanDesk);
  protected readonly view = this.desk.view;
  protected readonly units = units;

  protected readonly steps = computed(() => grids[this.view.unit()]);
  protected readonly at = computed(() => {
    const place = this.cursor.place();
    return place ? `x ${this.view.written(place[0])}  y ${this.view.written(place[1])}` : '';
  });
  protected readonly lengths = computed(() => {
    const document = this.desk.store.document();
    if (!document || this.desk.blank()) return '';
    const { totalM, typedM, mismatchM: off } = lengthsOf(document, planLayout(document).items);
    const total = `${this.view.written(totalM)} long${typedM > 0 ? `, ${this.view.written(typedM)} of it typed` : ''}`;
    if (document.signaling !== 'differential') return total;
    if (off === undefined) return `${total}; a turn is too sharp for a pair`;
    return `${total}; ${this.mismatch(off)}`;
  });
  /** Excess length of each trace at the speed of its odd mode; undefined where the check has no model of one that differs. */
  private readonly skewS = computed(() => {
    const models = this.check.view()?.models ?? [];
    let skewS = 0;
    for (const element of this.desk.store.document()?.elements ?? []) {
      const off = mismatchM(element) ?? 0;
      if (Math.abs(off) < 1e-9) continue;
      const model = models.find((each) => each.kind === 'trace' && each.element === element.id);
      const modes = model?.kind === 'trace' ? model.modes : [];
      const odd = modes.find(({ mode }) => mode === 'odd');
      if (!odd) return undefined;
      skewS += (off * Math.sqrt(odd.effectivePermittivity)) / lightMPerS;
    }
    return skewS;
  });

  protected gridText(stepM: number): string {
    return `${Number((stepM / this.view.unitM()).toFixed(3))} ${this.view.unit()}`;
  }

  protected grid(event: Event): void {
    this.view.setGrid(Number((event.target as HTMLSelectElement).value));
  }

  private mismatch(off: number): string {
    if (Math.abs(off) < 5e-7) return 'legs equal';
    const leg = off > 0 ? 'n' : 'p';
    const skew = this.skewS();
    const time =
      skew === undefined ? '' : `, skew about ${formatQuantity(Math.abs(skew), 'time', { digits: 2 })}`;
    return `${leg} leg ${this.view.written(Math.abs(off))} longer${time}`;
  }
}
