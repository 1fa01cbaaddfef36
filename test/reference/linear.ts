/** A complex number. */
export type Complex = readonly [re: number, im: number];

export const add = (a: Complex, b: Complex): Complex => [a[0] + b[0], a[1] + b[1]];
export const subtract = (a: Complex, b: Complex): Complex => [a[0] - b[0], a[1] - b[1]];
export const multiply = (a: Complex, b: Complex): Complex => [
  a[0] * b[0] - a[1] * b[1],
  a[0] * b[1] + a[1] * b[0],
];
export const scale = (a: Complex, by: number): Complex => [a[0] * by, a[1] * by];
export const divide = (a: Complex, b: Complex): Complex => {
  const size = b[0] * b[0] + b[1] * b[1];
  return [(a[0] * b[0] + a[1] * b[1]) / size, (a[1] * b[0] - a[0] * b[1]) / size];
};
export const exponential = ([re, im]: Complex): Complex => [
  Math.exp(re) * Math.cos(im),
  Math.exp(re) * Math.sin(im),
];
/** The root with a real part of at least 0. */
export const squareRoot = ([re, im]: Complex): Complex => {
  const size = Math.hypot(re, im);
  const real = Math.sqrt((size + Math.abs(re)) / 2);
  if (real === 0) return [0, 0];
  const other = im / (2 * real);
  return re >= 0 ? [real, other] : [Math.abs(other), im < 0 ? -real : real];
};

/** Rows of complex equations, interleaved, each with its right-hand sides behind the unknowns. */
export class Equations {
  private readonly rows: Float64Array[] = [];

  constructor(
    readonly unknowns: number,
    readonly sides: number,
  ) {}

  /** Adds the equation sum(coefficient x unknown) = sides. */
  add(terms: readonly (readonly [unknown: number, coefficient: Complex])[], sides: readonly Complex[] = []) {
    const row = new Float64Array((this.unknowns + this.sides) * 2);
    for (const [unknown, [re, im]] of terms) {
      row[unknown * 2]! += re;
      row[unknown * 2 + 1]! += im;
    }
    sides.forEach(([re, im], k) => row.set([re, im], (this.unknowns + k) * 2));
    this.rows.push(scaled(row, this.unknowns));
  }

  /** Gaussian elimination with partial pivoting; `result[unknown][side]`. Each side is kept apart. */
  solve(): Complex[][] {
    const { rows, unknowns } = this;
    if (rows.length !== unknowns) throw new Error(`${rows.length} equations for ${unknowns} unknowns.`);
    for (let column = 0; column < unknowns; column++) {
      let best = column;
      for (let row = column + 1; row < unknowns; row++) {
        if (size(rows[row]!, column) > size(rows[best]!, column)) best = row;
      }
      if (size(rows[best]!, column) === 0) throw new Error('The equations have no single solution.');
      [rows[column], rows[best]] = [rows[best]!, rows[column]!];
      const pivot = rows[column]!;
      const filled = filledOf(pivot, column);
      for (let row = column + 1; row < unknowns; row++) eliminate(rows[row]!, pivot, column, filled);
    }
    return this.substituted();
  }

  private substituted(): Complex[][] {
    const { rows, unknowns, sides } = this;
    const result: Complex[][] = Array.from({ length: unknowns }, () => []);
    for (let k = unknowns - 1; k >= 0; k--) {
      const row = rows[k]!;
      for (let side = 0; side < sides; side++) {
        let [re, im] = [row[(unknowns + side) * 2]!, row[(unknowns + side) * 2 + 1]!];
        for (let j = k + 1; j < unknowns; j++) {
          const [a, b] = [row[j * 2]!, row[j * 2 + 1]!];
          if (a === 0 && b === 0) continue;
          const [x, y] = result[j]![side]!;
          re -= a * x - b * y;
          im -= a * y + b * x;
        }
        result[k]!.push(divide([re, im], [row[k * 2]!, row[k * 2 + 1]!]));
      }
    }
    return result;
  }
}

function size(row: Float64Array, column: number): number {
  return Math.abs(row[column * 2]!) + Math.abs(row[column * 2 + 1]!);
}

/** A row whose largest coefficient is about 1: otherwise ohms and siemens would not be weighed alike in the pivoting. */
function scaled(row: Float64Array, unknowns: number): Float64Array {
  let largest = 0;
  for (let k = 0; k < unknowns; k++) largest = Math.max(largest, size(row, k));
  return largest > 0 ? row.map((value) => value / largest) : row;
}

/** Where a row is not 0 from `column` on; most of it is, as an element knows its own two joints only. */
function filledOf(row: Float64Array, column: number): number[] {
  const filled: number[] = [];
  for (let k = column * 2; k < row.length; k += 2) if (row[k] !== 0 || row[k + 1] !== 0) filled.push(k);
  return filled;
}

function eliminate(row: Float64Array, pivot: Float64Array, column: number, filled: readonly number[]): void {
  const at = column * 2;
  if (row[at] === 0 && row[at + 1] === 0) return;
  const [re, im] = divide([row[at]!, row[at + 1]!], [pivot[at]!, pivot[at + 1]!]);
  for (const k of filled) {
    const [x, y] = [pivot[k]!, pivot[k + 1]!];
    row[k]! -= re * x - im * y;
    row[k + 1]! -= re * y + im * x;
  }
  row[at] = row[at + 1] = 0;
}
