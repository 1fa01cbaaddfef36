import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { assessQuality, largestSingularValue } from '@tollgate/network';
import { readTouchstone, TouchstoneError } from '../index';
import { referenceRows } from './reference-rows';

const root = resolve(__dirname, '../../../..');
const folder = join(process.env['TOLLGATE_REFERENCE'] ?? join(root, '../shared/reference'), 'touchstone');
const packaged = '/usr/lib/python3/dist-packages/skrf';
const read = (path: string): ReturnType<typeof readTouchstone> => readTouchstone(path, readFileSync(path));

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

/** Other programs' files, read where they are installed; without them the tests of our own files beside this one remain. */
const whenFolder = existsSync(folder) ? describe : describe.skip;
const whenPackaged = existsSync(packaged) ? describe : describe.skip;

whenFolder('files of the reference folder', () => {
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
      let largest = 0;
      for (let k = 0; k < points; k++) {
        largest = Math.max(largest, largestSingularValue(network.s, ports, k * ports * ports * 2));
      }
      expect(Math.abs(largest - singular)).toBeLessThan(0.51e-4);
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

whenPackaged('files that Debian installs with python3-scikit-rf', () => {
  const files = (readdirSync(packaged, { recursive: true }) as string[]).filter((file) =>
    /\.s\d+p$/i.test(file),
  );
  it('are many', () => expect(files.length).toBeGreaterThan(50));
  it.each(files)('%s is read whole, or refused with the line and the reason', (file) => {
    try {
      const { network } = read(join(packaged, file));
      expect(network.s).toHaveLength(network.frequenciesHz.length * network.ports ** 2 * 2);
      expect(network.s.every(Number.isFinite)).toBe(true);
    } catch (error) {
      expect(error).toBeInstanceOf(TouchstoneError);
      expect((error as TouchstoneError).reason).not.toBe('');
      expect((error as TouchstoneError).mend).not.toBe('');
      expect(`${file}: ${(error as TouchstoneError).reason}`).toMatch(/stands twice|holds no network data/);
    }
  });
});
