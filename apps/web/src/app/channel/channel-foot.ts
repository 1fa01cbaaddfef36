import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { formatQuantity } from '@tollgate/quantities';
import { ChannelStore } from './document/channel-store';
import { CheckRunner } from './document/check-runner';

/** The line at the foot: which limits, on which ground, how far the weakest model can be trusted. */
@Component({
  selector: 'tg-channel-foot',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <span class="masks" [title]="masks()">{{ masks() }}</span>
    <span>{{ ground() }}</span>
    @if (view(); as view) {
      <span>weakest standing: {{ view.weakestStanding }} ({{ view.weakestElement }})</span>
      <span class="engine">engine {{ view.engine }}</span>
      <a [href]="sheet()" download title="The recorded check on paper, unsigned">Check sheet (PDF)</a>
    }
  `,
  styles: `
    :host {
      display: flex;
      flex: none;
      flex-wrap: wrap;
      gap: 0 var(--tg-space-5);
      padding: 4px var(--tg-space-4) 5px;
      border-top: 1px solid var(--tg-rule);
      color: var(--tg-slate);
      font-size: var(--tg-text-small);
      font-variant-numeric: tabular-nums;
    }
    .masks {
      flex: 1 1 300px;
      overflow: hidden;
      text-overflow: ellipsis;
      white-space: nowrap;
    }
  `,
})
export class ChannelFoot {
  private readonly store = inject(ChannelStore);
  protected readonly view = inject(CheckRunner).view;

  /** The server's own page, of the check that is recorded. */
  protected readonly sheet = computed(() => `/api/channels/${this.store.channel()?.id ?? ''}/sheet`);
  protected readonly masks = computed(() => {
    const titles = this.store.document()?.limits.map((limit) => limit.title) ?? [];
    return titles.length ? `Mask: ${titles.join('; ')}` : 'No limit yet';
  });
  protected readonly ground = computed(() => {
    const view = this.view();
    return [
      view ? `${view.frequenciesHz.length} points` : '',
      view?.temperatureC === undefined ? '' : `${view.temperatureC} °C`,
      view?.nyquistHz === undefined
        ? ''
        : `Nyquist ${formatQuantity(view.nyquistHz, 'frequency', { digits: 8 })}`,
    ]
      .filter(Boolean)
      .join(', ');
  });
}
