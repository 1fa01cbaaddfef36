import { ChangeDetectionStrategy, Component, computed, inject, linkedSignal, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import type { FieldProblem, Synthesis } from '@tollgate/contracts';
import { formatQuantity } from '@tollgate/quantities';
import { ApiClient } from '../../api/api-client';
import { apiProblemOf } from '../../api/api-problem';
import { PickEntry } from '../../channel/entries/pick-entry';
import { QuantityEntry } from '../../channel/entries/quantity-entry';
import { StackupStore } from '../document/stackup-store';
import { deskFields } from './desk-question';
import { DeskRunner } from './desk-runner';

/** The width for a wanted impedance; of a pair with the gap held, or the gap with the width held. */
@Component({
  selector: 'tg-synthesis-form',
  imports: [MatButton, PickEntry, QuantityEntry],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <form (submit)="find($event)" novalidate>
      <h3>Find a geometry</h3>
      <tg-quantity-entry
        path="targetOhm"
        [label]="pair() ? 'Differential impedance' : 'Impedance'"
        [field]="fields.impedance"
        [value]="target()"
        [problem]="problemAt('targetOhm')"
        (valueChange)="target.set($event ?? target())"
      />
      @if (pair()) {
        <tg-pick-entry
          label="Look for"
          path="lookFor"
          [value]="lookFor()"
          [picks]="choices"
          (valueChange)="lookFor.set($event === 'gap' ? 'gap' : 'width')"
        />
      }
      <button matButton="outlined" type="submit" [disabled]="busy()">
        {{ pair() && lookFor() === 'gap' ? 'Find the gap' : 'Find the width' }}
      </button>
      <div role="status">
        @if (found(); as found) {
          <p class="found">
            <strong>{{ words() }}</strong> gives {{ found.reachedOhm.toFixed(2) }} ohm
          </p>
          <button matButton="filled" type="button" (click)="use(found)">Use it</button>
        } @else if (failure()) {
          <p class="failure">{{ failure() }}</p>
        }
      </div>
    </form>
  `,
  styleUrl: './synthesis-form.scss',
})
export class SynthesisForm {
  private readonly api = inject(ApiClient);
  private readonly runner = inject(DeskRunner);
  private readonly store = inject(StackupStore);

  protected readonly fields = deskFields;
  protected readonly choices = [
    { value: 'width', title: 'the width, gap held' },
    { value: 'gap', title: 'the gap, width held' },
  ];
  protected readonly pair = computed(() => this.runner.question().gapM !== undefined);
  protected readonly target = linkedSignal<number>(() => (this.pair() ? 100 : 50));
  protected readonly lookFor = signal<'width' | 'gap'>('width');
  protected readonly busy = signal(false);
  private readonly problems = signal<readonly FieldProblem[]>([]);
  protected readonly failure = signal('');
  /** What was found for the question as it stands; another question has no answer yet. */
  private readonly reply = linkedSignal<unknown, Synthesis | undefined>({
    source: () => [
      this.store.stackup(),
      this.runner.question().layer,
      this.pair(),
      this.target(),
      this.lookFor(),
    ],
    computation: () => undefined,
  });
  protected readonly found = this.reply.asReadonly();
  protected readonly words = computed(() => {
    const found = this.found();
    if (!found) return '';
    const lengthM = found.found === 'gap' ? found.gapM! : found.widthM;
    const mil = formatQuantity(lengthM, 'length', { unit: 'mil', digits: 4 });
    return `${found.found === 'gap' ? 'Gap' : 'Width'} ${formatQuantity(lengthM, 'length', { unit: 'um', digits: 4 })} (${mil})`;
  });

  protected problemAt(path: string): string {
    const found = this.problems().find((problem) => problem.path === path);
    return found ? [found.message, found.mend].filter(Boolean).join(' ') : '';
  }

  protected find(event: Event): void {
    event.preventDefault();
    const stackup = this.store.stackup();
    if (!stackup || this.busy()) return;
    const { layer, widthM, gapM, frequencyHz } = this.runner.question();
    const held = !this.pair() ? {} : this.lookFor() === 'gap' ? { widthM } : { gapM };
    const body = {
      stackup,
      layer,
      frequencyHz,
      targetOhm: this.target(),
      mode: this.pair() ? 'differential' : 'single',
      ...held,
    };
    this.busy.set(true);
    this.problems.set([]);
    this.failure.set('');
    this.api.post<Synthesis>('/stackups/synthesis', body).subscribe({
      next: (found) => {
        this.busy.set(false);
        this.reply.set(found);
      },
      error: (error: unknown) => {
        this.busy.set(false);
        const { fields, message } = apiProblemOf(error);
        this.problems.set(fields);
        if (!fields.some(({ path }) => path === 'targetOhm')) this.failure.set(fields[0]?.message ?? message);
      },
    });
  }

  protected use({ widthM, gapM }: Synthesis): void {
    this.runner.change({ widthM: rounded(widthM), gapM: gapM === null ? undefined : rounded(gapM) });
  }
}

/** To a hundredth of a micrometre: finer than any board is made. */
function rounded(lengthM: number): number {
  return Number((Math.round(lengthM * 1e8) / 1e8).toPrecision(8));
}
