import { solveInPlace } from '@tollgate/network';
import type { Parameter } from './touchstone-file';

/**
 * Between S and the other parameters of a file, at real references, point by point. Internally everything is normalised:
 * v = V/sqrt R = a + b, i = I sqrt R = a - b, so that Z, Y, H and G are plain fractional-linear maps of S.
 */

interface Job {
  readonly ports: number;
  readonly points: number;
  /** Real references, one a port. */
  readonly referenceOhm: readonly number[];
}

/** Scales entry (row, column) of a parameter to its normalised value (multiply) for references R. */
function scaleOf(parameter: Parameter, row: number, column: number, r: readonly number[]): number {
  const rr = r[row]!;
  const rc = r[column]!;
  switch (parameter) {
    case 'S':
      return 1;
    case 'Z':
      return 1 / Math.sqrt(rr * rc);
    case 'Y':
      return Math.sqrt(rr * rc);
    // V1, I2 from I1, V2
    case 'H':
      return (
        (row === 0 ? 1 / Math.sqrt(rr) : Math.sqrt(rr)) * (column === 0 ? 1 / Math.sqrt(rc) : Math.sqrt(rc))
      );
    // I1, V2 from V1, I2
    case 'G':
      return (
        (row === 0 ? Math.sqrt(rr) : 1 / Math.sqrt(rr)) * (column === 0 ? Math.sqrt(rc) : 1 / Math.sqrt(rc))
      );
  }
}

/**
 * For each port: +1 where the parameter gives a voltage for a current (like Z), -1 where a current for a voltage (like Y).
 * With y = response, x = stimulus: impedance-like ports have y = a + b, x = a - b; admittance-like y = a - b, x = a + b.
 */
function sense(parameter: Parameter, port: number): 1 | -1 {
  if (parameter === 'Z') return 1;
  if (parameter === 'Y') return -1;
  if (parameter === 'H') return port === 0 ? 1 : -1;
  return port === 0 ? -1 : 1;
}

/**
 * Z, Y, H or G to S in place. `normalised` says that the numbers are already divided or multiplied by the reference, as
 * version 1 writes them.
 * @returns the first point that has no S, or -1
 */
export function parameterToS(
  entries: Float64Array,
  parameter: Parameter,
  job: Job,
  normalised: boolean,
): number {
  if (parameter === 'S') return -1;
  return fractionalLinear(entries, job, (left, right, at) => {
    const { ports } = job;
    for (let row = 0; row < ports; row++) {
      const sign = sense(parameter, row);
      for (let column = 0; column < ports; column++) {
        const k = at + (row * ports + column) * 2;
        const scale = normalised ? 1 : scaleOf(parameter, row, column, job.referenceOhm);
        const re = entries[k]! * scale;
        const im = entries[k + 1]! * scale;
        const one = row === column ? 1 : 0;
        // y = P x with y = a + s b, x = a - s b: (s + P S') b = (P - 1) a, S' = diag of the stimulus port's sense
        const t = (row * ports + column) * 2;
        const columnSign = sense(parameter, column);
        left[t] = one * sign + re * columnSign;
        left[t + 1] = im * columnSign;
        right[t] = re - one;
        right[t + 1] = im;
      }
    }
  });
}

/**
 * S to Z, Y, H or G in place, the inverse of `parameterToS`.
 * @returns the first point that has no such parameters, or -1
 */
export function sToParameter(
  entries: Float64Array,
  parameter: Parameter,
  job: Job,
  normalised: boolean,
): number {
  if (parameter === 'S') return -1;
  const { ports, points } = job;
  // P (1 - s S) = (1 + s S) with s on the rows, solved transposed.
  const failed = fractionalLinear(entries, job, (left, right, at) => {
    for (let row = 0; row < ports; row++) {
      const sign = sense(parameter, row);
      for (let column = 0; column < ports; column++) {
        const k = at + (row * ports + column) * 2;
        const one = row === column ? 1 : 0;
        const t = (column * ports + row) * 2;
        left[t] = one - sign * entries[k]!;
        left[t + 1] = -sign * entries[k + 1]!;
        right[t] = one + sign * entries[k]!;
        right[t + 1] = sign * entries[k + 1]!;
      }
    }
  });
  if (failed >= 0) return failed;
  const kept = new Float64Array(ports * ports * 2);
  for (let point = 0; point < points; point++) {
    const at = point * ports * ports * 2;
    kept.set(entries.subarray(at, at + kept.length));
    for (let row = 0; row < ports; row++) {
      for (let column = 0; column < ports; column++) {
        const scale = normalised ? 1 : 1 / scaleOf(parameter, row, column, job.referenceOhm);
        for (let part = 0; part < 2; part++) {
          entries[at + (row * ports + column) * 2 + part] = kept[(column * ports + row) * 2 + part]! * scale;
        }
      }
    }
  }
  return -1;
}

function fractionalLinear(
  entries: Float64Array,
  job: Job,
  build: (left: Float64Array, right: Float64Array, at: number) => void,
): number {
  const size = job.ports * job.ports * 2;
  const left = new Float64Array(size);
  const right = new Float64Array(size);
  const order = new Int32Array(job.ports);
  for (let point = 0; point < job.points; point++) {
    build(left, right, point * size);
    if (solveInPlace(left, right, job.ports, job.ports, order) > 0) return point;
    entries.set(right, point * size);
  }
  return -1;
}
