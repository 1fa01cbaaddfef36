import type { MatrixFormat, NumberFormat, TwoPortOrder } from './touchstone-file';

/**
 * Collects the points of a file: pairs in file order go in, complex entries at their places come out. Nothing is
 * allocated per point; storage doubles.
 */
export class DataBlock {
  points = 0;
  /** Pairs of the point being read; a point without any has not begun. */
  private filled = 0;
  private frequencyHz = 0;
  private frequencies: Float64Array;
  private entries: Float64Array;
  private readonly target: Int32Array;
  private readonly mirror: Int32Array;
  private begun = false;
  /** The largest angle met, in degrees as if the file held degrees. */
  largestAngle = 0;
  /** Where a dB value of minus infinity stood for zero. */
  zeros = 0;

  constructor(
    readonly ports: number,
    matrixFormat: MatrixFormat,
    order: TwoPortOrder,
    private readonly format: NumberFormat,
  ) {
    this.target = entryOffsets(ports, matrixFormat, order);
    this.mirror =
      matrixFormat === 'Full'
        ? this.target
        : this.target.map((at) => ((at / 2) % ports) * ports * 2 + Math.floor(at / 2 / ports) * 2);
    // A claim of many ports costs nothing before its data arrive.
    const first = Math.max(1, Math.min(64, Math.floor(8192 / (ports * ports))));
    this.frequencies = new Float64Array(first);
    this.entries = new Float64Array(first * ports * ports * 2);
  }

  /** True between the frequency of a point and its last pair. */
  get midPoint(): boolean {
    return this.begun;
  }
  /** Numbers a point takes, its frequency included. */
  get valuesAPoint(): number {
    return 1 + this.target.length * 2;
  }
  /** Numbers of the unfinished point. */
  get valuesSoFar(): number {
    return this.begun ? 1 + this.filled * 2 : 0;
  }
  get lastHz(): number {
    return this.points === 0 ? -1 : this.frequencies[this.points - 1]!;
  }
  get missingValues(): number {
    return this.valuesAPoint - this.valuesSoFar;
  }

  begin(frequencyHz: number): void {
    this.frequencyHz = frequencyHz;
    this.begun = true;
    if (this.points === this.frequencies.length) this.grow();
  }

  /** Takes `count` numbers (pairs) from `values[from]`; the caller has checked that they fit. */
  add(values: Float64Array, from: number, count: number): void {
    const base = this.points * this.ports * this.ports * 2;
    const { entries, target, mirror } = this;
    let pair = this.filled;
    for (let k = from; k < from + count; k += 2) {
      let re = values[k]!;
      let im = values[k + 1]!;
      if (this.format !== 'RI') {
        const size = this.format === 'DB' ? (re === -Infinity ? this.zero() : Math.pow(10, re / 20)) : re;
        if (im > this.largestAngle) this.largestAngle = im;
        else if (-im > this.largestAngle) this.largestAngle = -im;
        const angle = (im * Math.PI) / 180;
        re = size * Math.cos(angle);
        im = size * Math.sin(angle);
      }
      const at = base + target[pair]!;
      entries[at] = re;
      entries[at + 1] = im;
      const other = base + mirror[pair]!;
      entries[other] = re;
      entries[other + 1] = im;
      pair++;
    }
    this.filled = pair;
    if (pair === target.length) {
      this.frequencies[this.points] = this.frequencyHz;
      this.points++;
      this.filled = 0;
      this.begun = false;
    }
  }

  /** The matrices as they stand in the file, in its own parameter. */
  take(): { frequenciesHz: Float64Array; entries: Float64Array } {
    const size = this.points * this.ports * this.ports * 2;
    return {
      frequenciesHz: this.frequencies.slice(0, this.points),
      entries: this.entries.length === size ? this.entries : this.entries.slice(0, size),
    };
  }

  private zero(): number {
    this.zeros++;
    return 0;
  }

  private grow(): void {
    const frequencies = new Float64Array(this.frequencies.length * 2);
    frequencies.set(this.frequencies);
    this.frequencies = frequencies;
    const entries = new Float64Array(this.entries.length * 2);
    entries.set(this.entries);
    this.entries = entries;
  }
}

/** Where the pairs of a point go, in file order: (row * ports + column) * 2. */
export function entryOffsets(ports: number, matrixFormat: MatrixFormat, order: TwoPortOrder): Int32Array {
  if (ports === 2 && matrixFormat === 'Full' && order === '21_12') return Int32Array.of(0, 4, 2, 6);
  const offsets = new Int32Array(matrixFormat === 'Full' ? ports * ports : (ports * (ports + 1)) / 2);
  let k = 0;
  for (let row = 0; row < ports; row++) {
    const first = matrixFormat === 'Upper' ? row : 0;
    const last = matrixFormat === 'Lower' ? row : ports - 1;
    for (let column = first; column <= last; column++) offsets[k++] = (row * ports + column) * 2;
  }
  return offsets;
}
