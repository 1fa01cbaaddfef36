import { ChangeDetectionStrategy, Component, computed, ElementRef, inject, output } from '@angular/core';
import { PlanDesk } from '../desk/plan-desk';
import { placeWords } from '../desk/plan-words';
import { planLayout } from '../layout/plan-layout';
import { PlanBoard } from '../board/plan-board';

interface Line {
  readonly key: string;
  readonly id: string;
  readonly vertex: number | undefined;
  readonly text: string;
}

/** The plan in words, near to far, with the vertices of the selected trace: read, walked and moved by keyboard. */
@Component({
  selector: 'tg-plan-outline',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <h3 id="plan-outline">Plan in words</h3>
    <p class="tg-visually-hidden" id="plan-outline-keys">
      Page up and page down walk, arrows move by the grid, with Shift by ten; Enter edits, Delete removes.
    </p>
    <ol data-plan-keys aria-labelledby="plan-outline" aria-describedby="plan-outline-keys">
      @for (line of lines(); track line.key) {
        <li>
          <button
            type="button"
            [class.vertex]="line.vertex !== undefined"
            [attr.data-line]="line.key"
            [attr.aria-current]="line.key === held() ? 'true' : null"
            [attr.tabindex]="line.key === held() ? 0 : -1"
            (focus)="desk.select(line.id, line.vertex)"
            (click)="desk.select(line.id, line.vertex)"
            (keydown)="walk($event, line.key)"
          >
            {{ line.text }}
          </button>
        </li>
      }
    </ol>
  `,
  styleUrl: './plan-outline.scss',
})
export class PlanOutline {
  private readonly board = inject(PlanBoard);
  private readonly host = inject<ElementRef<HTMLElement>>(ElementRef);
  protected readonly desk = inject(PlanDesk);

  /** Enter on a line. */
  readonly edited = output<void>();

  /** Of what is written, not of a drag on its way. */
  protected readonly lines = computed((): Line[] => {
    const document = this.desk.store.document();
    if (!document) return [];
    const { view } = this.desk;
    const selected = this.desk.store.selectedId();
    return planLayout(document, this.board.box()).items.flatMap((item): Line[] => {
      const text = placeWords(item, document.elements[item.index]!, view);
      const line = { key: item.id, id: item.id, vertex: undefined, text };
      if (item.body !== 'trace' || !item.drawn || item.id !== selected) return [line];
      const vertices = item.points.map(([x, y], vertex) => ({
        key: `${item.id} ${vertex}`,
        id: item.id,
        vertex,
        text: `vertex ${vertex + 1} of ${item.points.length}: ${view.number(x)}, ${view.written(y)}`,
      }));
      return [line, ...vertices];
    });
  });
  protected readonly held = computed(() => {
    const grip = this.desk.grip() ?? { id: this.desk.store.selectedId() ?? '' };
    const key = grip.vertex === undefined ? grip.id : `${grip.id} ${grip.vertex}`;
    return this.lines().some((line) => line.key === key) ? key : this.desk.store.selectedId();
  });

  protected walk(event: KeyboardEvent, key: string): void {
    const lines = this.lines();
    const now = lines.findIndex((line) => line.key === key);
    const to: Readonly<Record<string, number>> = {
      PageDown: now + 1,
      PageUp: now - 1,
      Home: 0,
      End: lines.length - 1,
    };
    const next = lines[to[event.key] ?? -1];
    if (event.key in to) {
      event.preventDefault();
      if (next) this.focus(next.key);
    } else if (event.key === 'Enter') {
      event.preventDefault();
      this.edited.emit();
    }
  }

  /** Keeps the keyboard on what is held after an edit renewed the list. */
  focus(key = this.held()): void {
    const button = this.host.nativeElement.querySelector<HTMLElement>(
      `[data-line="${CSS.escape(key ?? '')}"]`,
    );
    button?.focus();
  }
}
