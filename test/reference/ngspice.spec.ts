import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import fc from 'fast-check';
import { describeWith, ngspice } from '../support/needs';
import { circuitOfDifferential, circuitOfSingleEnded, spiceGrid } from './arbitrary-channels';
import { byEngine, largestDistance, type Evaluated } from './evaluate';
import { netlistOf, scatteringFrom } from './ngspice-netlist';

function bySpice({ channel, frequenciesHz }: Evaluated): Float64Array {
  const work = mkdtempSync(join(tmpdir(), 'tg-ngspice-'));
  try {
    const file = join(work, 'channel.cir');
    writeFileSync(file, netlistOf(channel, spiceGrid));
    const printed = execFileSync(ngspice.path, ['-b', file], { cwd: work, stdio: 'pipe' }).toString();
    return scatteringFrom(printed, channel.signaling === 'differential' ? 4 : 2, frequenciesHz.length);
  } finally {
    rmSync(work, { recursive: true, force: true });
  }
}

describeWith(ngspice, 'random channels of lumped elements and lines, in ngspice `.sp`', () => {
  it.each([
    ['single-ended', circuitOfSingleEnded],
    ['differential', circuitOfDifferential],
  ] as const)(
    '12 %s ones agree to 1e-6',
    (_, arbitrary) => {
      for (const channel of fc.sample(arbitrary, { numRuns: 12, seed: 20261205 })) {
        const one = byEngine(channel);
        const distance = largestDistance(one.s, bySpice(one));
        if (!(distance < 1e-6)) throw new Error(`Apart by ${distance}: ${JSON.stringify(channel.document)}`);
      }
    },
    60_000,
  );
});
