import { solveInPlace } from './linear-solve';

/** A round wire, seen along its axis. */
export interface Wire {
  readonly xM: number;
  readonly yM: number;
  readonly radiusM: number;
}

/** Multipoles are carried until what they leave out is this share of a wire's own field. */
const accuracy = 1e-7;
const mostUnknowns = 600;
const mostOrders = 40;

/**
 * Capacitance a metre of parallel round wires in a homogeneous space: the first `signals` wires, each in turn at 1 V, the rest
 * joined at 0 V and carrying what flows back, so that all charge sums to zero.
 *
 * The potential is expanded in line charges and multipoles at each axis, phi = phi0 + sum_j {-q_j ln|z - z_j| + Re sum_m c_jm
 * [r_j/(z - z_j)]^m}, re-expanded about each other wire and held constant on its surface, harmonic by harmonic (method of images
 * in its closed form; W. R. Smythe, Static and Dynamic Electricity, ch. 4). Exact as the order grows; two wires give
 * pi eps/acosh(distance/diameter).
 *
 * @param wires not touching one another
 * @returns Maxwell's matrix over the permittivity, signals x signals, row by row; off the diagonal below 0
 */
export function wireCapacitances(wires: readonly Wire[], signals: number): Float64Array {
  const count = wires.length;
  const scale = 1 / smallestDistance(wires);
  const orders = ordersFor(wires);
  const width = 1 + 2 * orders;
  const size = count * width + 1;
  const a = new Float64Array(size * size);
  const b = new Float64Array(size * signals);
  wires.forEach((wire, i) => {
    const row = i * width;
    a[row * size + size - 1] = 1;
    a[row * size + row] = -Math.log(wire.radiusM * scale);
    a[(size - 1) * size + row] = 1;
    if (i < signals) b[row * signals + i] = 1;
    for (let n = 1; n <= orders; n++) {
      // conj(c_in) + (what the others bring) = 0, as real and imaginary part.
      a[(row + 2 * n - 1) * size + row + 2 * n - 1] = 1;
      a[(row + 2 * n) * size + row + 2 * n] = -1;
    }
    wires.forEach((other, j) => {
      if (i !== j) couple(a, size, orders, { row, column: j * width }, wire, other, scale);
    });
  });
  solveInPlace(a, b, size, signals);
  const out = new Float64Array(signals * signals);
  for (let i = 0; i < signals; i++) {
    for (let k = 0; k < signals; k++) out[i * signals + k] = 2 * Math.PI * b[i * width * signals + k]!;
  }
  return out;
}

/** What a wire's charge and multipoles bring to the harmonics about another: 1/(D + w)^m = D^-m sum_n binomial(m+n-1, n) (-w/D)^n. */
function couple(
  a: Float64Array,
  size: number,
  orders: number,
  at: { row: number; column: number },
  wire: Wire,
  other: Wire,
  scale: number,
): void {
  const x = wire.xM - other.xM;
  const y = wire.yM - other.yM;
  const distance = Math.hypot(x, y);
  const angle = Math.atan2(y, x);
  const near = wire.radiusM / distance;
  const far = other.radiusM / distance;
  a[at.row * size + at.column] = -Math.log(distance * scale);
  for (let n = 0; n <= orders; n++) {
    const sign = n % 2 === 0 ? 1 : -1;
    if (n > 0) {
      const size0 = (sign / n) * near ** n;
      a[(at.row + 2 * n - 1) * size + at.column] = size0 * Math.cos(n * angle);
      a[(at.row + 2 * n) * size + at.column] = -size0 * Math.sin(n * angle);
    }
    let binomial = 1;
    for (let m = 1; m <= orders; m++) {
      // binomial(m+n-1, n), from its neighbour in m.
      if (m > 1) binomial *= (m + n - 1) / (m - 1);
      const term = sign * binomial * near ** n * far ** m;
      const re = term * Math.cos((m + n) * angle);
      const im = -term * Math.sin((m + n) * angle);
      const column = at.column + 2 * m - 1;
      const row = n === 0 ? at.row : at.row + 2 * n - 1;
      a[row * size + column] = re;
      a[row * size + column + 1] = -im;
      if (n > 0) {
        a[(row + 1) * size + column] = im;
        a[(row + 1) * size + column + 1] = re;
      }
    }
  }
}

function smallestDistance(wires: readonly Wire[]): number {
  let smallest = Infinity;
  wires.forEach((wire, i) => {
    for (const other of wires.slice(i + 1)) {
      smallest = Math.min(smallest, Math.hypot(wire.xM - other.xM, wire.yM - other.yM));
    }
  });
  return smallest;
}

function ordersFor(wires: readonly Wire[]): number {
  let ratio = 0;
  wires.forEach((wire, i) => {
    wires.forEach((other, j) => {
      if (i === j) return;
      const distance = Math.hypot(wire.xM - other.xM, wire.yM - other.yM);
      ratio = Math.max(ratio, wire.radiusM / (distance - other.radiusM));
    });
  });
  const wanted = Math.ceil(Math.log(accuracy) / Math.log(Math.min(ratio, 0.99)));
  const room = Math.floor((mostUnknowns / wires.length - 1) / 2);
  return Math.max(2, Math.min(wanted, room, mostOrders));
}
