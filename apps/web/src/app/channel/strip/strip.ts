import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { formatQuantity } from '@tollgate/quantities';
import { ChannelStore } from '../document/channel-store';
import { CheckRunner } from '../document/check-runner';
import { callOf } from '../elements/element-words';
import { SectionStrip } from './section-strip';
import { stripPieces } from './strip-drawing';

const width = 1000;

/** The channel as a thin drawing from near to far: copper with what stands in it. Each piece selects its element. */
@Component({
  selector: 'tg-strip',
  imports: [SectionStrip],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './strip.html',
  styleUrl: './strip.scss',
})
export class Strip {
  private readonly check = inject(CheckRunner);
  protected readonly store = inject(ChannelStore);

  protected readonly pieces = computed(() => {
    const document = this.store.document();
    if (!document) return [];
    const pieces = stripPieces(document, width);
    return document.elements.map((element, i) => ({ ...pieces[i]!, title: callOf(element) }));
  });
  /** With a stackup the strip is drawn over it in scale; without, the elements stand side by side. */
  protected readonly section = computed(() => {
    const document = this.store.document();
    const view = this.check.view();
    return (
      (document?.stackup?.layers?.length ?? 0) > 0 &&
      (document?.elements ?? []).some(({ kind }) => kind === 'trace' || kind === 'via') &&
      view?.elementDelaysS.length === document?.elements.length
    );
  });
  protected readonly differential = computed(() => this.store.document()?.signaling === 'differential');
  protected readonly ends = computed(() => ({
    from: this.store.document()?.from ?? 'near',
    to: this.store.document()?.to ?? 'far',
  }));
  protected readonly delay = computed(() => {
    const delayS = this.check.view()?.delayS;
    if (typeof delayS !== 'number') return '';
    const along = this.section() ? 'electrical distance in ps, ' : '';
    return `${along}${formatQuantity(delayS, 'time', { digits: 4 })} one way`;
  });
}
