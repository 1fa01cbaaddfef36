import type { Chart, Plugin } from 'chart.js';

export interface Forbidden {
  /** Points of the limit in the chart's own units; null splits it. */
  readonly points: readonly { readonly x: number; readonly y: number | null }[];
  /** The forbidden side is at larger losses (below the line on a loss axis). */
  readonly beyondIsLarger: boolean;
}

export interface Overlay {
  readonly forbidden: readonly Forbidden[];
  readonly hatchColour: string;
  /** Limits at one frequency. */
  readonly dots: readonly { readonly x: number; readonly y: number }[];
  /** Vertical marks: frequency in GHz and a word. */
  readonly marks: readonly { readonly x: number; readonly text: string }[];
  readonly markColour: string;
  readonly missing: readonly (readonly [number, number])[];
  readonly missingColour: string;
  readonly worst: { readonly x: number; readonly y: number } | undefined;
  readonly worstColour: string;
  readonly crosshair: number | undefined;
  readonly font: string;
  readonly ground: string;
}

const spacingPx = 7;

/** Draws what a limit forbids as a hatch, ranges without an answer as a shade, and the marks over the curves. */
export function overlayPlugin(read: () => Overlay | undefined): Plugin {
  return {
    id: 'tgOverlay',
    beforeDatasetsDraw: (chart) => {
      const overlay = read();
      if (!overlay) return;
      within(chart, (context) => {
        overlay.missing.forEach((range) => shade(chart, context, range, overlay));
        overlay.forbidden.forEach((each) => hatch(chart, context, each, overlay.hatchColour));
      });
    },
    afterDatasetsDraw: (chart) => {
      const overlay = read();
      if (!overlay) return;
      within(chart, (context) => {
        overlay.marks.forEach((mark) => vertical(chart, context, mark, overlay));
        if (overlay.crosshair !== undefined) line(chart, context, overlay.crosshair, overlay.markColour, []);
      });
      overlay.dots.forEach((at) => dot(chart, at, overlay.hatchColour));
      if (overlay.worst) ring(chart, overlay.worst, overlay);
    },
  };
}

function within(chart: Chart, draw: (context: CanvasRenderingContext2D) => void): void {
  const { ctx, chartArea } = chart;
  ctx.save();
  ctx.beginPath();
  ctx.rect(chartArea.left, chartArea.top, chartArea.width, chartArea.height);
  ctx.clip();
  draw(ctx);
  ctx.restore();
}

function hatch(chart: Chart, context: CanvasRenderingContext2D, forbidden: Forbidden, colour: string): void {
  const { chartArea } = chart;
  context.save();
  context.beginPath();
  for (const run of runsOf(forbidden.points)) {
    const edge = forbidden.beyondIsLarger ? chartArea.bottom : chartArea.top;
    const places = run.map((point) => [pixel(chart, 'x', point.x), pixel(chart, 'y', point.y)] as const);
    context.moveTo(places[0]![0], edge);
    places.forEach(([x, y]) => context.lineTo(x, y));
    context.lineTo(places.at(-1)![0], edge);
    context.closePath();
  }
  context.clip();
  context.strokeStyle = colour;
  context.globalAlpha = 0.42;
  context.lineWidth = 1;
  context.beginPath();
  const { left, right, top, bottom, height } = chartArea;
  for (let x = left - height; x < right; x += spacingPx) {
    context.moveTo(x, bottom);
    context.lineTo(x + height, top);
  }
  context.stroke();
  context.restore();
}

function runsOf(points: Forbidden['points']): { x: number; y: number }[][] {
  const runs: { x: number; y: number }[][] = [[]];
  for (const { x, y } of points) {
    if (y === null) runs.push([]);
    else runs.at(-1)!.push({ x, y });
  }
  return runs.filter((run) => run.length > 0).map((run) => (run.length > 1 ? run : widened(run[0]!)));
}

/** A limit at one frequency is a post of a little width. */
function widened({ x, y }: { x: number; y: number }) {
  return [
    { x: x * 0.994, y },
    { x: x * 1.006, y },
  ];
}

function shade(
  chart: Chart,
  context: CanvasRenderingContext2D,
  [from, to]: readonly [number, number],
  overlay: Overlay,
): void {
  const { chartArea } = chart;
  const left = Math.max(chartArea.left, pixel(chart, 'x', from));
  const right = Math.min(chartArea.right, pixel(chart, 'x', to));
  if (right <= left) return;
  context.fillStyle = overlay.missingColour;
  context.fillRect(left, chartArea.top, right - left, chartArea.height);
  context.fillStyle = overlay.markColour;
  context.font = overlay.font;
  if (right - left > 60) context.fillText('no answer', left + 6, chartArea.bottom - 8);
}

function vertical(
  chart: Chart,
  context: CanvasRenderingContext2D,
  mark: Overlay['marks'][number],
  overlay: Overlay,
): void {
  line(chart, context, mark.x, overlay.markColour, [2, 4]);
  if (mark.text === '') return;
  const x = pixel(chart, 'x', mark.x);
  context.font = overlay.font;
  const width = context.measureText(mark.text).width;
  const left = x + 6 + width < chart.chartArea.right ? x + 6 : x - 6 - width;
  context.fillStyle = overlay.ground;
  context.fillRect(left - 2, chart.chartArea.bottom - 20, width + 4, 15);
  context.fillStyle = overlay.markColour;
  context.fillText(mark.text, left, chart.chartArea.bottom - 9);
}

function line(
  chart: Chart,
  context: CanvasRenderingContext2D,
  at: number,
  colour: string,
  dash: number[],
): void {
  const x = pixel(chart, 'x', at);
  context.save();
  context.strokeStyle = colour;
  context.lineWidth = dash.length ? 1.4 : 0.8;
  context.setLineDash(dash);
  context.beginPath();
  context.moveTo(x, chart.chartArea.top);
  context.lineTo(x, chart.chartArea.bottom);
  context.stroke();
  context.restore();
}

/** Not clipped: it may stand on the frame, but not outside the range that is shown. */
function ring(chart: Chart, at: { x: number; y: number }, overlay: Overlay): void {
  const { ctx: context, chartArea } = chart;
  const [x, y] = [pixel(chart, 'x', at.x), pixel(chart, 'y', at.y)];
  if (x < chartArea.left - 1 || x > chartArea.right + 1 || y > chartArea.bottom + 1) return;
  context.save();
  context.beginPath();
  context.arc(x, y, 5, 0, 2 * Math.PI);
  context.fillStyle = overlay.ground;
  context.fill();
  context.lineWidth = 2.2;
  context.strokeStyle = overlay.worstColour;
  context.stroke();
  context.restore();
}

function dot({ ctx: context, chartArea, scales }: Chart, at: { x: number; y: number }, colour: string): void {
  const [x, y] = [scales['x']!.getPixelForValue(at.x), scales['y']!.getPixelForValue(at.y)];
  if (x < chartArea.left - 1 || x > chartArea.right + 1 || y > chartArea.bottom + 1) return;
  context.beginPath();
  context.arc(x, y, 3.5, 0, 2 * Math.PI);
  context.fillStyle = colour;
  context.fill();
}

function pixel(chart: Chart, axis: 'x' | 'y', value: number): number {
  return chart.scales[axis]!.getPixelForValue(value);
}
