import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import type { CrossSection } from '@tollgate/contracts';
import { formatQuantity } from '@tollgate/quantities';
import { pictureOf } from './section-picture';

const kindWords: Readonly<Record<CrossSection['kind'], string>> = {
  microstrip: 'Microstrip',
  'coated-microstrip': 'Microstrip under solder mask',
  'embedded-microstrip': 'Embedded microstrip',
  stripline: 'Strip line',
};

/** The cross-section in scale: planes, sheets, the etched copper and the mask over it, with width and gap. */
@Component({
  selector: 'tg-section-drawing',
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './section-drawing.html',
  styleUrl: './section-drawing.scss',
})
export class SectionDrawing {
  readonly section = input.required<CrossSection>();
  readonly widthM = input.required<number>();
  readonly gapM = input.required<number | undefined>();

  protected readonly picture = computed(() => pictureOf(this.section()));
  protected readonly widthWords = computed(() => formatQuantity(this.widthM(), 'length', { digits: 4 }));
  protected readonly gapWords = computed(() => {
    const gapM = this.gapM();
    return gapM === undefined ? '' : formatQuantity(gapM, 'length', { digits: 4 });
  });
  protected readonly words = computed(() => {
    const { kind, planes, pair } = this.section();
    const found = [planes.above, planes.below].filter((name) => name !== null);
    const gap = pair ? `, gap ${this.gapWords()}` : '';
    return `${kindWords[kind]}${pair ? ', a pair' : ''}, width ${this.widthWords()}${gap}; returns on ${found.join(' and ')}`;
  });
}
