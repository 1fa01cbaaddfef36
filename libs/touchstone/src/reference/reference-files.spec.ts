import { createHash } from 'node:crypto';
import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { assessQuality, largestSingularValue, type Network } from '@tollgate/network';
import { describeWith, referenceData, scikitRf } from '../../../../test/support/needs';
import { readTouchstone, TouchstoneError } from '../index';
import { packagedRows } from './packaged-rows';
import { referenceRows } from './reference-rows';

const { path: folder } = referenceData('touchstone');
const read = (path: string): ReturnType<typeof readTouchstone> => readTouchstone(path, readFileSync(path));

function largestOf({ ports, frequenciesHz, s }: Network): number {
  const at = [...frequenciesHz.keys()].map((k) => largestSingularValue(s, ports, k * ports * ports * 2));
  return at.reduce((largest, value) => Math.max(largest, value), 0);
}

function largestAsymmetry(ports: number, s: Float64Array): number {
  let largest = 0;
  const size = ports * ports;
  for (let entry = 0; entry < s.length / 2; entry++) {
    const inPoint = entry % size;
    const other = entry - inPoint + (inPoint % ports) * ports + Math.floor(inPoint / ports);
    largest = Math.max(
      largest,
      Math.hypot(s[entry * 2]! - s[other * 2]!, s[entry * 2 + 1]! - s[other * 2 + 1]!),
    );
  }
  return largest;
}

/** Other programs' files, read where they are; without them the tests of our own files beside this one remain. */
describeWith(referenceData('touchstone'), 'files of the reference folder', () => {
  it('all stand in the table', () => {
    const files = readdirSync(folder).filter((file) => !file.endsWith('.md'));
    expect(files.sort()).toEqual(referenceRows.map(([file]) => file).sort());
  });
  it.each(referenceRows.filter((row) => row.length === 2))('refuses %s', (file, reason) => {
    expect(() => read(join(folder, file))).toThrow(reason);
  });
  it.each(referenceRows.filter((row) => row.length === 7))(
    'reads %s: %i ports, %i points, %d to %d Hz',
    (file, ports, points, fromHz, toHz, singular, asymmetry) => {
      const { network } = read(join(folder, file));
      expect(network.ports).toBe(ports);
      expect(network.frequenciesHz).toHaveLength(points);
      expect(network.frequenciesHz[0]).toBeCloseTo(fromHz, 3);
      expect(Math.abs(network.frequenciesHz[points - 1]! - toHz)).toBeLessThanOrEqual(1e-5 * toHz);
      expect(Math.abs(largestOf(network) - singular)).toBeLessThan(0.51e-4);
      const found = largestAsymmetry(ports, network.s);
      expect(Math.abs(found - asymmetry)).toBeLessThan(Math.max(1e-12, 0.051 * asymmetry));
    },
  );
  it('score the quality figures published for them (IEEE 370 reference code)', () => {
    const scores = (file: string): number[] => {
      const quality = assessQuality(read(join(folder, file)).network);
      return [quality.causality!.percent, quality.passivity.percent, quality.reciprocity!.percent];
    };
    const published = [
      ['pcb_stripline_119mm.s2p', [9.7139, 99.9999, 94.1444]],
      ['cable1_rx_pair.s4p', [97.717, 100, 99.188]],
      ['p370_diff_fdf.s4p', [99.96592, 100, 100]],
    ] as const;
    for (const [file, wanted] of published) {
      scores(file).forEach((percent, k) => expect(Math.abs(percent - wanted[k]!)).toBeLessThan(5e-4));
    }
  });
});

/** By the first digits of the SHA-256: some files stand there twice. */
function packagedFiles(): Map<string, string> {
  const files = (readdirSync(scikitRf.path, { recursive: true }) as string[]).filter((file) =>
    /\.s\d+p$/i.test(file),
  );
  return new Map(
    files.map((file) => {
      const path = join(scikitRf.path, file);
      return [createHash('sha256').update(readFileSync(path)).digest('hex').slice(0, 12), path];
    }),
  );
}

describeWith(scikitRf, 'files that Debian installs with python3-scikit-rf', () => {
  it('all stand in the table', () => {
    expect([...packagedFiles().keys()].sort()).toEqual(packagedRows.map(([sha256]) => sha256));
  });
  it.each(packagedRows.filter((row) => row.length === 2))(
    'refuses %s with the line and how to mend it',
    (sha256, reason) => {
      const attempt = () => read(packagedFiles().get(sha256)!);
      expect(attempt).toThrow(TouchstoneError);
      expect(attempt).toThrow(reason);
      expect(attempt).toThrow(
        expect.objectContaining({ line: expect.any(Number), mend: expect.stringMatching(/\w/) }),
      );
    },
  );
  it.each(packagedRows.filter((row) => row.length === 6))(
    'reads %s: %i ports, %i points, %d to %d Hz',
    (sha256, ports, points, fromHz, toHz, singular) => {
      const { network } = read(packagedFiles().get(sha256)!);
      expect([network.ports, network.frequenciesHz.length]).toEqual([ports, points]);
      expect([network.frequenciesHz[0], network.frequenciesHz[points - 1]]).toEqual([fromHz, toHz]);
      expect(Math.abs(largestOf(network) - singular)).toBeLessThan(0.51e-4);
    },
  );
});
