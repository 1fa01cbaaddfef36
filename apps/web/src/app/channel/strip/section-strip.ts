import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { ChannelStore } from '../document/channel-store';
import { CheckRunner } from '../document/check-runner';
import { callOf } from '../elements/element-words';
import { sectionLayout, type Room } from './section-layout';

const room: Room = { width: 640, top: 38, height: 74, impedanceTop: 8, impedanceHeight: 20 };

/** The channel unrolled over its stackup in scale: traces on their layers, barrels across them, stubs hanging off. */
@Component({
  selector: 'tg-section-strip',
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './section-strip.html',
  styleUrl: './section-strip.scss',
})
export class SectionStrip {
  private readonly check = inject(CheckRunner);
  protected readonly store = inject(ChannelStore);
  protected readonly room = room;

  readonly differential = input.required<boolean>();

  protected readonly layout = computed(() => {
    const [document, view] = [this.store.document(), this.check.view()];
    // A check of other elements says nothing of where these stand.
    if (!document || !view || view.elementDelaysS.length !== document.elements.length) return undefined;
    return sectionLayout(document, view, room);
  });
  protected readonly titles = computed(
    () => new Map((this.store.document()?.elements ?? []).map((element) => [element.id, callOf(element)])),
  );
  protected readonly impedancePath = computed(() =>
    (this.layout()?.impedance ?? []).map(([x, y]) => `${x.toFixed(1)},${y.toFixed(1)}`).join(' '),
  );
  protected readonly impedanceWords = computed(() => {
    const range = this.layout()?.impedanceRange;
    if (!range) return '';
    const [least, most] = range.map((ohm) => Number(ohm.toPrecision(3)));
    return least === most ? `${most} ohm` : `${least} to ${most} ohm`;
  });
}
