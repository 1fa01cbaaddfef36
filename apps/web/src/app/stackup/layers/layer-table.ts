import {
  afterNextRender,
  ChangeDetectionStrategy,
  Component,
  computed,
  ElementRef,
  inject,
  Injector,
} from '@angular/core';
import type { Layer } from '@tollgate/contracts';
import { formatQuantity } from '@tollgate/quantities';
import { PickEntry } from '../../channel/entries/pick-entry';
import { QuantityEntry } from '../../channel/entries/quantity-entry';
import { TextEntry } from '../../channel/entries/text-entry';
import { Glyph } from '../../marks/glyph';
import {
  kindOf,
  layerKinds,
  layerKindTitles,
  withDuplicate,
  withKind,
  withLayer,
  withMoved,
  withNew,
  without,
  withValue,
  type Edited,
  type LayerKind,
} from '../document/layer-edits';
import { layerFields, type LayerField } from '../document/layer-fields';
import { roughnessWords } from '../document/differences';
import { StackupStore } from '../document/stackup-store';
import type { StackupRows } from '../document/stackup-rows';
import { LayerForm } from './layer-form';

/** The layers from top to bottom: each value typed with its unit, what is rarer in the row that opens below. */
@Component({
  selector: 'tg-layer-table',
  imports: [Glyph, LayerForm, PickEntry, QuantityEntry, TextEntry],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './layer-table.html',
  styleUrl: './layer-table.scss',
})
export class LayerTable {
  private readonly host = inject<ElementRef<HTMLElement>>(ElementRef);
  private readonly injector = inject(Injector);
  protected readonly store = inject(StackupStore);

  protected readonly fields = layerFields;
  protected readonly kinds = layerKinds;
  protected readonly kindTitles = layerKindTitles;
  protected readonly kindPicks = layerKinds.map((value) => ({ value, title: layerKindTitles[value] }));

  protected readonly rows = computed(() =>
    (this.store.rows()?.rows ?? []).map(({ key, layer }, i) => ({
      key,
      layer,
      kind: kindOf(layer),
      dielectric: layer.kind === 'copper' ? undefined : layer,
      foil: layer.kind === 'copper' ? foilWords(layer) : '',
      tolerances: toleranceWords(layer),
      path: `layers[${i}]`,
      wrong: this.problemsOf(`layers[${i}]`),
      number: i + 1,
      selected: key === this.store.selectedKey(),
    })),
  );
  protected readonly layersProblem = computed(() => this.store.problemAt('layers'));
  protected readonly summary = computed(() => {
    const layers = this.store.stackup()?.layers ?? [];
    const copper = layers.filter(({ kind }) => kind === 'copper').length;
    const thicknessM = layers.reduce((sum, layer) => sum + layer.thicknessM, 0);
    return `${copper} copper layer${copper === 1 ? '' : 's'}, ${formatQuantity(thicknessM, 'length', { unit: 'mm', digits: 4 })}`;
  });

  private problemsOf(path: string): string[] {
    const mine = this.store.problems().filter((problem) => problem.path.startsWith(`${path}.`));
    return mine.map(({ message, mend }) => [message, mend].filter(Boolean).join(' '));
  }

  protected rename(key: string, name: string | undefined): void {
    this.change(key, 'name', name ?? '');
  }

  protected setKind(key: string, kind: string | undefined): void {
    this.store.edit((stackup) => withLayer(stackup, key, (layer) => withKind(layer, kind as LayerKind)));
  }

  protected change(key: string, field: LayerField | 'name', value: unknown): void {
    this.store.edit(
      (stackup) => withLayer(stackup, key, (layer) => withValue(layer, field, value)),
      `${key} ${field}`,
    );
  }

  protected add(kind: LayerKind): void {
    this.insert((stackup) => withNew(stackup, kind, this.store.selectedKey()));
  }

  protected duplicate(key: string): void {
    this.insert((stackup) => withDuplicate(stackup, key));
  }

  protected move(key: string, by: -1 | 1): void {
    this.store.edit((stackup) => withMoved(stackup, key, by));
    this.choose(key);
  }

  protected remove(key: string): void {
    const keys = this.rows().map((row) => row.key);
    const neighbour = keys[keys.indexOf(key) + 1] ?? keys[keys.indexOf(key) - 1];
    this.store.edit((stackup) => without(stackup, key));
    if (neighbour) this.choose(neighbour);
  }

  protected toggle(key: string): void {
    this.store.select(this.store.selectedKey() === key ? undefined : key);
  }

  /** Of the button in front of a row: arrows walk, with Alt they move the layer; Delete removes it. */
  protected key(event: KeyboardEvent, key: string, index: number): void {
    const step = event.key === 'ArrowDown' ? 1 : event.key === 'ArrowUp' ? -1 : 0;
    if (step !== 0) {
      event.preventDefault();
      if (event.altKey) this.move(key, step);
      else this.focus(this.rows()[index + step]?.key);
    } else if (event.key === 'Delete') {
      event.preventDefault();
      this.remove(key);
    }
  }

  private insert(make: (stackup: StackupRows) => Edited): void {
    let key = '';
    this.store.edit((stackup) => {
      const edited = make(stackup);
      key = edited.key;
      return edited.stackup;
    });
    this.choose(key);
  }

  private choose(key: string): void {
    this.store.select(key);
    afterNextRender(() => this.focus(key), { injector: this.injector });
  }

  private focus(key: string | undefined): void {
    const button = this.host.nativeElement.querySelector<HTMLElement>(`[data-layer="${key}"] .number`);
    button?.focus();
    button?.scrollIntoView?.({ block: 'nearest' });
  }
}

function foilWords(layer: Extract<Layer, { kind: 'copper' }>): string {
  const rough = layer.roughness
    ? roughnessWords(layer.roughness)
        .replaceAll('cannonball ', '')
        .replace(/Rz (\S+) um, top Rz /, 'Rz $1 / ')
    : 'smooth assumed';
  return `foot ${layer.foilSide}, ${rough.replace(/^foot /, '')}, etch ${layer.etchAngleDeg}°`;
}

function toleranceWords(layer: Layer): string {
  const length = (value: number) => formatQuantity(value, 'length', { digits: 3 });
  const parts = [
    layer.thicknessToleranceM === undefined ? '' : length(layer.thicknessToleranceM),
    layer.kind !== 'copper' && layer.dkTolerance !== undefined ? `Dk ${layer.dkTolerance}` : '',
    layer.kind === 'copper' && layer.widthToleranceM !== undefined
      ? `w ${length(layer.widthToleranceM)}`
      : '',
  ].filter(Boolean);
  return parts.length ? `± ${parts.join(', ')}` : '';
}
