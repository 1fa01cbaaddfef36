import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { Trail, type Step } from './trail';

/**
 * The frame of an ordinary page: trail, heading, a line of facts (`[tgPageNote]`), actions (`[tgPageActions]`) and the
 * content within the page's width. Screens that are instruments lay themselves out without it.
 */
@Component({
  selector: 'tg-page',
  imports: [Trail],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @if (trail().length) {
      <tg-trail [steps]="trail()" />
    }
    <header>
      <div class="words">
        <h1>{{ heading() }}</h1>
        <ng-content select="[tgPageNote]" />
      </div>
      <div class="actions"><ng-content select="[tgPageActions]" /></div>
    </header>
    <ng-content />
  `,
  styles: `
    :host {
      display: block;
      width: 100%;
      max-width: calc(var(--tg-page-width) + 2 * var(--tg-gutter));
      margin: 0 auto;
      padding: var(--tg-space-5) var(--tg-gutter) var(--tg-space-7);
    }
    tg-trail {
      margin-bottom: var(--tg-space-1);
      font-size: var(--tg-text-small);
    }
    header {
      display: flex;
      flex-wrap: wrap;
      align-items: flex-start;
      gap: var(--tg-space-3) var(--tg-space-5);
      min-height: 40px;
      margin-bottom: var(--tg-space-5);
    }
    .words {
      flex: 1 1 320px;
      padding-top: 3px;
      min-width: 0;
      overflow-wrap: anywhere;
    }
    .actions {
      display: flex;
      flex-wrap: wrap;
      gap: var(--tg-space-2);
    }
    .actions:empty {
      display: none;
    }
  `,
})
export class Page {
  readonly heading = input.required<string>();
  readonly trail = input<readonly Step[]>([]);
}
