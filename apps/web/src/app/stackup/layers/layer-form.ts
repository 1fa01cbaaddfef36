import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import type { Layer } from '@tollgate/contracts';
import { PickEntry } from '../../channel/entries/pick-entry';
import { QuantityEntry } from '../../channel/entries/quantity-entry';
import { TextEntry } from '../../channel/entries/text-entry';
import { WrittenEntry } from '../../channel/entries/written-entry';
import { withLayer, withValue } from '../document/layer-edits';
import { heightField, layerFields, type LayerField } from '../document/layer-fields';
import { StackupStore } from '../document/stackup-store';
import type { LayerRow } from '../document/stackup-rows';
import { readPoints, writePoints } from './further-points';

type Copper = Extract<Layer, { kind: 'copper' }>;
type Roughness = NonNullable<Copper['roughness']>;
interface Face {
  readonly model: 'none' | 'hammerstad' | 'groiss' | 'cannonball';
  readonly rqM?: number;
  readonly rzM?: number;
}
type Side = 'foot' | 'top';

interface Field {
  readonly name: LayerField;
  readonly optional: boolean;
}

const dielectricRows: readonly Field[] = [
  { name: 'thicknessToleranceM', optional: true },
  { name: 'dkTolerance', optional: true },
  { name: 'dfTolerance', optional: true },
];
const copperRows: readonly Field[] = [
  { name: 'thicknessToleranceM', optional: true },
  { name: 'widthToleranceM', optional: true },
  { name: 'etchAngleDeg', optional: false },
  { name: 'conductivitySPerM', optional: false },
];
const models = [
  { value: 'none', title: 'Smooth' },
  { value: 'hammerstad', title: 'Hammerstad, by Rq' },
  { value: 'groiss', title: 'Groiss, by Rq' },
  { value: 'cannonball', title: 'Cannonball, by Rz' },
];

/** The rarer values of a layer: tolerances, dispersion and source; of copper its foil, roughness and etching. */
@Component({
  selector: 'tg-layer-form',
  imports: [PickEntry, QuantityEntry, TextEntry, WrittenEntry],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './layer-form.html',
  styleUrl: './layer-form.scss',
})
export class LayerForm {
  protected readonly store = inject(StackupStore);

  readonly row = input.required<LayerRow>();
  /** Of the layer in the stackup. */
  readonly path = input.required<string>();

  protected readonly fields = layerFields;
  protected readonly heightField = heightField;
  protected readonly models = models;
  protected readonly sides = ['foot', 'top'] as const;
  protected readonly sideTitles = { foot: 'Foot (bonded face)', top: 'Top face' } as const;
  protected readonly dispersions = [
    { value: 'wideband-debye', title: 'wideband Debye' },
    { value: 'constant', title: 'constant' },
  ];
  protected readonly foilSides = [
    { value: 'down', title: 'down' },
    { value: 'up', title: 'up' },
  ];

  protected readonly layer = computed(() => this.row().layer);
  protected readonly copper = computed(() => {
    const layer = this.layer();
    return layer.kind === 'copper' ? layer : undefined;
  });
  protected readonly dielectric = computed(() => {
    const layer = this.layer();
    return layer.kind === 'copper' ? undefined : layer;
  });
  protected readonly quantities = computed(() => (this.copper() ? copperRows : dielectricRows));
  protected readonly faces = computed((): Record<Side, Face> | undefined => {
    const roughness = this.copper()?.roughness;
    return roughness && facesOf(roughness);
  });

  protected readonly readPoints = readPoints;
  protected readonly pointsText = computed(() => writePoints(this.dielectric()?.furtherPoints));

  protected value(name: LayerField): number | undefined {
    return (this.layer() as unknown as Record<string, number | undefined>)[name];
  }

  protected set(
    field: LayerField | 'dispersion' | 'foilSide' | 'furtherPoints' | 'source',
    value: unknown,
  ): void {
    this.change(field, (layer) => withValue(layer, field, value));
  }

  protected setModel(side: Side, model: string | undefined): void {
    if (model === undefined) {
      this.change('roughness', (layer) => withValue(layer, 'roughness', undefined));
      return;
    }
    const before = this.faces()?.[side];
    const heightM = before?.rzM ?? (before?.rqM ?? 0.4e-6) * rzPerRq;
    this.setFace(side, faceOf(model as Face['model'], heightM));
  }

  protected setHeight(side: Side, heightM: number | undefined): void {
    const face = this.faces()?.[side];
    if (!face || heightM === undefined) return;
    this.setFace(
      side,
      face.model === 'cannonball' ? { model: face.model, rzM: heightM } : { model: face.model, rqM: heightM },
    );
  }

  private setFace(side: Side, face: Face): void {
    const smooth: Face = { model: 'none' };
    const faces = { ...(this.faces() ?? { foot: smooth, top: smooth }), [side]: face };
    this.change(`roughness ${side}`, (layer) => withValue(layer, 'roughness', faces));
  }

  private change(key: string, change: (layer: Layer) => Layer): void {
    const row = this.row().key;
    this.store.edit((stackup) => withLayer(stackup, row, change), `${row} ${key}`);
  }
}

/** Rz is about five times Rq (common practice): what the other height becomes when the model is changed. */
const rzPerRq = 5;

function faceOf(model: Face['model'], rzM: number): Face {
  if (model === 'none') return { model };
  return model === 'cannonball' ? { model, rzM } : { model, rqM: rzM / rzPerRq };
}

function facesOf(roughness: Roughness): Record<Side, Face> {
  return 'foot' in roughness ? roughness : { foot: roughness, top: roughness };
}
