import { ChangeDetectionStrategy, Component, computed, input, linkedSignal, output } from '@angular/core';
import { bounds } from '@tollgate/contracts';
import { readPoints, writePoints } from './csv-points';

let next = 0;

/** A mask's points as text, one a line: type them or paste a table; each wrong line is named. */
@Component({
  selector: 'tg-points-field',
  changeDetection: ChangeDetectionStrategy.OnPush,
  host: { class: 'wide' },
  template: `
    <label [for]="id">GHz, dB; one point a line, or paste a table</label>
    <textarea
      [id]="id"
      rows="7"
      data-path="points"
      spellcheck="false"
      [value]="text()"
      [disabled]="disabled()"
      [attr.aria-invalid]="messages().length ? 'true' : null"
      [attr.aria-describedby]="id + '-note'"
      (input)="take($event)"
    ></textarea>
    <div class="error" [id]="id + '-note'">
      @for (message of messages(); track $index) {
        <div>{{ message }}</div>
      }
    </div>
  `,
  styleUrl: '../entries/entry.scss',
})
export class PointsField {
  readonly points = input.required<readonly (readonly [number, number])[]>();
  /** Which limit it is of: another limit brings its own text. */
  readonly key = input.required<string>();
  readonly disabled = input(false);
  readonly problem = input('');
  readonly changed = output<readonly (readonly [number, number])[]>();

  protected readonly id = `tg-points-${next++}`;
  private readonly typed = linkedSignal<string, string | undefined>({
    source: this.key,
    computation: () => undefined,
  });
  protected readonly text = computed(() => {
    const typed = this.typed();
    const written = writePoints(this.points());
    if (typed === undefined) return written;
    const read = readPoints(typed);
    // An undo, or another person, changed the points: what was typed is of the past.
    const same = read.problems.length > 0 || read.points.length < 2 || writePoints(read.points) === written;
    return same ? typed : written;
  });
  protected readonly messages = computed(() => {
    const read = readPoints(this.text());
    const lines = read.problems.map(({ line, message }) => `Line ${line}: ${message}`);
    if (lines.length)
      return lines.length > 5 ? [...lines.slice(0, 5), `and ${lines.length - 5} more`] : lines;
    if (read.points.length < 2) return ['A mask of points has at least two.'];
    return this.problem() ? [this.problem()] : [];
  });

  protected take(event: Event): void {
    const text = (event.target as HTMLTextAreaElement).value;
    this.typed.set(text);
    const { points, problems } = readPoints(text);
    if (problems.length === 0 && points.length >= 2 && points.length <= bounds.maskPoints)
      this.changed.emit(points);
  }
}
