import { readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { twoPortInto, type TwoPortKind } from '@tollgate/elements';
import type { ElementOf } from '@tollgate/contracts';
import {
  cascadeAll,
  cascadeInto,
  uniformReference,
  type CascadePorts,
  type Network,
} from '@tollgate/network';
import { readTouchstone, writeTouchstone } from '@tollgate/touchstone';

/**
 * The jobs of the bench in this engine, one thread. Prints one line "job seconds" each, the median of several runs.
 * Arguments: the Touchstone file of the reading job (written here first) and a folder for the writing job.
 */
let seed = 1;
function uniform(): number {
  seed = (Math.imul(seed, 1664525) + 1013904223) >>> 0;
  return seed / 4294967296;
}

function randomS(ports: number, points: number): Float64Array {
  return Float64Array.from({ length: points * ports * ports * 2 }, () => (uniform() - 0.5) * 0.6);
}

function measure(job: string, work: () => void, runs: number): void {
  work();
  const times = Array.from({ length: runs }, () => {
    const started = performance.now();
    work();
    return (performance.now() - started) / 1000;
  }).sort((a, b) => a - b);
  process.stdout.write(`${job} ${times[runs >> 1]}\n`);
}

function cascades(ports: CascadePorts, runs: number): void {
  const points = 2001;
  const sections = Array.from({ length: 20 }, () => randomS(ports, points));
  const out = new Float64Array(points * ports * ports * 2);
  measure(`cascade-${ports}-ports-20x2001`, () => cascadeAll(sections, ports, points, out), runs);
}

const trialPoints = 500;

/** Element k of a channel, with values of its own: of four, two lines, a series R-L and a shunt C. */
function randomElement(k: number): ElementOf<TwoPortKind> {
  if (k % 4 === 1) return { kind: 'series', resistanceOhm: uniform(), inductanceH: uniform() * 1e-10 };
  if (k % 4 === 3) return { kind: 'shunt', capacitanceF: uniform() * 1e-13 };
  return {
    kind: 'line',
    z0Ohm: 40 + 20 * uniform(),
    lengthM: 0.02 * uniform(),
    effectivePermittivity: 3 + uniform(),
    lossSqrtDbPerM: 5 * uniform(),
    lossLinearDbPerM: 5 * uniform(),
  };
}

/** A thousand channels of twenty random elements, built and cascaded. */
function trials(): void {
  const frequenciesHz = Float64Array.from({ length: trialPoints }, (_unused, k) => (k + 1) * 4e7);
  const s = new Float64Array(trialPoints * 8);
  const next = new Float64Array(trialPoints * 8);
  for (let trial = 0; trial < 1000; trial++) {
    twoPortInto(s, randomElement(0), frequenciesHz, 50);
    for (let k = 1; k < 20; k++) {
      twoPortInto(next, randomElement(k), frequenciesHz, 50);
      cascadeInto(s, s, next, 2, trialPoints);
    }
  }
}

/** Ten thousand points of four ports, about as large as a long measurement. */
function longMeasurement(): Network {
  const points = 10_000;
  return {
    ports: 4,
    frequenciesHz: Float64Array.from({ length: points }, (_unused, k) => (k + 1) * 4e6),
    s: randomS(4, points),
    referenceOhm: uniformReference(4, 50),
  };
}

function main(): void {
  const [path, folder] = process.argv.slice(2);
  if (!path || !folder) throw new Error('Name the file of the reading job and a folder.');
  const network = longMeasurement();
  writeFileSync(path, writeTouchstone(network, { version: '1.1' }));
  cascades(2, 101);
  cascades(4, 51);
  measure('trials-1000x20x500', trials, 5);
  measure('read-4x10000', () => readTouchstone('long.s4p', readFileSync(path)), 7);
  const written = join(folder, 'ours.s4p');
  measure('write-4x10000', () => writeFileSync(written, writeTouchstone(network, { version: '1.1' })), 5);
}

main();
