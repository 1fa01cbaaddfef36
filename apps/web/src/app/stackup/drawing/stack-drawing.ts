import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { formatQuantity } from '@tollgate/quantities';
import { StackupStore } from '../document/stackup-store';
import { drawnStack } from './stack-scale';

/** The stackup in scale: copper, dielectrics and mask from top to bottom, with names and thicknesses; each name selects its layer. */
@Component({
  selector: 'tg-stack-drawing',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @if (stack(); as stack) {
      <figure>
        <div class="names" [style.height.px]="stack.heightPx">
          @for (layer of rows(); track layer.key) {
            <button
              type="button"
              [style.top.px]="layer.labelPx - 9"
              [class.selected]="layer.selected"
              [attr.aria-pressed]="layer.selected"
              [attr.aria-label]="'Select ' + layer.name + ', ' + layer.thickness"
              [title]="layer.name"
              (click)="store.select(layer.key)"
            >
              {{ layer.name }}
            </button>
          }
        </div>
        <svg
          [attr.viewBox]="'0 0 100 ' + stack.heightPx"
          [style.height.px]="stack.heightPx"
          preserveAspectRatio="none"
          role="img"
          [attr.aria-label]="words()"
        >
          @for (layer of rows(); track layer.key) {
            <g [attr.data-kind]="layer.kind" [class.selected]="layer.selected">
              @if (layer.kind === 'signal') {
                @if (!layer.outer) {
                  <rect
                    class="beside"
                    x="12"
                    width="76"
                    [attr.y]="layer.yPx"
                    [attr.height]="layer.heightPx"
                  />
                }
                @for (x of traces; track x) {
                  <rect
                    class="copper"
                    [attr.x]="x"
                    width="9"
                    [attr.y]="layer.yPx"
                    [attr.height]="layer.heightPx"
                  />
                }
              } @else {
                <rect class="sheet" x="12" width="76" [attr.y]="layer.yPx" [attr.height]="layer.heightPx" />
              }
              <path [attr.d]="layer.leaders" />
              @if (layer.selected) {
                <rect
                  class="mark"
                  x="11"
                  width="78"
                  [attr.y]="layer.yPx - 1"
                  [attr.height]="layer.heightPx + 2"
                />
              }
            </g>
          }
        </svg>
        <div class="figures" aria-hidden="true" [style.height.px]="stack.heightPx">
          @for (layer of rows(); track layer.key) {
            <span [style.top.px]="layer.labelPx - 9" [class.selected]="layer.selected">{{
              layer.thickness
            }}</span>
          }
        </div>
      </figure>
    }
  `,
  styleUrl: './stack-drawing.scss',
})
export class StackDrawing {
  protected readonly store = inject(StackupStore);

  protected readonly traces = [18, 45.5, 73] as const;
  protected readonly stack = computed(() => {
    const layers = this.store.stackup()?.layers;
    return layers?.length ? drawnStack(layers) : undefined;
  });
  protected readonly rows = computed(() =>
    (this.store.rows()?.rows ?? []).flatMap(({ key, layer }, i) => {
      const drawn = this.stack()?.layers[i];
      if (!drawn) return [];
      const middle = drawn.yPx + drawn.heightPx / 2;
      return [
        {
          ...drawn,
          key,
          thickness: formatQuantity(layer.thicknessM, 'length', { digits: 4 }),
          selected: key === this.store.selectedKey(),
          leaders: `M0 ${drawn.labelPx}L12 ${middle}M88 ${middle}L100 ${drawn.labelPx}`,
        },
      ];
    }),
  );
  protected readonly words = computed(() => {
    const parts = this.rows().map(({ name, kind, thickness }) => `${name}, ${kind}, ${thickness}`);
    return `Stackup in scale, from top to bottom: ${parts.join('; ')}`;
  });
}
