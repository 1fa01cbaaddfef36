/**
 * An N-port over frequency: power-wave scattering parameters (formulas of Kurokawa, IEEE Trans. MTT-13, 1965).
 *
 * `s` is point-major, `s[((point * ports + row) * ports + column) * 2 + part]`, part 0 real and 1 imaginary.
 * `referenceOhm` holds `ports` pairs (real, imaginary), the same at every frequency.
 */
export interface Network {
  readonly ports: number;
  readonly frequenciesHz: Float64Array;
  readonly s: Float64Array;
  readonly referenceOhm: Float64Array;
}

/** Bad input to the network algebra: what is wrong, where, and how to mend it. */
export class NetworkError extends Error {
  constructor(
    readonly reason: string,
    readonly mend: string,
    readonly at?: string,
  ) {
    super(`${at ? `${at}: ` : ''}${reason} ${mend}`);
    this.name = 'NetworkError';
  }
}

/** `ports` pairs of one reference impedance, in ohm. */
export function uniformReference(ports: number, re: number, im = 0): Float64Array {
  const reference = new Float64Array(ports * 2);
  for (let port = 0; port < ports; port++) {
    reference[port * 2] = re;
    reference[port * 2 + 1] = im;
  }
  return reference;
}

/** A network of zeros on a grid; `referenceOhm` one real value for all ports, or a pair a port. */
export function createNetwork(
  ports: number,
  frequenciesHz: Float64Array,
  referenceOhm: number | Float64Array,
): Network {
  const reference = typeof referenceOhm === 'number' ? uniformReference(ports, referenceOhm) : referenceOhm;
  const s = new Float64Array(frequenciesHz.length * ports * ports * 2);
  return { ports, frequenciesHz, s, referenceOhm: reference };
}

/** Where the entry (row, column) of a point begins in `s`. */
export function entryAt(ports: number, point: number, row: number, column: number): number {
  return ((point * ports + row) * ports + column) * 2;
}

/** Refuses references that power waves cannot carry: Re Z must be above zero. */
export function checkReference(ports: number, referenceOhm: Float64Array): void {
  if (referenceOhm.length !== ports * 2) {
    throw new NetworkError(
      `${referenceOhm.length / 2} reference impedances for ${ports} ports.`,
      'Give one reference impedance a port.',
      'referenceOhm',
    );
  }
  for (let port = 0; port < ports; port++) {
    const re = referenceOhm[port * 2]!;
    const im = referenceOhm[port * 2 + 1]!;
    if (!(re > 0) || !Number.isFinite(re) || !Number.isFinite(im)) {
      throw new NetworkError(
        `The reference impedance of port ${port + 1} is ${re} + j${im} ohm.`,
        'Its real part must be finite and above zero.',
        `referenceOhm[${port}]`,
      );
    }
  }
}

/** Refuses frequencies that are not finite, negative, or not strictly ascending. */
export function checkFrequencies(frequenciesHz: Float64Array): void {
  for (let point = 0; point < frequenciesHz.length; point++) {
    const f = frequenciesHz[point]!;
    if (!Number.isFinite(f) || f < 0) {
      throw new NetworkError(
        `The frequency ${f} Hz is not a finite number from 0 up.`,
        'Correct the frequency.',
        `frequenciesHz[${point}]`,
      );
    }
    if (point > 0 && !(f > frequenciesHz[point - 1]!)) {
      throw new NetworkError(
        `The frequency ${f} Hz does not lie above the one before it, ${frequenciesHz[point - 1]} Hz.`,
        'Sort the frequencies upwards and give each one once.',
        `frequenciesHz[${point}]`,
      );
    }
  }
}

/**
 * Refuses a network whose parts do not fit together.
 * @throws NetworkError naming the first entry that is wrong
 */
export function checkNetwork(network: Network): void {
  const { ports, frequenciesHz, s, referenceOhm } = network;
  if (!Number.isInteger(ports) || ports < 1) {
    throw new NetworkError(`${ports} is not a number of ports.`, 'Give a whole number from 1 up.', 'ports');
  }
  checkReference(ports, referenceOhm);
  checkFrequencies(frequenciesHz);
  const wanted = frequenciesHz.length * ports * ports * 2;
  if (s.length !== wanted) {
    throw new NetworkError(
      `${s.length} numbers where ${frequenciesHz.length} points of ${ports} ports need ${wanted}.`,
      'Give a full matrix for every frequency.',
      's',
    );
  }
  for (let k = 0; k < s.length; k++) {
    if (!Number.isFinite(s[k]!)) {
      const point = Math.floor(k / (ports * ports * 2));
      throw new NetworkError(
        `The scattering matrix at ${frequenciesHz[point]} Hz holds ${s[k]}.`,
        'Give finite numbers only.',
        `s[${k}]`,
      );
    }
  }
}

/** True where both lists of references are equal, port by port. */
export function sameReference(a: Float64Array, b: Float64Array): boolean {
  return a.length === b.length && a.every((value, k) => value === b[k]);
}

/** Refuses two networks that do not share one frequency grid. */
export function checkSameGrid(a: Network, b: Network): void {
  const same =
    a.frequenciesHz === b.frequenciesHz ||
    (a.frequenciesHz.length === b.frequenciesHz.length &&
      a.frequenciesHz.every((f, k) => f === b.frequenciesHz[k]));
  if (!same) {
    throw new NetworkError(
      `The networks have different frequencies (${a.frequenciesHz.length} and ${b.frequenciesHz.length} points).`,
      'Interpolate both onto one grid first.',
      'frequenciesHz',
    );
  }
}
