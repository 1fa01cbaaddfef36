import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { PlanBoard } from '../board/plan-board';
import { mm, pathText } from '../drawing/path-text';
import { PlanView } from '../view/plan-view';
import { gridLines, roundStep } from './ground-lines';

/** What the channel is drawn on: grid, edge of the board, and the other channels, dimmed. Renewed when the view moves, not by a drag. */
@Component({
  selector: 'tg-plan-ground',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <svg aria-hidden="true" focusable="false">
      @if (edge(); as edge) {
        <g [attr.transform]="view.transform()"><path class="board" [attr.d]="edge" /></g>
      }
      <path class="fine" [attr.d]="fine()" />
      <path class="coarse" [attr.d]="coarse()" />
      <g [attr.transform]="view.transform()">
        @for (layer of others(); track layer.layer) {
          <path class="other" [attr.data-layer]="layer.layer" [attr.d]="layer.line" />
        }
        <path class="other-part" [attr.d]="otherParts()" />
        @if (edge(); as edge) {
          <path class="edge" [attr.d]="edge" />
        }
      </g>
    </svg>
  `,
  styles: `
    :host,
    svg {
      display: block;
      position: absolute;
      inset: 0;
      width: 100%;
      height: 100%;
    }
    path {
      fill: none;
      stroke-linejoin: round;
      vector-effect: non-scaling-stroke;
    }
    .board {
      fill: var(--tg-surface);
    }
    .edge {
      stroke: var(--tg-ink);
      stroke-width: 1.6;
    }
    .fine,
    .coarse {
      stroke: var(--tg-rule);
      stroke-width: 1;
    }
    .fine {
      opacity: 0.38;
    }
    .coarse {
      opacity: 0.8;
    }
    .other {
      stroke: var(--tg-slate);
      stroke-width: 1.6;
      opacity: 0.3;
    }
    .other-part {
      stroke: var(--tg-slate);
      stroke-width: 5;
      stroke-linecap: round;
      opacity: 0.3;
    }
  `,
})
export class PlanGround {
  private readonly board = inject(PlanBoard);
  protected readonly view = inject(PlanView);

  protected readonly edge = computed(() => {
    const corners = this.board.corners();
    return corners.length ? `${pathText(corners)}Z` : '';
  });
  /** All traces of a layer as one path, however many channels there are. */
  protected readonly others = computed(() => {
    const lines = new Map<string, string[]>();
    for (const channel of this.board.others()) {
      for (const { layer, path } of channel.traces) {
        const known = lines.get(layer);
        if (known) known.push(pathText(path));
        else lines.set(layer, [pathText(path)]);
      }
    }
    return [...lines].map(([layer, texts]) => ({ layer, line: texts.join('') }));
  });
  protected readonly otherParts = computed(() =>
    this.board
      .others()
      .flatMap(({ parts }) => parts.map(({ at: [x, y] }) => `M${mm(x)} ${mm(y)}h0`))
      .join(''),
  );
  protected readonly fine = computed(() => this.lines(9));
  protected readonly coarse = computed(() => this.lines(56));

  private lines(leastPx: number): string {
    const { view } = this;
    const stepM = roundStep(view.unit(), view.pxPerM(), leastPx);
    return gridLines(view.origin(), view.size(), view.pxPerM(), stepM);
  }
}
