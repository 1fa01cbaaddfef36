import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { sentence } from './server-errors';
import type { FormFailure as Failure } from './submission';

/** What went wrong with the whole form, above its button. The live region is always there. */
@Component({
  selector: 'tg-form-failure',
  changeDetection: ChangeDetectionStrategy.OnPush,
  host: { role: 'alert' },
  template: `
    @if (failure(); as failure) {
      <div class="box">
        <p>{{ failure.text }}</p>
        @if (failure.trace) {
          <p class="trace">Noted in the log as {{ failure.trace }}</p>
        }
        @if (failure.others.length) {
          <ul>
            @for (field of failure.others; track $index) {
              <li>
                @if (field.path) {
                  <code>{{ field.path }}</code>
                }
                {{ sentence(field) }}
              </li>
            }
          </ul>
        }
      </div>
    }
  `,
  styles: `
    :host {
      display: block;
    }
    .box {
      padding: 2px 0 2px var(--tg-space-3);
      border-left: 3px solid var(--tg-oxide);
      overflow-wrap: anywhere;
    }
    .trace {
      color: var(--tg-slate);
      font-size: var(--tg-text-small);
    }
    ul {
      margin: var(--tg-space-1) 0 0;
      padding-left: 18px;
    }
  `,
})
export class FormFailure {
  readonly failure = input.required<Failure | undefined>();
  protected readonly sentence = sentence;
}
