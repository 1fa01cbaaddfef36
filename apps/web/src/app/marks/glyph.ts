import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';

/** Line drawings on a 16 x 16 field. */
const drawings = {
  menu: 'M2 4.5h12M2 8h12M2 11.5h12',
  close: 'M3.5 3.5l9 9M12.5 3.5l-9 9',
  add: 'M8 3v10M3 8h10',
  up: 'M4 10l4-4 4 4',
  down: 'M4 6l4 4 4-4',
  next: 'M6 3.5l4.5 4.5L6 12.5',
  more: 'M3 8h.01M8 8h.01M13 8h.01',
  search: 'M7 11.5a4.5 4.5 0 1 0 0-9 4.5 4.5 0 0 0 0 9ZM10.4 10.4 14 14',
  edit: 'M3 13l.7-2.9L11 2.8l2.2 2.2-7.3 7.3L3 13Z',
  undo: 'M5.5 3 2.5 6l3 3M3 6h6.2a4 4 0 1 1 0 8H6',
  redo: 'M10.5 3l3 3-3 3M13 6H6.8a4 4 0 1 0 0 8H10',
  file: 'M4 1.8h5L12.5 5v9.2H4ZM9 1.8V5h3.5',
  arrowUp: 'M8 13V3.5M4 7.2l4-4 4 4',
  arrowDown: 'M8 3v9.5M4 8.8l4 4 4-4',
} as const;
export type GlyphName = keyof typeof drawings;

/** A small line drawing in the colour of its text. Decorative: its button or link carries the name. */
@Component({
  selector: 'tg-glyph',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <svg viewBox="0 0 16 16" aria-hidden="true" focusable="false"><path [attr.d]="drawing()" /></svg>
  `,
  styles: `
    :host {
      display: inline-flex;
      flex: none;
      vertical-align: -0.15em;
    }
    svg {
      width: var(--tg-glyph-size, 16px);
      height: var(--tg-glyph-size, 16px);
      fill: none;
      stroke: currentcolor;
      stroke-width: 1.7;
      stroke-linecap: round;
      stroke-linejoin: round;
    }
  `,
})
export class Glyph {
  readonly name = input.required<GlyphName>();
  protected readonly drawing = computed(() => drawings[this.name()]);
}
