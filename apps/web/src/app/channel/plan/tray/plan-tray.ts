import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { MatMenu, MatMenuItem, MatMenuTrigger } from '@angular/material/menu';
import { elementKinds, kindDescription, type ElementKind } from '@tollgate/contracts';
import { Placing } from '../desk/placing';
import { Pen } from '../desk/pen';
import { PlanDesk } from '../desk/plan-desk';

const first = ['trace', 'via', 'capacitor', 'connector'] as const satisfies readonly ElementKind[];
const short: Readonly<Record<(typeof first)[number], string>> = {
  trace: 'Trace',
  via: 'Via',
  capacitor: 'Capacitor',
  connector: 'Connector',
};
const slackPx = 4;

/** What can be put on the plan: drag it out, or press it to put it at the far end. */
@Component({
  selector: 'tg-plan-tray',
  imports: [MatMenu, MatMenuItem, MatMenuTrigger],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <span role="group" aria-label="Put on the plan">
      @for (kind of first; track kind) {
        <button
          type="button"
          [attr.data-tray]="kind"
          [attr.aria-pressed]="kind === 'trace' ? pen.active() : null"
          [title]="titleOf(kind)"
          (pointerdown)="grab($event, kind)"
          (click)="press(kind)"
        >
          {{ short[kind] }}
        </button>
      }
      <button type="button" [matMenuTriggerFor]="menu">More parts</button>
    </span>
    <mat-menu #menu="matMenu" class="tg-tray">
      @for (kind of rest(); track kind.kind) {
        <button mat-menu-item type="button" [attr.data-tray]="kind.kind" (click)="placing.append(kind.kind)">
          {{ kind.title }}
        </button>
      }
    </mat-menu>
  `,
  styleUrl: '../plan-buttons.scss',
})
export class PlanTray {
  private readonly desk = inject(PlanDesk);
  protected readonly pen = inject(Pen);
  protected readonly placing = inject(Placing);

  /** The part of the screen things are dropped on. */
  readonly stage = input.required<HTMLElement>();

  protected readonly first = first;
  protected readonly short = short;
  protected readonly rest = computed(() => {
    const signaling = this.desk.document()?.signaling;
    return elementKinds.filter(
      ({ kind, use, group }) =>
        (use === 'both' || use === signaling) &&
        group !== 'board' &&
        !(first as readonly string[]).includes(kind) &&
        !['line', 'rlgc-line', 'coupled-line', 'line-pair'].includes(kind),
    );
  });
  /** A drag ends in a click of the button it began on; that one is no press. */
  private dragged = false;

  protected titleOf(kind: ElementKind): string {
    const { summary, prefix } = kindDescription(kind);
    return `${summary}. Drag it onto the plan, or press for the far end (${prefix})`;
  }

  protected press(kind: ElementKind): void {
    if (!this.dragged) {
      this.placing.append(kind);
      this.stage().focus();
    }
    this.dragged = false;
  }

  protected grab(down: PointerEvent, kind: ElementKind): void {
    this.dragged = false;
    if (down.button !== 0) return;
    const stop = new AbortController();
    const over = (event: PointerEvent): readonly [number, number] | undefined => {
      const box = this.stage().getBoundingClientRect();
      const [x, y] = [event.clientX - box.left, event.clientY - box.top];
      return x >= 0 && y >= 0 && x <= box.width && y <= box.height ? [x, y] : undefined;
    };
    const listen = { signal: stop.signal };
    window.addEventListener(
      'pointermove',
      (event) => {
        this.dragged ||= Math.hypot(event.clientX - down.clientX, event.clientY - down.clientY) > slackPx;
        if (this.dragged) this.placing.carry(kind, over(event), event.altKey);
      },
      listen,
    );
    const end = (event: PointerEvent) => {
      stop.abort();
      if (!this.dragged) return;
      this.placing.drop(event.type === 'pointerup' ? over(event) : undefined);
      this.stage().focus();
    };
    window.addEventListener('pointerup', end, listen);
    window.addEventListener('pointercancel', end, listen);
  }
}
