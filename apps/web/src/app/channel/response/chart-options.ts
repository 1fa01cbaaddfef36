import type { Chart, ChartConfiguration } from 'chart.js';

export type Range = readonly [from: number, to: number];

interface Hooks {
  readonly zoomed: (range: Range) => void;
}

const font = { family: '"Source Sans 3", sans-serif', size: 12 };

/** What never changes about a loss chart: thousands of points, nothing that moves by itself, the axis downward. */
export function chartOptions({ zoomed }: Hooks): NonNullable<ChartConfiguration<'line'>['options']> {
  const tell = ({ chart }: { chart: Chart }) => {
    const { min, max } = chart.scales['x']!;
    zoomed([min, max]);
  };
  return {
    animation: false,
    parsing: false,
    normalized: true,
    responsive: true,
    maintainAspectRatio: false,
    spanGaps: false,
    events: ['click'],
    layout: { padding: { top: 2, right: 10 } },
    elements: { point: { radius: 0, hitRadius: 0, hoverRadius: 0 }, line: { tension: 0 } },
    scales: {
      x: {
        type: 'linear',
        grid: { drawTicks: false },
        border: { display: true },
        ticks: {
          font,
          includeBounds: false,
          maxTicksLimit: 10,
          padding: 6,
          maxRotation: 0,
          callback: (value) => short(Number(value)),
        },
      },
      y: {
        type: 'linear',
        reverse: true,
        min: 0,
        grid: { drawTicks: false },
        border: { display: false },
        // One width for all charts, so that their frequency axes stand below each other.
        afterFit: (scale) => {
          scale.width = 34;
        },
        ticks: { font, maxTicksLimit: 7, padding: 6 },
      },
    },
    plugins: {
      legend: { display: false },
      tooltip: { enabled: false },
      zoom: {
        limits: { x: { min: 'original', max: 'original' } },
        pan: { enabled: true, mode: 'x', modifierKey: 'shift', onPan: tell },
        zoom: {
          mode: 'x',
          wheel: { enabled: true, speed: 0.08 },
          pinch: { enabled: true },
          drag: { enabled: true, threshold: 8, backgroundColor: 'rgb(156 85 38 / 14%)' },
          onZoom: tell,
        },
      },
    },
  };
}

function short(value: number): string {
  return String(Number(value.toPrecision(4)));
}
