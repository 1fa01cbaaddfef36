import { solveInPlace } from './matrix';
import type { Network } from './network';
import { checkReference, NetworkError, uniformReference } from './network';

/**
 * What the numbers of a file with complex references mean. Power waves are Kurokawa's (1965); pseudo waves are those of
 * Marks and Williams (J. Res. NIST 97, 1992). For real references both are the same.
 */
export type WaveDefinition = 'power' | 'pseudo';

/** V = (vA + vB S) a and I = (iA + iB S) a: the pairs vA, vB, iA, iB of every port. */
function basisOf(
  referenceOhm: Float64Array,
  from: number,
  ports: number,
  waves: WaveDefinition,
): Float64Array {
  const factors = new Float64Array(ports * 8);
  for (let port = 0; port < ports; port++) {
    const re = referenceOhm[from + port * 2]!;
    const im = referenceOhm[from + port * 2 + 1]!;
    const root = Math.sqrt(re);
    const at = port * 8;
    if (waves === 'power' || im === 0) {
      factors[at] = re / root;
      factors[at + 1] = -im / root;
      factors[at + 2] = re / root;
      factors[at + 3] = im / root;
      factors[at + 4] = 1 / root;
      factors[at + 6] = -1 / root;
    } else {
      const size = Math.hypot(re, im);
      factors[at] = size / root;
      factors[at + 2] = size / root;
      factors[at + 4] = re / (size * root);
      factors[at + 5] = -im / (size * root);
      factors[at + 6] = -re / (size * root);
      factors[at + 7] = im / (size * root);
    }
  }
  return factors;
}

interface Scratch {
  readonly left: Float64Array;
  readonly right: Float64Array;
  readonly order: Int32Array;
}

/**
 * One matrix from a wave basis to power waves at `toOhm` (A2): with V = P a and I = Q a,
 * S' = Re(Z')^-1/2 (P - Z'* Q)(P + Z' Q)^-1 Re(Z')^1/2. Solved transposed, so that the inverse stands on the left.
 */
function convertPoint(
  out: Float64Array,
  s: Float64Array,
  at: number,
  ports: number,
  factors: Float64Array,
  toOhm: Float64Array,
  scratch: Scratch,
): number {
  const { left, right } = scratch;
  for (let row = 0; row < ports; row++) {
    const f = row * 8;
    const vAr = factors[f]!;
    const vAi = factors[f + 1]!;
    const vBr = factors[f + 2]!;
    const vBi = factors[f + 3]!;
    const iAr = factors[f + 4]!;
    const iAi = factors[f + 5]!;
    const iBr = factors[f + 6]!;
    const iBi = factors[f + 7]!;
    const zr = toOhm[row * 2]!;
    const zi = toOhm[row * 2 + 1]!;
    for (let column = 0; column < ports; column++) {
      const k = at + (row * ports + column) * 2;
      const sr = s[k]!;
      const si = s[k + 1]!;
      let pr = vBr * sr - vBi * si;
      let pi = vBr * si + vBi * sr;
      let qr = iBr * sr - iBi * si;
      let qi = iBr * si + iBi * sr;
      if (row === column) {
        pr += vAr;
        pi += vAi;
        qr += iAr;
        qi += iAi;
      }
      const t = (column * ports + row) * 2;
      left[t] = pr + (zr * qr - zi * qi);
      left[t + 1] = pi + (zr * qi + zi * qr);
      right[t] = pr - (zr * qr + zi * qi);
      right[t + 1] = pi - (zr * qi - zi * qr);
    }
  }
  // X (P + Z'Q) = (P - Z'*Q) transposes to (P + Z'Q)^T X^T = (P - Z'*Q)^T.
  const lost = solveInPlace(left, right, ports, ports, scratch.order);
  for (let row = 0; row < ports; row++) {
    for (let column = 0; column < ports; column++) {
      const scale = Math.sqrt(toOhm[column * 2]! / toOhm[row * 2]!);
      const k = at + (row * ports + column) * 2;
      const t = (column * ports + row) * 2;
      out[k] = right[t]! * scale;
      out[k + 1] = right[t + 1]! * scale;
    }
  }
  return lost > 0 ? 1 : 0;
}

function scratchFor(ports: number): Scratch {
  const size = ports * ports * 2;
  return {
    left: new Float64Array(size),
    right: new Float64Array(size),
    order: new Int32Array(ports),
  };
}

/**
 * Power waves from one set of references to another, without going through Z (A2): works where 1 - S is singular (ideal
 * open, through). `out` may be `s`.
 * @returns the number of points whose new matrix does not exist (a port that a source of infinite power would need)
 */
export function renormalizeInto(
  out: Float64Array,
  s: Float64Array,
  ports: number,
  points: number,
  fromOhm: Float64Array,
  toOhm: Float64Array,
): number {
  const basis = basisOf(fromOhm, 0, ports, 'power');
  const scratch = scratchFor(ports);
  let lost = 0;
  for (let point = 0; point < points; point++) {
    lost += convertPoint(out, s, point * ports * ports * 2, ports, basis, toOhm, scratch);
  }
  return lost;
}

/** The same network in other references (one real value for all ports, or a pair a port). */
export function renormalize(network: Network, referenceOhm: number | Float64Array): Network {
  return toPowerWaves(network, 'power', referenceOhm);
}

/**
 * A network as power waves in constant references, from waves of the given definition whose references may change from point
 * to point (`perPointOhm`: ports pairs a point, instead of the network's own).
 * @throws NetworkError for references without a real part above zero, or a matrix that has no counterpart
 */
export function toPowerWaves(
  network: Network,
  waves: WaveDefinition,
  referenceOhm: number | Float64Array,
  perPointOhm?: Float64Array,
): Network {
  const { ports, frequenciesHz } = network;
  const to = typeof referenceOhm === 'number' ? uniformReference(ports, referenceOhm) : referenceOhm;
  checkReference(ports, to);
  const points = frequenciesHz.length;
  const s = new Float64Array(network.s.length);
  const scratch = scratchFor(ports);
  let basis = basisOf(network.referenceOhm, 0, ports, waves);
  if (!perPointOhm) checkReference(ports, network.referenceOhm);
  for (let point = 0; point < points; point++) {
    if (perPointOhm) {
      checkReference(ports, perPointOhm.subarray(point * ports * 2, (point + 1) * ports * 2));
      basis = basisOf(perPointOhm, point * ports * 2, ports, waves);
    }
    if (convertPoint(s, network.s, point * ports * ports * 2, ports, basis, to, scratch) > 0) {
      throw new NetworkError(
        `The scattering matrix at ${frequenciesHz[point]} Hz has no counterpart in the new references.`,
        'Correct the data or keep its own references.',
        `s[${point}]`,
      );
    }
  }
  return { ports, frequenciesHz, s, referenceOhm: to.slice() };
}
