import { solveInPlace } from './matrix';
import type { Network } from './network';
import { checkSameGrid, NetworkError, sameReference } from './network';
import { renormalize } from './renormalize';

/** A port of one of several networks; both counted from 0. */
export interface PortOfNetwork {
  readonly network: number;
  readonly port: number;
}

/**
 * Any ports of any networks joined in pairs (A4, block form): S = S_ee + S_ei (P - S_ii)^-1 S_ie, P the pairing. `ends` are the
 * ports of the result, in order; ports that are neither joined nor named are ended in their own reference. References at a joint are
 * made equal and real first (A2).
 * @throws NetworkError for a port that does not exist or is used twice, or for different grids
 */
export function connect(
  networks: readonly Network[],
  joints: readonly (readonly [PortOfNetwork, PortOfNetwork])[],
  ends: readonly PortOfNetwork[],
): Network {
  const first = networks[0];
  if (!first || ends.length === 0) {
    throw new NetworkError('There is nothing to connect.', 'Give a network and at least one outer port.');
  }
  for (const network of networks) checkSameGrid(first, network);
  checkUse(networks, joints, ends);
  const parts = equalJoints(networks, joints);
  const offsets = [0];
  for (const part of parts) offsets.push(offsets[offsets.length - 1]! + part.ports);
  const place = ({ network, port }: PortOfNetwork): number => offsets[network]! + port;
  const inner = joints.flatMap(([a, b]) => [place(a), place(b)]);
  const outer = ends.map(place);
  const points = first.frequenciesHz.length;
  const whole = new Whole(parts, offsets);
  const s = new Float64Array(points * outer.length ** 2 * 2);
  const loop = new Float64Array(inner.length ** 2 * 2);
  const inward = new Float64Array(inner.length * outer.length * 2);
  const order = new Int32Array(inner.length);
  for (let point = 0; point < points; point++) {
    // Joined ports stand next to each other: the partner of k is k ^ 1.
    whole.negative(loop, inner, inner, point);
    for (let k = 0; k < inner.length; k++) {
      const at = (k * inner.length + (k ^ 1)) * 2;
      loop[at] = loop[at]! + 1;
    }
    whole.copy(inward, inner, outer, point);
    solveInPlace(loop, inward, inner.length, outer.length, order);
    whole.close(s, point, outer, inner, inward);
  }
  const referenceOhm = Float64Array.from(
    ends.flatMap(({ network, port }) => [
      parts[network]!.referenceOhm[port * 2]!,
      parts[network]!.referenceOhm[port * 2 + 1]!,
    ]),
  );
  return { ports: outer.length, frequenciesHz: first.frequenciesHz, s, referenceOhm };
}

/** The networks side by side as one block-diagonal matrix. */
class Whole {
  private readonly network: Int32Array;
  private readonly port: Int32Array;

  constructor(
    private readonly parts: readonly Network[],
    offsets: readonly number[],
  ) {
    const total = offsets[offsets.length - 1]!;
    this.network = new Int32Array(total);
    this.port = new Int32Array(total);
    parts.forEach((part, k) => {
      for (let port = 0; port < part.ports; port++) {
        this.network[offsets[k]! + port] = k;
        this.port[offsets[k]! + port] = port;
      }
    });
  }

  private at(row: number, column: number, point: number): number {
    if (this.network[row] !== this.network[column]) return -1;
    const ports = this.parts[this.network[row]!]!.ports;
    return ((point * ports + this.port[row]!) * ports + this.port[column]!) * 2;
  }

  copy(out: Float64Array, rows: readonly number[], columns: readonly number[], point: number): void {
    this.fill(out, rows, columns, point, 1);
  }

  negative(out: Float64Array, rows: readonly number[], columns: readonly number[], point: number): void {
    this.fill(out, rows, columns, point, -1);
  }

  private fill(
    out: Float64Array,
    rows: readonly number[],
    columns: readonly number[],
    point: number,
    sign: 1 | -1,
  ): void {
    let k = 0;
    for (const row of rows) {
      const s = this.parts[this.network[row]!]!.s;
      for (const column of columns) {
        const at = this.at(row, column, point);
        out[k++] = at < 0 ? 0 : sign * s[at]!;
        out[k++] = at < 0 ? 0 : sign * s[at + 1]!;
      }
    }
  }

  /** s = S_ee + S_ei x at one point. */
  close(
    s: Float64Array,
    point: number,
    outer: readonly number[],
    inner: readonly number[],
    x: Float64Array,
  ): void {
    const n = outer.length;
    for (let i = 0; i < n; i++) {
      const part = this.parts[this.network[outer[i]!]!]!.s;
      for (let j = 0; j < n; j++) {
        const direct = this.at(outer[i]!, outer[j]!, point);
        let re = direct < 0 ? 0 : part[direct]!;
        let im = direct < 0 ? 0 : part[direct + 1]!;
        for (let k = 0; k < inner.length; k++) {
          const at = this.at(outer[i]!, inner[k]!, point);
          if (at < 0) continue;
          const p = (k * n + j) * 2;
          re += part[at]! * x[p]! - part[at + 1]! * x[p + 1]!;
          im += part[at]! * x[p + 1]! + part[at + 1]! * x[p]!;
        }
        s[((point * n + i) * n + j) * 2] = re;
        s[((point * n + i) * n + j) * 2 + 1] = im;
      }
    }
  }
}

function checkUse(
  networks: readonly Network[],
  joints: readonly (readonly [PortOfNetwork, PortOfNetwork])[],
  ends: readonly PortOfNetwork[],
): void {
  const used = new Set<string>();
  for (const { network, port } of [...joints.flat(), ...ends]) {
    const ports = networks[network]?.ports ?? 0;
    const name = `port ${port + 1} of network ${network + 1}`;
    if (!Number.isInteger(port) || port < 0 || port >= ports) {
      throw new NetworkError(`There is no ${name}.`, 'Name a port that exists.');
    }
    if (used.has(name)) throw new NetworkError(`The ${name} is used twice.`, 'Use each port once.');
    used.add(name);
  }
}

function equalJoints(
  networks: readonly Network[],
  joints: readonly (readonly [PortOfNetwork, PortOfNetwork])[],
): Network[] {
  const wanted = networks.map((network) => network.referenceOhm.slice());
  for (const [a, b] of joints) {
    wanted[a.network]![a.port * 2 + 1] = 0;
    wanted[b.network]!.set([wanted[a.network]![a.port * 2]!, 0], b.port * 2);
  }
  return networks.map((network, k) =>
    sameReference(network.referenceOhm, wanted[k]!) ? network : renormalize(network, wanted[k]!),
  );
}
