import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import type { CheckView } from '@tollgate/contracts';
import { formatDb, formatQuantity } from '@tollgate/quantities';

const most = 400;

/** The curves as numbers: every point, or evenly chosen ones where there are very many. */
@Component({
  selector: 'tg-numbers-table',
  changeDetection: ChangeDetectionStrategy.OnPush,
  host: { tabindex: '0', role: 'region', 'aria-label': 'The curves as numbers' },
  template: `
    <table>
      <caption>
        {{
          caption()
        }}
      </caption>
      <thead>
        <tr>
          <th scope="col">Frequency</th>
          <th scope="col">Insertion loss</th>
          <th scope="col">Return loss near</th>
          <th scope="col">Return loss far</th>
        </tr>
      </thead>
      <tbody>
        @for (row of rows(); track row.frequency) {
          <tr>
            <th scope="row">{{ row.frequency }}</th>
            <td>{{ row.through }}</td>
            <td>{{ row.near }}</td>
            <td>{{ row.far }}</td>
          </tr>
        }
      </tbody>
    </table>
  `,
  styles: `
    :host {
      display: block;
      min-height: 0;
      overflow: auto;
    }
    table {
      width: 100%;
      border-collapse: collapse;
      font-size: 14px;
      text-align: right;
    }
    caption {
      color: var(--tg-slate);
      font-size: var(--tg-text-small);
      text-align: left;
    }
    th,
    td {
      padding: 2px 12px 2px 8px;
      font-weight: 400;
    }
    thead th {
      position: sticky;
      top: 0;
      background: var(--tg-surface);
      color: var(--tg-slate);
    }
    tbody tr:hover {
      background: var(--tg-hover);
    }
  `,
})
export class NumbersTable {
  readonly view = input.required<CheckView>();

  private readonly step = computed(() => Math.max(1, Math.ceil(this.view().frequenciesHz.length / most)));
  protected readonly caption = computed(() =>
    this.step() === 1
      ? 'Every point, dB'
      : `Every ${this.step()}th of ${this.view().frequenciesHz.length} points, dB`,
  );
  protected readonly rows = computed(() => {
    const { frequenciesHz, curves } = this.view();
    const db = (value: number | null | undefined) => formatDb(value ?? null, false);
    return frequenciesHz.flatMap((frequencyHz, i) =>
      i % this.step() === 0 || i === frequenciesHz.length - 1
        ? [
            {
              frequency: formatQuantity(frequencyHz, 'frequency', { digits: 6 }),
              through: db(curves.insertionLossDb[i]),
              near: db(curves.returnLossNearDb[i]),
              far: db(curves.returnLossFarDb[i]),
            },
          ]
        : [],
    );
  });
}
