import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { CheckRunner } from '../document/check-runner';
import { modelLines } from './model-lines';

/** What a trace or via was computed from: impedances, planes, stubs, notch, mesh error. */
@Component({
  selector: 'tg-model-note',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @if (lines().length) {
      <h3>What it was computed from</h3>
      @for (line of lines(); track $index) {
        <p>{{ line }}</p>
      }
    }
  `,
  styles: `
    h3 {
      margin: 10px 0 2px;
      padding-top: 8px;
      border-top: 1px solid var(--tg-rule);
      font-size: var(--tg-text-small);
    }
    p {
      margin: 2px 0;
      color: var(--tg-slate);
      font-size: var(--tg-text-small);
    }
  `,
})
export class ModelNote {
  private readonly check = inject(CheckRunner);

  readonly element = input.required<string>();

  protected readonly lines = computed(() => {
    const model = this.check.view()?.models.find((each) => each.element === this.element());
    return model ? modelLines(model) : [];
  });
}
