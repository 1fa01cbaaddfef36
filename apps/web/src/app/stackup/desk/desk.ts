import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { PickEntry } from '../../channel/entries/pick-entry';
import { QuantityEntry } from '../../channel/entries/quantity-entry';
import { StackupStore } from '../document/stackup-store';
import { deskFields, type DeskQuestion } from './desk-question';
import { DeskRunner } from './desk-runner';
import { figureRows, percent } from './figure-rows';
import { SectionDrawing } from './section-drawing';
import { SensitivityTable } from './sensitivity-table';
import { SynthesisForm } from './synthesis-form';

/** The cross-section desk: a trace or pair on a layer, its section in scale, and what the field solution says of it. */
@Component({
  selector: 'tg-desk',
  imports: [PickEntry, QuantityEntry, SectionDrawing, SensitivityTable, SynthesisForm],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './desk.html',
  styleUrl: './desk.scss',
})
export class Desk {
  protected readonly runner = inject(DeskRunner);
  protected readonly store = inject(StackupStore);

  protected readonly fields = deskFields;
  protected readonly forms = [
    { value: 'single', title: 'Single trace' },
    { value: 'pair', title: 'Edge-coupled pair' },
  ];
  protected readonly layerPicks = computed(() =>
    this.store.signalLayers().map((name) => ({ value: name, title: name })),
  );
  protected readonly rows = computed(() => {
    const section = this.runner.section();
    return section ? figureRows(section) : [];
  });
  protected readonly standing = computed(() => {
    const section = this.runner.section();
    if (!section) return '';
    const { standing, solver } = section;
    const mesh = solver
      ? `, mesh error ${(solver.errorZ0 * 100).toFixed(2)} %, ${solver.unknowns} unknowns`
      : '';
    return `${standing}${mesh}`;
  });
  protected readonly closedNote = computed(() => {
    const section = this.runner.section();
    if (!section) return '';
    if (section.closedForm && section.differencePercent !== null)
      return `Closed form: ${section.closedForm.source}; ${percent(section.differencePercent / 100)} from the solution.`;
    return `No closed form: ${section.closedFormReason ?? 'none is listed'}`;
  });

  protected set(change: Partial<DeskQuestion>): void {
    this.runner.change(change);
  }

  protected setForm(form: string | undefined): void {
    this.set({ gapM: form === 'pair' ? 150e-6 : undefined });
  }
}
