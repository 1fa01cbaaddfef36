import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  input,
  output,
  viewChild,
} from '@angular/core';
import type { CheckView, LimitView } from '@tollgate/contracts';
import type { ChartConfiguration } from 'chart.js';
import { BaseChartDirective } from 'ng2-charts';
import { ThemeStore } from '../../theme/theme-store';
import {
  curvePoints,
  frequencyRange,
  limitPoints,
  limitsOf,
  lossRange,
  type CurveName,
  type Point,
} from './chart-data';
import { chartOptions, type Range } from './chart-options';
import { overlayPlugin, type Overlay } from './hatch';

export interface Trace {
  readonly curve: CurveName;
  readonly title: string;
  readonly tone: 'copper' | 'slate';
}

type Data = ChartConfiguration<'line', Point[]>['data'];

/** Losses over frequency, growing downward, against the limits on them; the side a limit forbids is hatched. */
@Component({
  selector: 'tg-loss-chart',
  imports: [BaseChartDirective],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <canvas
      baseChart
      type="line"
      role="img"
      [attr.aria-label]="label()"
      [data]="data"
      [options]="options"
      [plugins]="plugins"
      (mousemove)="look($event)"
      (mouseleave)="pointed.emit(undefined)"
    ></canvas>
  `,
  styles: `
    :host {
      display: block;
      position: relative;
      min-width: 0;
      min-height: 0;
    }
    canvas {
      position: absolute;
      inset: 0;
      touch-action: pan-y;
    }
  `,
})
export class LossChart {
  private readonly theme = inject(ThemeStore);
  private readonly chart = viewChild.required(BaseChartDirective);

  readonly view = input.required<CheckView>();
  readonly traces = input.required<readonly Trace[]>();
  readonly quantities = input.required<readonly LimitView['quantity'][]>();
  readonly label = input.required<string>();
  readonly log = input(false);
  readonly atLeastDb = input(4);
  /** Names of marks stand in one chart only. */
  readonly named = input(true);
  /** Frequency in GHz under the pointer, in whichever chart it is. */
  readonly crosshair = input<number | undefined>();
  readonly pointed = output<number | undefined>();
  /** The range that is shown, in GHz; undefined is the whole. */
  readonly range = input<Range | undefined>();
  readonly zoomed = output<Range>();
  readonly painted = output<void>();

  protected readonly data: Data = { datasets: [] };
  protected readonly options = chartOptions({ zoomed: (range) => this.zoomed.emit(range) });
  protected readonly plugins = [overlayPlugin(() => this.overlay())];

  private readonly limits = computed(() => limitsOf(this.view(), this.quantities()));
  private readonly curves = computed(() =>
    this.traces().map((trace) => ({ trace, points: curvePoints(this.view(), trace.curve, this.log()) })),
  );
  private readonly edges = computed(() =>
    this.limits().map((limit) => ({ limit, points: limitPoints(limit, this.log()) })),
  );
  private readonly overlay = computed<Overlay>(() => {
    const palette = this.theme.palette();
    const view = this.view();
    const nyquist = view.nyquistHz;
    return {
      forbidden: this.edges().map(({ limit, points }) => ({ points, beyondIsLarger: limit.sense === 'max' })),
      hatchColour: palette.oxide,
      dots: this.edges().flatMap(({ points }) =>
        points.length === 1 && points[0]!.y !== null ? [{ x: points[0]!.x, y: points[0]!.y }] : [],
      ),
      marks:
        nyquist === undefined
          ? []
          : [
              {
                x: nyquist / 1e9,
                text: this.named() ? `Nyquist ${Number((nyquist / 1e9).toPrecision(5))}` : '',
              },
            ],
      markColour: palette.slate,
      missing: this.limits().flatMap((limit) => limit.missingHz.map(([a, b]) => [a / 1e9, b / 1e9] as const)),
      missingColour: palette.rule,
      worst: this.worst(),
      worstColour: (view.worstMarginDb ?? 0) < 0 ? palette.oxide : palette.verdigris,
      crosshair: this.crosshair(),
      font: `12px "Source Sans 3", sans-serif`,
      ground: palette.surface,
    };
  });
  private readonly worst = computed(() => {
    const view = this.view();
    const limit = this.limits().find((each) => each.id === view.worstLimitId);
    const at = limit?.worstRefined;
    const trace = this.curves().find(({ trace: { curve } }) => limit && curveOf(limit.quantity) === curve);
    if (!limit || !at || at.marginDb === null || !trace) return undefined;
    const x = at.frequencyHz / 1e9;
    return { x, y: valueAt(trace.points, x) };
  });

  constructor() {
    effect(() => {
      this.overlay();
      this.refill();
    });
  }

  protected look(event: MouseEvent): void {
    const chart = this.chart().chart;
    const x = chart?.scales['x']?.getValueForPixel(event.offsetX);
    if (x !== undefined) this.pointed.emit(x);
  }

  private readonly structure = computed(() => {
    const palette = this.theme.palette();
    const curves = this.curves().map(({ trace, points }) => ({
      label: trace.title,
      data: points,
      borderColor: palette[trace.tone],
      borderWidth: trace.tone === 'copper' ? 2 : 1.6,
      order: 1,
    }));
    const edges = this.edges().map(({ limit, points }) => ({
      label: limit.title,
      data: points,
      borderColor: palette.oxide,
      borderWidth: 1.5,
      order: 2,
    }));
    const [min, max] = this.range() ?? frequencyRange(this.view(), this.view().limits, this.log());
    const values = this.curves().flatMap(({ points }) => points.map(({ y }) => y));
    const top = lossRange(values, this.limits(), this.atLeastDb(), this.view().nyquistHz);
    return { datasets: [...curves, ...edges], min, max, top, log: this.log(), palette };
  });

  /** Mends the chart in place: the datasets keep their objects, so that nothing is laid out anew. */
  private refill(): void {
    const { datasets, min, max, top, log, palette } = this.structure();
    datasets.forEach((dataset, i) => {
      const old = this.data.datasets[i];
      if (old) Object.assign(old, dataset);
      else this.data.datasets[i] = { ...dataset, pointRadius: 0 };
    });
    this.data.datasets.length = datasets.length;
    const chart = this.chart().chart;
    // Before the chart is made, its options are what it is made of; after, it has its own copy.
    const { scales } = (chart?.options ?? this.options) as ReturnType<typeof chartOptions>;
    const [x, y] = [scales!['x']!, scales!['y']!];
    Object.assign(x, { type: log ? 'logarithmic' : 'linear', min, max });
    Object.assign(y, { min: 0, max: top });
    for (const axis of [x, y]) {
      axis.grid!.color = palette.rule;
      axis.ticks!.color = palette.slate;
      axis.border!.color = palette.rule;
    }
    chart?.update('none');
    if (chart) this.painted.emit();
  }
}

function curveOf(quantity: LimitView['quantity']): CurveName | undefined {
  if (quantity === 'insertion-loss') return 'insertionLossDb';
  if (quantity === 'return-loss-near') return 'returnLossNearDb';
  return quantity === 'return-loss-far' ? 'returnLossFarDb' : undefined;
}

/** The curve's height at a frequency between its points. */
function valueAt(points: readonly Point[], x: number): number {
  const after = points.findIndex((point) => point.x >= x);
  const [a, b] = [points[Math.max(0, after - 1)], points[after < 0 ? points.length - 1 : after]];
  if (!a || !b || a.x === b.x) return b?.y ?? a?.y ?? 0;
  return (a.y ?? 0) + (((b.y ?? 0) - (a.y ?? 0)) * (x - a.x)) / (b.x - a.x);
}
