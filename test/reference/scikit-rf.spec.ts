import { largestSingularValue } from '@tollgate/network';
import fc from 'fast-check';
import { describeWith, scikitRf } from '../support/needs';
import {
  complexReferenceChannel,
  differentialChannel,
  singleEndedChannel,
  veryLossyChannel,
  type RandomChannel,
} from './arbitrary-channels';
import { byEngine, byScikitRf, largestDistance, type Evaluated } from './evaluate';
import { solveByKirchhoff } from './kirchhoff';

/** Drawn once: every channel is checked by the engine, by Kirchhoff's laws and by scikit-rf, in one process for all. */
const draw = (arbitrary: fc.Arbitrary<RandomChannel>, numRuns: number, seed: number) =>
  fc.sample(arbitrary, { numRuns, seed });
const channels = [...draw(singleEndedChannel, 105, 20261201), ...draw(differentialChannel, 105, 20261202)];
let evaluated: Evaluated[] = [];

beforeAll(() => {
  evaluated = channels.map(byEngine);
}, 60_000);

/** Channels whose S are further apart than `tolerance`, with what one needs to look at them. */
function apart(s: readonly Float64Array[], tolerance: number) {
  return s.flatMap((other, k) => {
    const distance = largestDistance(evaluated[k]!.s, other);
    return distance <= tolerance ? [] : [{ k, distance, document: channels[k]!.document }];
  });
}

const kirchhoff = ({ channel, frequenciesHz }: Evaluated, { parts }: RandomChannel) =>
  solveByKirchhoff(channel, [...frequenciesHz], parts);

describe('210 random channels', () => {
  it('are of 3 to 30 elements of every circuit kind, with 0 Hz and resonances of stubs among their frequencies', () => {
    const rows = evaluated.map(({ channel }) => channel.elements);
    const lengths = rows.map((row) => row.length);
    expect([Math.min(...lengths), Math.max(...lengths)]).toEqual([3, 30]);
    const kinds = new Set(rows.flat().map(({ kind }) => kind));
    expect([...kinds].sort()).toEqual([
      ...[
        'attenuator',
        'budget-loss',
        'capacitor',
        'connector',
        'coupled-line',
        'line',
        'line-pair',
        'pair-series',
      ],
      ...['pair-shunt', 'pi', 'rlgc-line', 'series', 'shunt', 'stub', 'tee', 'touchstone', 'transformer'],
    ]);
    expect(evaluated.filter(({ frequenciesHz }) => frequenciesHz[0] === 0).length).toBeGreaterThan(20);
    const shorted = evaluated.filter(({ s }) => s.every(Number.isFinite) && passesLittle(s));
    expect(shorted.length).toBeGreaterThan(20);
  });
  it("agree with Kirchhoff's laws, solved at all joints at once, to 1e-10", () => {
    expect(
      apart(
        evaluated.map((one, k) => kirchhoff(one, channels[k]!)),
        1e-10,
      ),
    ).toEqual([]);
  }, 120_000);
});

describe('210 random channels of passive elements', () => {
  it('let out no more power than comes in', () => {
    for (const { s, frequenciesHz } of evaluated) {
      const ports = Math.sqrt(s.length / frequenciesHz.length / 2);
      for (let at = 0; at < s.length; at += ports * ports * 2) {
        expect(largestSingularValue(s, ports, at)).toBeLessThan(1 + 1e-12);
      }
    }
  });
  it('are reciprocal where all their elements are', () => {
    const reciprocal = evaluated.filter(({ texts }) => texts.size === 0);
    expect(reciprocal.length).toBeGreaterThan(50);
    for (const { s, frequenciesHz } of reciprocal) {
      const ports = Math.sqrt(s.length / frequenciesHz.length / 2);
      const turned = Float64Array.from(s, (_, k) => {
        const [entry, part] = [k >> 1, k & 1];
        const inside = entry % (ports * ports);
        const other = entry - inside + (inside % ports) * ports + Math.floor(inside / ports);
        return s[other * 2 + part]!;
      });
      expect(largestDistance(s, turned)).toBeLessThan(1e-13);
    }
  });
});

describeWith(scikitRf, '210 random channels, in scikit-rf 0.15.4', () => {
  it('agree to 1e-6', () => {
    const { version, s } = byScikitRf(evaluated);
    expect(version).toBe('0.15.4');
    expect(s).toHaveLength(210);
    expect(apart(s, 1e-6)).toEqual([]);
  }, 180_000);
});

describe('60 random channels between complex, unequal references', () => {
  it("agree with Kirchhoff's laws for power waves to 1e-10", () => {
    for (const channel of draw(complexReferenceChannel, 60, 20261203)) {
      const one = byEngine(channel);
      expect(largestDistance(one.s, kirchhoff(one, channel))).toBeLessThan(1e-10);
    }
  }, 60_000);
});

describe('60 random channels of very lossy elements', () => {
  it("agree with Kirchhoff's laws to 1e-10, and S21 to 1e-8 of itself down to -220 dB", () => {
    let deepestDb = 0;
    for (const channel of draw(veryLossyChannel, 60, 20261204)) {
      const one = byEngine(channel);
      const other = kirchhoff(one, channel);
      expect(largestDistance(one.s, other)).toBeLessThan(1e-10);
      for (let at = 4; at < other.length; at += 8) {
        const size = Math.hypot(other[at]!, other[at + 1]!);
        if (size < 10 ** (-220 / 20)) continue;
        deepestDb = Math.max(deepestDb, -20 * Math.log10(size));
        expect(Math.hypot(one.s[at]! - other[at]!, one.s[at + 1]! - other[at + 1]!)).toBeLessThan(
          1e-8 * size,
        );
      }
    }
    expect(deepestDb).toBeGreaterThan(200);
  }, 60_000);
});

/** Whether at some frequency next to nothing reaches the far end. */
function passesLittle(s: Float64Array): boolean {
  for (let at = s.length === 40 ? 4 : 16; at < s.length; at += s.length / 5) {
    if (Math.hypot(s[at]!, s[at + 1]!) < 1e-9) return true;
  }
  return false;
}
