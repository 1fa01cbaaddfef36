import type { Limit, Signaling } from '@tollgate/contracts';
import type { Network } from '@tollgate/network';
import { compileMask, judgeLimit, type Coverage, type Judgement, type Subject } from '../index';

/** S at a frequency, row by row: pairs of real and imaginary part. */
type Matrix = (frequencyHz: number) => readonly (readonly [number, number])[];

interface Settings {
  readonly grid: Float64Array;
  readonly referenceOhm?: number;
  readonly parts?: readonly Coverage[];
  readonly gridHz?: readonly [number, number];
  readonly from?: string;
  readonly to?: string;
}

/** A channel given as S of frequency; `asked` counts the frequencies it is evaluated at beside its grid. */
export function subjectOf(matrix: Matrix, settings: Settings): Subject & { asked: Float64Array[] } {
  const asked: Float64Array[] = [];
  const ports = Math.sqrt(matrix(1e9).length);
  const ohm = settings.referenceOhm ?? 50;
  const referenceOhm = Float64Array.from({ length: ports * 2 }, (_, k) => (k % 2 === 0 ? ohm : 0));
  const network = (frequenciesHz: Float64Array): Network => ({
    ports,
    frequenciesHz,
    referenceOhm,
    s: Float64Array.from(Array.from(frequenciesHz).flatMap((f) => matrix(f).flat())),
  });
  const signaling: Signaling = ports === 4 ? 'differential' : 'single-ended';
  const { grid, parts = [], gridHz = [grid[0]!, grid.at(-1)!], from, to } = settings;
  const evaluate = (frequenciesHz: Float64Array): Network => {
    asked.push(frequenciesHz);
    frequenciesHz.forEach((f, k) => {
      if (k > 0 && !(f > frequenciesHz[k - 1]!))
        throw new Error(`asked at ${f} after ${frequenciesHz[k - 1]}`);
      for (const part of parts) {
        if (f < part.fromHz || f > part.toHz) throw new Error(`asked at ${f} beyond ${part.what}`);
      }
    });
    return network(frequenciesHz);
  };
  return { signaling, from, to, gridHz, grid: network(grid), parts, evaluate, asked };
}

/** Frequencies from `fromHz` by `stepHz`. */
export function uniform(fromHz: number, stepHz: number, points: number): Float64Array {
  return Float64Array.from({ length: points }, (_, k) => fromHz + k * stepHz);
}

/** A matched two-port of that loss and delay. */
export function lossy(lossDb: (frequencyHz: number) => number, delayS = 0): Matrix {
  return (f) => {
    const size = 10 ** (-lossDb(f) / 20);
    const s21 = [
      size * Math.cos(2 * Math.PI * f * delayS),
      -size * Math.sin(2 * Math.PI * f * delayS),
    ] as const;
    return [[0, 0], s21, s21, [0, 0]];
  };
}

/** Two matched legs that do not couple, each with its loss and delay. */
export function legs(p: Matrix, n: Matrix): Matrix {
  const zero = [0, 0] as const;
  return (f) => {
    const [sp, sn] = [p(f)[1]!, n(f)[1]!];
    return [zero, zero, sp, zero, zero, zero, zero, sn, sp, zero, zero, zero, zero, sn, zero, zero];
  };
}

export function judge(limit: Partial<Limit>, subject: Subject): Judgement {
  const whole = { id: 'L', title: 'L', quantity: 'insertion-loss', sense: 'max', ...limit } as const;
  const compiled = compileMask(whole, 'limits[0]');
  if (!compiled.ok) throw new Error(JSON.stringify(compiled.problems));
  return judgeLimit(whole, compiled.mask, subject);
}
