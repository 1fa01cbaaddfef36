import { ChangeDetectionStrategy, Component } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatDialogModule } from '@angular/material/dialog';

interface Shortcut {
  readonly keys: readonly string[];
  readonly does: string;
}

const groups: readonly { readonly title: string; readonly shortcuts: readonly Shortcut[] }[] = [
  {
    title: 'Look',
    shortcuts: [
      { keys: ['+', '-'], does: 'Zoom in and out; the wheel and a pinch do too' },
      { keys: ['0'], does: 'Show all of it' },
      { keys: ['arrows'], does: 'Move the view while nothing is held; Space and a drag do too' },
      { keys: ['?'], does: 'This page' },
    ],
  },
  {
    title: 'Put on the plan, at the far end',
    shortcuts: [
      { keys: ['T'], does: 'Draw a trace' },
      { keys: ['V'], does: 'A via; while drawing, a via at the pen and on with the next layer' },
      { keys: ['C'], does: 'A capacitor' },
      { keys: ['J'], does: 'A connector' },
    ],
  },
  {
    title: 'While drawing a trace',
    shortcuts: [
      { keys: ['arrows'], does: 'Move the pen by the grid, with Shift by ten' },
      { keys: ['Enter'], does: 'Set a corner; a second time at the same place ends the trace' },
      { keys: ['Backspace'], does: 'Take the last corner back' },
      { keys: ['Esc'], does: 'Give the trace up' },
    ],
  },
  {
    title: 'Hold and change',
    shortcuts: [
      { keys: ['.', ','], does: 'The next element or vertex, and the one before' },
      { keys: ['arrows'], does: 'Move what is held by the grid, with Shift by ten' },
      { keys: ['I'], does: 'A vertex in the middle of the next piece' },
      { keys: ['R', 'Shift R'], does: 'Turn a part by 45 degrees, and back' },
      { keys: ['L', 'Shift L'], does: 'A trace to the next signal layer, with the vias it needs, and back' },
      { keys: ['Enter'], does: 'Edit the fields' },
      { keys: ['Delete'], does: 'Remove the vertex or the element' },
      { keys: ['Esc'], does: 'Let go; while dragging, as if it never began' },
      { keys: ['Alt'], does: 'Held while dragging: no grid, no alignment' },
    ],
  },
  {
    title: 'Everywhere on the channel',
    shortcuts: [
      { keys: ['Ctrl Z', 'Ctrl Shift Z'], does: 'Undo and redo' },
      { keys: ['Alt up', 'Alt down'], does: 'In the list of elements: to another place' },
    ],
  },
];

/** Every key the plan knows. */
@Component({
  selector: 'tg-plan-shortcuts',
  imports: [MatButton, MatDialogModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <h2 mat-dialog-title>Keys of the plan</h2>
    <mat-dialog-content tabindex="0" role="region" aria-label="Keys of the plan">
      @for (group of groups; track group.title) {
        <h3>{{ group.title }}</h3>
        <dl>
          @for (shortcut of group.shortcuts; track shortcut.does) {
            <div>
              <dt>
                @for (key of shortcut.keys; track key) {
                  <kbd>{{ key }}</kbd>
                }
              </dt>
              <dd>{{ shortcut.does }}</dd>
            </div>
          }
        </dl>
      }
    </mat-dialog-content>
    <mat-dialog-actions>
      <button matButton="filled" type="button" mat-dialog-close>Close</button>
    </mat-dialog-actions>
  `,
  styles: `
    h3 {
      margin-top: var(--tg-space-3);
    }
    dl {
      margin: var(--tg-space-1) 0 0;
    }
    dl div {
      display: grid;
      grid-template-columns: 150px 1fr;
      gap: var(--tg-space-3);
      padding: 2px 0;
    }
    dd {
      margin: 0;
    }
    kbd {
      display: inline-block;
      margin-right: 4px;
      padding: 0 6px;
      border: 1px solid var(--tg-rule);
      border-radius: var(--tg-radius);
      background: var(--tg-ground);
      font: inherit;
      font-size: var(--tg-text-small);
    }
    @media (max-width: 560px) {
      dl div {
        grid-template-columns: 1fr;
        gap: 0;
      }
    }
  `,
})
export class PlanShortcuts {
  protected readonly groups = groups;
}
