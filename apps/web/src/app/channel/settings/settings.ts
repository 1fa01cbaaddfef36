import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import {
  bounds,
  signalings,
  type CompleteChannel,
  type Grid,
  type QuantityField,
  type Signaling,
} from '@tollgate/contracts';
import { pathText, withValue, type Path } from '../document/at-path';
import { ChannelStore } from '../document/channel-store';
import { PickEntry } from '../entries/pick-entry';
import { QuantityEntry } from '../entries/quantity-entry';
import { TextEntry } from '../entries/text-entry';
import { StackupChoice } from './stackup-choice';

const reference: QuantityField = {
  dimension: 'resistance',
  label: 'Reference, each conductor',
  unit: 'ohm',
  above: 0,
  max: 1e6,
};
const rate: QuantityField = {
  dimension: 'symbolRate',
  label: 'Symbol rate',
  unit: 'GBd',
  above: 0,
  max: 1e13,
};
const evaluation: QuantityField = {
  dimension: 'frequency',
  label: 'Ledger read at',
  unit: 'GHz',
  above: 0,
  max: 1e13,
};
const start: QuantityField = { dimension: 'frequency', label: 'From', unit: 'GHz', min: 0, max: 1e13 };
const stop: QuantityField = { dimension: 'frequency', label: 'To', unit: 'GHz', above: 0, max: 1e13 };
const temperature: QuantityField = {
  dimension: 'temperature',
  label: 'Temperature',
  unit: '°C',
  min: -273,
  max: 1000,
};
const reflection: QuantityField = {
  dimension: 'loss',
  label: 'Allotted to reflections',
  unit: 'dB',
  min: 0,
  max: 1000,
};

type GridWay = 'rule' | 'linear' | 'log' | 'list';
const gridWays = [
  { value: 'rule', title: 'chosen by the rule' },
  { value: 'linear', title: 'a range, linear' },
  { value: 'log', title: 'a range, logarithmic' },
];

/** What holds for the channel as a whole: signaling, references, rates, test points, grid. */
@Component({
  selector: 'tg-settings',
  imports: [PickEntry, QuantityEntry, StackupChoice, TextEntry],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './settings.html',
  styleUrl: './settings.scss',
})
export class Settings {
  protected readonly store = inject(ChannelStore);
  /** A template's `?.` gives null where nothing is, which a field would write as 0. */
  protected readonly temperatureC = computed(() => this.document().stackup?.temperatureC);
  protected readonly fields = { reference, rate, evaluation, start, stop, temperature, reflection };
  protected readonly signalingPicks = signalings.map((value) => ({ value, title: value }));
  protected readonly locked = computed(() => !this.store.mayChange());
  protected readonly document = computed(() => this.store.document()!);

  /** A reference a port is kept as the file has it. */
  protected readonly reference = computed(() => {
    const { referenceOhm } = this.document();
    return typeof referenceOhm === 'number' ? referenceOhm : undefined;
  });
  protected readonly gridWay = computed<GridWay>(() => {
    const grid = this.document().grid;
    if (!grid) return 'rule';
    return 'frequenciesHz' in grid ? 'list' : grid.spacing;
  });
  protected readonly gridPicks = computed(() =>
    this.gridWay() === 'list' ? [...gridWays, { value: 'list', title: 'the list of the file' }] : gridWays,
  );
  protected readonly range = computed(() => {
    const grid = this.document().grid;
    return grid && 'startHz' in grid ? grid : undefined;
  });

  protected set(path: Path, value: unknown): void {
    this.store.edit((document) => withValue(document, path, value), pathText(path));
  }

  protected setSignaling(value: string | undefined): void {
    this.store.edit((document) => {
      const signaling = value as Signaling;
      const referenceOhm = typeof document.referenceOhm === 'number' ? document.referenceOhm : 50;
      return { ...document, signaling, referenceOhm };
    });
  }

  protected setTemperature(value: number | undefined): void {
    const { temperatureC: _was, ...rest } = this.document().stackup ?? {};
    const stackup = value === undefined ? rest : { ...rest, temperatureC: value };
    this.set(['stackup'], Object.keys(stackup).length ? stackup : undefined);
  }

  protected setGrid(way: string | undefined): void {
    this.store.edit((document) => withGrid(document, (way ?? 'rule') as GridWay));
  }

  protected setPoints(text: string | undefined): void {
    const points = Number(text);
    const { min, max } = bounds.gridPoints;
    if (Number.isInteger(points) && points >= min && points <= max) this.set(['grid', 'points'], points);
  }

  protected problemAt(path: string): string {
    return this.store.problemAt(path);
  }
}

function withGrid(document: CompleteChannel, way: GridWay): CompleteChannel {
  const { grid, ...rest } = document;
  if (way === 'rule') return rest;
  if (way === 'list') return document;
  const range = grid && 'startHz' in grid ? grid : undefined;
  const stopHz = range?.stopHz ?? Math.max(20e9, document.symbolRateBd ?? 0);
  const startHz = way === 'log' ? range?.startHz || 10e6 : (range?.startHz ?? 10e6);
  const next: Grid = { startHz, stopHz, points: range?.points ?? 2000, spacing: way };
  return { ...rest, grid: next };
}
