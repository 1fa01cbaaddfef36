import { closeSync, openSync, readFileSync, writeSync } from 'node:fs';
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
import { solveSection, type FieldSection } from '@tollgate/lines';
import { readTouchstone, writeTouchstoneChunks } from '@tollgate/touchstone';

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

function median(work: () => void, runs: number): number {
  work();
  const times = Array.from({ length: runs }, () => {
    const started = performance.now();
    work();
    return (performance.now() - started) / 1000;
  }).sort((a, b) => a - b);
  return times[runs >> 1]!;
}

function print(job: string, seconds: number): void {
  process.stdout.write(`${job} ${seconds}\n`);
}

function cascades(ports: CascadePorts, runs: number): void {
  const points = 2001;
  const sections = Array.from({ length: 20 }, () => randomS(ports, points));
  const out = new Float64Array(points * ports * ports * 2);
  print(
    `cascade-${ports}-ports-20x2001`,
    median(() => cascadeAll(sections, ports, points, out), runs),
  );
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

function writeNetwork(path: string, network: Network): void {
  const file = openSync(path, 'w');
  for (const bytes of writeTouchstoneChunks(network, { version: '1.1' })) writeSync(file, bytes);
  closeSync(file);
}

const um = 1e-6;
const outer = {
  sheets: [{ thicknessM: 100 * um, dk: 4 }],
  planeAbove: false,
  trace: { widthM: 150 * um, thicknessM: 35 * um, etchAngleDeg: 70 },
  traceAtM: 100 * um,
} satisfies FieldSection;
const strip: FieldSection = {
  sheets: [
    { thicknessM: 120 * um, dk: 3.8 },
    { thicknessM: 140 * um, dk: 4.2 },
  ],
  planeAbove: true,
  trace: { widthM: 110 * um, thicknessM: 17 * um, etchAngleDeg: 75 },
  traceAtM: 120 * um,
};
const maskedPair: FieldSection = { ...outer, gapM: 150 * um, mask: { thicknessM: 20 * um, dk: 3.5 } };

/** Cross-sections by the field solution: the slower of two single ones, and a pair under mask. */
function crossSections(): void {
  const single = Math.max(...[strip, outer].map((section) => median(() => solveSection(section), 5)));
  print('crossSection', single);
  print(
    'crossSectionMaskedPair',
    median(() => solveSection(maskedPair), 5),
  );
}

function main(): void {
  const [path, folder] = process.argv.slice(2);
  if (!path || !folder) throw new Error('Name the file of the reading job and a folder.');
  const network = longMeasurement();
  writeNetwork(path, network);
  cascades(2, 401);
  cascades(4, 101);
  print('trials', median(trials, 3));
  print(
    'read-4x10000',
    median(() => readTouchstone('long.s4p', readFileSync(path)), 7),
  );
  print(
    'write-4x10000',
    median(() => writeNetwork(join(folder, 'ours.s4p'), network), 5),
  );
  crossSections();
}

main();
