import { computed, Injectable, signal } from '@angular/core';
import type { Box, Point } from '@tollgate/geometry';

export type PlanUnit = 'mm' | 'mil';

const milM = 25.4e-6;
/** Grids to choose from, in metres. */
export const grids: Readonly<Record<PlanUnit, readonly number[]>> = {
  mm: [0.05e-3, 0.1e-3, 0.25e-3, 0.5e-3, 1e-3, 2.5e-3],
  mil: [1 * milM, 5 * milM, 10 * milM, 25 * milM, 50 * milM, 100 * milM],
};
const leastPxPerM = 300;
const mostPxPerM = 4e6;
const margin = 28;

/** What part of the board is on the screen: pixels a metre, and the board's point in the upper left corner. */
@Injectable()
export class PlanView {
  readonly pxPerM = signal(5000);
  readonly origin = signal<Point>([0, 0]);
  readonly size = signal<readonly [width: number, height: number]>([0, 0]);
  readonly unit = signal<PlanUnit>('mm');
  private readonly gridStep = signal(0.5e-3);
  readonly gridM = this.gridStep.asReadonly();

  readonly unitM = computed(() => (this.unit() === 'mm' ? 1e-3 : milM));
  /** User units of the drawings are millimetres. */
  readonly transform = computed(() => {
    const [x, y] = this.origin();
    const scale = this.pxPerM();
    return `translate(${(-x * scale).toFixed(2)} ${(-y * scale).toFixed(2)}) scale(${scale / 1e3})`;
  });

  toPoint(px: number, py: number): Point {
    const [x, y] = this.origin();
    return [x + px / this.pxPerM(), y + py / this.pxPerM()];
  }

  toPx([xM, yM]: Point): readonly [number, number] {
    const [x, y] = this.origin();
    return [(xM - x) * this.pxPerM(), (yM - y) * this.pxPerM()];
  }

  setUnit(unit: PlanUnit): void {
    if (unit === this.unit()) return;
    this.unit.set(unit);
    this.gridStep.set(grids[unit][3]!);
  }

  setGrid(stepM: number): void {
    this.gridStep.set(stepM);
  }

  panBy(dxPx: number, dyPx: number): void {
    const [x, y] = this.origin();
    this.origin.set([x - dxPx / this.pxPerM(), y - dyPx / this.pxPerM()]);
  }

  /** Zooms about a place on the screen; left out, about the middle. */
  zoomBy(factor: number, about?: readonly [number, number]): void {
    const [px, py] = about ?? [this.size()[0] / 2, this.size()[1] / 2];
    const scale = Math.min(mostPxPerM, Math.max(leastPxPerM, this.pxPerM() * factor));
    const [x, y] = this.toPoint(px, py);
    this.pxPerM.set(scale);
    this.origin.set([x - px / scale, y - py / scale]);
  }

  /** Brings a rectangle into view with some room around it. */
  fit(box: Box): void {
    const [width, height] = this.size();
    if (width === 0 || height === 0) return;
    const [wide, high] = [Math.max(box.x1 - box.x0, 1e-3), Math.max(box.y1 - box.y0, 1e-3)];
    const scale = Math.min((width - 2 * margin) / wide, (height - 2 * margin) / high);
    const bounded = Math.min(mostPxPerM, Math.max(leastPxPerM, scale));
    this.pxPerM.set(bounded);
    this.origin.set([
      (box.x0 + box.x1) / 2 - width / 2 / bounded,
      (box.y0 + box.y1) / 2 - height / 2 / bounded,
    ]);
  }

  /** Moves the view as little as needed to show a point. */
  reveal(point: Point): void {
    const [px, py] = this.toPx(point);
    const [width, height] = this.size();
    const inside = (value: number, most: number) => Math.min(most - margin, Math.max(margin, value));
    if (width > 0) this.panBy(inside(px, width) - px, inside(py, height) - py);
  }

  /** A length or coordinate as it is read out, in the unit chosen. */
  written(valueM: number): string {
    return `${this.number(valueM)} ${this.unit()}`;
  }

  /** The same without the unit. */
  number(valueM: number): string {
    return (valueM / this.unitM() + 0).toFixed(this.unit() === 'mm' ? 2 : 1).replace(/^-(0\.?0*)$/, '$1');
  }
}
