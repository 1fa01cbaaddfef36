import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import type { CrossSection, Sensitivity } from '@tollgate/contracts';
import { formatQuantity } from '@tollgate/quantities';

const titles: Readonly<Record<Sensitivity['of'], string>> = {
  width: 'Width',
  gap: 'Gap',
  height: 'Thickness',
  dk: 'Dk',
  thickness: 'Copper thickness',
};

/** How the impedance answers to each value it rests on, the strongest first, and what the tolerances come to together. */
@Component({
  selector: 'tg-sensitivity-table',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <h3>What the impedance answers to</h3>
    @if (rows().length) {
      <table aria-label="Sensitivities of the impedance">
        <thead>
          <tr>
            <th scope="col">Value</th>
            <th scope="col" class="end">now</th>
            <th scope="col" class="end">for 1 %</th>
            <th scope="col" class="end">tolerance</th>
          </tr>
        </thead>
        <tbody>
          @for (row of rows(); track row.title + row.layer) {
            <tr>
              <th scope="row">
                {{ row.title }} <span class="faint layer" [title]="row.layer">{{ row.layer }}</span>
              </th>
              <td class="end">{{ row.value }}</td>
              <td class="end">
                <span class="bar" aria-hidden="true" [style.width.px]="row.barPx"></span>{{ row.perPercent }}
              </td>
              <td class="end faint">{{ row.tolerance }}</td>
            </tr>
          }
        </tbody>
      </table>
      <p class="note">{{ together() }}</p>
    } @else {
      <p class="note">{{ section() ? 'Follows in a moment.' : '' }}</p>
    }
  `,
  styleUrl: './sensitivity-table.scss',
})
export class SensitivityTable {
  readonly section = input.required<CrossSection | undefined>();

  private readonly all = computed(() => {
    const size = ({ ohmPerPercent }: Sensitivity) => Math.abs(ohmPerPercent);
    return [...(this.section()?.sensitivities ?? [])].sort((a, b) => size(b) - size(a));
  });
  protected readonly rows = computed(() => {
    const largest = Math.max(...this.all().map(({ ohmPerPercent }) => Math.abs(ohmPerPercent)));
    return this.all().map(({ of, layer, value, ohmPerPercent, toleranceOhm }) => ({
      title: titles[of],
      layer: layer ?? '',
      value: of === 'dk' ? String(value) : formatQuantity(value, 'length', { digits: 4 }),
      perPercent: signed(ohmPerPercent, 3),
      barPx: (Math.abs(ohmPerPercent) / largest) * 34,
      tolerance: toleranceOhm === null ? 'none given' : `± ${toleranceOhm.toFixed(2)} ohm`,
    }));
  });
  protected readonly together = computed(() => {
    const given = this.all().flatMap(({ toleranceOhm }) => toleranceOhm ?? []);
    if (given.length === 0) return "No tolerance is given: the fabricator's are what to enter.";
    const worst = given.reduce((sum, each) => sum + each, 0);
    const root = Math.hypot(...given);
    return `The tolerances given: ± ${worst.toFixed(2)} ohm if all add up, ± ${root.toFixed(2)} ohm as a root of squares (common practice).`;
  });
}

function signed(ohm: number, digits: number): string {
  return `${ohm < 0 ? '\u2212' : '+'}${Math.abs(ohm).toFixed(digits)} ohm`;
}
