import type { Network } from './network';
import { NetworkError } from './network';

/**
 * Mixed mode of a pair, after Bockelman and Eisenstadt (IEEE Trans. MTT-43 no. 7, 1995), formula A6. Ports in: 1 near p, 2 near n,
 * 3 far p, 4 far n. Rows and columns out: d near, d far, c near, c far; `out[response][stimulus]`, so SCD21 is row c far,
 * column d near. a_d = (a_p - a_n)/sqrt 2, a_c = (a_p + a_n)/sqrt 2.
 */
export function toMixedModeInto(out: Float64Array, s: Float64Array, points: number): void {
  transform(out, s, points, singleEndedOf, modeSigns);
}

/** The inverse of `toMixedModeInto`: from d near, d far, c near, c far to the four single-ended ports. */
export function fromMixedModeInto(out: Float64Array, s: Float64Array, points: number): void {
  transform(out, s, points, modesOf, portSigns);
}

// M is orthogonal and every row has two entries of size 1/sqrt 2; row r of M takes the entries `pairs[r]` with `signs[r]`.
const singleEndedOf = [0, 1, 2, 3, 0, 1, 2, 3] as const;
const modeSigns = [1, -1, 1, -1, 1, 1, 1, 1] as const;
const modesOf = [0, 2, 0, 2, 1, 3, 1, 3] as const;
const portSigns = [1, 1, -1, 1, 1, 1, -1, 1] as const;

const block = new Float64Array(32);

function transform(
  out: Float64Array,
  s: Float64Array,
  points: number,
  pairs: readonly number[],
  signs: readonly number[],
): void {
  for (let point = 0; point < points; point++) {
    const at = point * 32;
    for (let row = 0; row < 4; row++) {
      const r0 = pairs[row * 2]!;
      const r1 = pairs[row * 2 + 1]!;
      const rs0 = signs[row * 2]!;
      const rs1 = signs[row * 2 + 1]!;
      for (let column = 0; column < 4; column++) {
        const c0 = pairs[column * 2]! * 2;
        const c1 = pairs[column * 2 + 1]! * 2;
        const cs0 = signs[column * 2]! / 2;
        const cs1 = signs[column * 2 + 1]! / 2;
        for (let part = 0; part < 2; part++) {
          const p = at + part;
          block[(row * 4 + column) * 2 + part] =
            rs0 * (cs0 * s[p + r0 * 8 + c0]! + cs1 * s[p + r0 * 8 + c1]!) +
            rs1 * (cs0 * s[p + r1 * 8 + c0]! + cs1 * s[p + r1 * 8 + c1]!);
        }
      }
    }
    out.set(block, at);
  }
}

function pairReference(network: Network, p: number, n: number, end: string): [number, number] {
  const { referenceOhm } = network;
  const re = referenceOhm[p * 2]!;
  const im = referenceOhm[p * 2 + 1]!;
  if (re !== referenceOhm[n * 2] || im !== referenceOhm[n * 2 + 1]) {
    throw new NetworkError(
      `The p and n ports of the ${end} end have different references.`,
      'Renormalise both ports of an end to one reference first.',
      'referenceOhm',
    );
  }
  return [re, im];
}

function checkFourPorts(network: Network): void {
  if (network.ports !== 4) {
    throw new NetworkError(
      `Mixed mode here is of 4 ports, not ${network.ports}.`,
      'Pick the four ports of the pair first.',
      'ports',
    );
  }
}

/**
 * Mixed-mode network (d near, d far, c near, c far); references 2 Z0 for d and Z0/2 for c (100 and 25 ohm at 50).
 * @throws NetworkError where it has not 4 ports, or p and n of one end differ in reference
 */
export function toMixedMode(network: Network): Network {
  checkFourPorts(network);
  const [nearRe, nearIm] = pairReference(network, 0, 1, 'near');
  const [farRe, farIm] = pairReference(network, 2, 3, 'far');
  const s = new Float64Array(network.s.length);
  toMixedModeInto(s, network.s, network.frequenciesHz.length);
  const referenceOhm = Float64Array.of(
    ...[2 * nearRe, 2 * nearIm, 2 * farRe, 2 * farIm],
    ...[nearRe / 2, nearIm / 2, farRe / 2, farIm / 2],
  );
  return { ports: 4, frequenciesHz: network.frequenciesHz, s, referenceOhm };
}

/**
 * The single-ended network (near p, near n, far p, far n) of a mixed-mode one.
 * @throws NetworkError where an end's d reference is not four times its c reference
 */
export function fromMixedMode(network: Network): Network {
  checkFourPorts(network);
  const z = network.referenceOhm;
  for (let k = 0; k < 4; k++) {
    if (Math.abs(z[k]! - 4 * z[k + 4]!) > 1e-12 * Math.abs(z[k]!)) {
      throw new NetworkError(
        `The references ${z[k]} (d) and ${z[k + 4]} ohm (c) of one end do not belong to one pair.`,
        'The d reference must be four times the c reference.',
        'referenceOhm',
      );
    }
  }
  const s = new Float64Array(network.s.length);
  fromMixedModeInto(s, network.s, network.frequenciesHz.length);
  const [nearRe, nearIm, farRe, farIm] = [0, 1, 2, 3].map((k) => z[k]! / 2);
  const referenceOhm = Float64Array.of(nearRe!, nearIm!, nearRe!, nearIm!, farRe!, farIm!, farRe!, farIm!);
  return { ports: 4, frequenciesHz: network.frequenciesHz, s, referenceOhm };
}
