import { readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { buildElement, type BuildContext } from '@tollgate/elements';
import type { ChannelElement } from '@tollgate/contracts';
import {
  cascadeAll,
  cascadeInto,
  through,
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

/** Twenty elements with values of their own: ten lines, five series R-L, five shunt C. */
function randomElements(): ChannelElement[] {
  return Array.from({ length: 20 }, (_unused, k): ChannelElement => {
    if (k % 4 === 1) {
      return { kind: 'series', resistanceOhm: uniform(), inductanceH: uniform() * 1e-10 };
    }
    if (k % 4 === 3) return { kind: 'shunt', capacitanceF: uniform() * 1e-13 };
    return {
      kind: 'line',
      z0Ohm: 40 + 20 * uniform(),
      lengthM: 0.02 * uniform(),
      effectivePermittivity: 3 + uniform(),
      lossSqrtDbPerM: 5 * uniform(),
      lossLinearDbPerM: 5 * uniform(),
    };
  });
}

/** A thousand channels of random elements, built and cascaded. */
function trials(): void {
  const frequenciesHz = Float64Array.from({ length: trialPoints }, (_unused, k) => (k + 1) * 4e7);
  const context: BuildContext = { signaling: 'single-ended', jointOhm: 50, parts: new Map() };
  const s = through(2, trialPoints);
  for (let trial = 0; trial < 1000; trial++) {
    const elements = randomElements();
    s.set(buildElement(elements[0]!, frequenciesHz, context).s);
    for (let k = 1; k < elements.length; k++) {
      cascadeInto(s, s, buildElement(elements[k]!, frequenciesHz, context).s, 2, trialPoints);
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
