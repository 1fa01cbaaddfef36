import type { Refusal } from './option-line';

/** One row of a mixed-mode matrix: a differential or common mode of two ports, or a single port (from 0). */
export interface ModeOfPorts {
  readonly mode: 'D' | 'C' | 'S';
  readonly p: number;
  /** -1 for a single port. */
  readonly n: number;
}

/**
 * The tokens of [Mixed-Mode Order]: `D2,3`, `C2,3`, `S4`, any order; the first port of a pair is its positive leg, so `D6,5`
 * turns the sign. Every port occurs once as S, or in one pair with both its modes.
 */
export function parseModeOrder(tokens: readonly string[], ports: number): readonly ModeOfPorts[] | Refusal {
  const modes: ModeOfPorts[] = [];
  for (const token of tokens) {
    const match = /^(?:([DC])(\d+),(\d+)|S(\d+))$/i.exec(token);
    if (!match) {
      return { reason: `[Mixed-Mode Order] holds "${token}".`, mend: 'Write D1,2, C1,2 or S1.' };
    }
    const numbers = [match[2] ?? match[4], match[3]].filter((x) => x !== undefined).map(Number);
    const outside = numbers.find((port) => port < 1 || port > ports);
    if (outside !== undefined) {
      return {
        reason: `[Mixed-Mode Order] names port ${outside} of ${ports}.`,
        mend: 'Name ports that exist.',
      };
    }
    const mode = (match[1]?.toUpperCase() ?? 'S') as ModeOfPorts['mode'];
    modes.push({ mode, p: numbers[0]! - 1, n: numbers.length > 1 ? numbers[1]! - 1 : -1 });
  }
  return modesFit(modes, ports) ?? modes;
}

function modesFit(modes: readonly ModeOfPorts[], ports: number): Refusal | null {
  const unfit = (why: string): Refusal => ({
    reason: `[Mixed-Mode Order] ${why}.`,
    mend: 'Name every port once as S, or in one pair with one D and one C.',
  });
  if (modes.length !== ports) return unfit(`names ${modes.length} modes for ${ports} ports`);
  for (let port = 0; port < ports; port++) {
    const own = modes.filter((m) => m.p === port || m.n === port);
    if (own.length === 1 && own[0]!.mode === 'S') continue;
    const d = own.find((m) => m.mode === 'D');
    const c = own.find((m) => m.mode === 'C');
    if (own.length !== 2 || !d || !c || d.p === d.n) return unfit(`does not give port ${port + 1} a place`);
    if (d.p + d.n !== c.p + c.n || Math.abs(d.p - d.n) !== Math.abs(c.p - c.n)) {
      return unfit(`pairs port ${port + 1} with two others`);
    }
  }
  return null;
}

/** Real references of the modes from those of the ports: 2 Z0 for D, Z0/2 for C. Null where p and n of a pair differ. */
export function modeReferences(modes: readonly ModeOfPorts[], portOhm: readonly number[]): number[] | null {
  const references: number[] = [];
  for (const { mode, p, n } of modes) {
    const z = portOhm[p]!;
    if (mode !== 'S' && z !== portOhm[n]) return null;
    references.push(mode === 'D' ? 2 * z : mode === 'C' ? z / 2 : z);
  }
  return references;
}

/** Rows of M: the modes in the ports, a_mode = M a_port; M is orthogonal (formula A6). */
function modeMatrix(modes: readonly ModeOfPorts[]): Float64Array {
  const ports = modes.length;
  const m = new Float64Array(ports * ports);
  modes.forEach(({ mode, p, n }, row) => {
    m[row * ports + p] = mode === 'S' ? 1 : Math.SQRT1_2;
    if (n >= 0) m[row * ports + n] = mode === 'D' ? -Math.SQRT1_2 : Math.SQRT1_2;
  });
  return m;
}

/** S of the single-ended ports from S of the modes, in place: S = M^T S_mm M. */
export function modesToPorts(entries: Float64Array, points: number, modes: readonly ModeOfPorts[]): void {
  const ports = modes.length;
  const m = modeMatrix(modes);
  const turned = m.map((_, k) => m[(k % ports) * ports + Math.floor(k / ports)]!);
  transform(entries, points, ports, turned);
}

/** S of the modes from S of the single-ended ports, in place: S_mm = M S M^T. */
export function portsToModes(entries: Float64Array, points: number, modes: readonly ModeOfPorts[]): void {
  transform(entries, points, modes.length, modeMatrix(modes));
}

/** entries = L entries L^T at every point. */
function transform(entries: Float64Array, points: number, ports: number, l: Float64Array): void {
  const half = new Float64Array(ports * ports * 2);
  for (let point = 0; point < points; point++) {
    const block = entries.subarray(point * ports * ports * 2, (point + 1) * ports * ports * 2);
    for (let part = 0; part < 2; part++) {
      for (let i = 0; i < ports; i++) {
        for (let j = 0; j < ports; j++) {
          let sum = 0;
          for (let k = 0; k < ports; k++) sum += block[(i * ports + k) * 2 + part]! * l[j * ports + k]!;
          half[(i * ports + j) * 2 + part] = sum;
        }
      }
      for (let i = 0; i < ports; i++) {
        for (let j = 0; j < ports; j++) {
          let sum = 0;
          for (let k = 0; k < ports; k++) sum += l[i * ports + k]! * half[(k * ports + j) * 2 + part]!;
          block[(i * ports + j) * 2 + part] = sum;
        }
      }
    }
  }
}
