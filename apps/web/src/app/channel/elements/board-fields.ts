import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import type { ChannelElement } from '@tollgate/contracts';
import { ChannelStore } from '../document/channel-store';
import { PickEntry, type Pick } from '../entries/pick-entry';
import { WrittenEntry } from '../entries/written-entry';
import type { FieldChange } from './element-quantities';
import { readByLayer, readOffsets, writeByLayer, writeOffsets } from './written-lengths';

type Trace = Extract<ChannelElement, { kind: 'trace' }>;
type Via = Extract<ChannelElement, { kind: 'via' }>;

const nearest = 'nearest';
const none = 'none';

/** Where a trace or via lies in the stackup: its layers, the planes a trace returns on, a via's pads and return vias. */
@Component({
  selector: 'tg-board-fields',
  imports: [PickEntry, WrittenEntry],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './board-fields.html',
})
export class BoardFields {
  private readonly store = inject(ChannelStore);

  readonly element = input.required<Trace | Via>();
  readonly base = input.required<string>();
  readonly disabled = input(false);
  readonly changed = output<FieldChange>();

  protected readonly trace = computed(() => {
    const element = this.element();
    return element.kind === 'trace' ? element : undefined;
  });
  protected readonly via = computed(() => {
    const element = this.element();
    return element.kind === 'via' ? element : undefined;
  });
  private readonly copper = computed(() =>
    (this.store.document()?.stackup?.layers ?? []).filter((layer) => layer.kind === 'copper'),
  );
  protected readonly without = computed(() => this.copper().length === 0);
  protected readonly signals = computed(() =>
    picksOf(
      this.copper()
        .filter(({ role }) => role === 'signal')
        .map(({ name }) => name),
      this.trace()?.layer,
    ),
  );
  protected readonly layers = computed(() =>
    picksOf(
      this.copper().map(({ name }) => name),
      this.via()?.fromLayer,
      this.via()?.toLayer,
    ),
  );
  protected readonly aboves = computed(() => this.planePicks('above'));
  protected readonly belows = computed(() => this.planePicks('below'));

  protected readonly readByLayer = readByLayer;
  protected readonly readOffsets = readOffsets;
  protected readonly padText = computed(() => writeByLayer(this.via()?.padM ?? 0));
  protected readonly antipadText = computed(() => writeByLayer(this.via()?.antipadM ?? 0));
  protected readonly returnText = computed(() => writeOffsets(this.via()?.returnVias));

  protected planeOf(side: 'above' | 'below'): string {
    const named = this.trace()?.planes?.[side];
    return named === null ? none : (named ?? nearest);
  }

  /** Naming a plane on one side names the other too: the file says both or neither. */
  protected setPlane(side: 'above' | 'below', picked: string | undefined): void {
    const both = { above: this.named('above'), below: this.named('below') };
    const planes = { ...both, [side]: picked === none || picked === undefined ? null : picked };
    this.set('planes', picked === nearest ? undefined : planes);
  }

  protected setEnd(end: 0 | 1, layer: string | undefined): void {
    const outer = this.copper();
    const [top, bottom] = this.via()?.barrel ?? [outer[0]?.name ?? '', outer.at(-1)?.name ?? ''];
    this.set('barrel', end === 0 ? [layer ?? top, bottom] : [top, layer ?? bottom]);
  }

  protected barrelOf(end: 0 | 1): string {
    const outer = this.copper();
    return this.via()?.barrel?.[end] ?? (end === 0 ? outer[0]?.name : outer.at(-1)?.name) ?? '';
  }

  protected set(name: string, value: unknown): void {
    this.changed.emit({ path: [name], value });
  }

  protected problemAt(name: string): string {
    return this.store.problemAt(`${this.base()}.${name}`);
  }

  /** What a side returns on now, by name: what it says, else the nearest plane. */
  private named(side: 'above' | 'below'): string | null {
    const said = this.trace()?.planes?.[side];
    if (said !== undefined) return said;
    const all = this.copper();
    const own = all.findIndex(({ name }) => name === this.trace()?.layer);
    const beside = side === 'above' ? all.slice(0, Math.max(own, 0)).reverse() : all.slice(own + 1);
    return beside.find(({ role }) => role === 'plane')?.name ?? null;
  }

  private planePicks(side: 'above' | 'below'): Pick[] {
    const all = this.copper();
    const own = all.findIndex(({ name }) => name === this.trace()?.layer);
    const beside = side === 'above' ? all.slice(0, Math.max(own, 0)) : all.slice(own + 1);
    return [
      { value: nearest, title: 'the nearest plane' },
      { value: none, title: 'none' },
      ...beside.map(({ name }) => ({ value: name, title: name })),
    ];
  }
}

/** Layers to pick from, and a layer that is stated and not there. */
function picksOf(names: readonly string[], ...stated: readonly (string | undefined)[]): Pick[] {
  const strays = stated.filter((name): name is string => !!name && !names.includes(name));
  return [
    ...names.map((name) => ({ value: name, title: name })),
    ...[...new Set(strays)].map((name) => ({ value: name, title: `${name} (not in the stackup)` })),
  ];
}
