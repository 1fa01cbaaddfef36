import { newElement, type ChannelElement, type Signaling } from '@tollgate/contracts';
import { largestSingularValue, toMixedModeInto } from '@tollgate/network';
import { readTouchstone } from '@tollgate/touchstone';
import * as fc from 'fast-check';
import {
  buildElement,
  elementCoverage,
  elementProblems,
  elementStanding,
  elementTollDb,
  ElementError,
  type BuildContext,
} from './index';

function context(
  signaling: Signaling = 'single-ended',
  parts: BuildContext['parts'] = new Map(),
): BuildContext {
  return { signaling, jointOhm: 50, parts };
}

function built(
  element: ChannelElement,
  frequenciesHz: number[],
  signaling: Signaling = 'single-ended',
): Float64Array {
  return buildElement(element, Float64Array.from(frequenciesHz), context(signaling)).s;
}

/** S11 re, im, S12 re, im, S21 re, im, S22 re, im of one frequency. */
function at(element: ChannelElement, frequencyHz: number): number[] {
  // A minus in front of 0 says nothing.
  return Array.from(built(element, [frequencyHz]), (value) => value + 0);
}

const c0 = 299_792_458;
const line = {
  kind: 'line',
  z0Ohm: 60,
  lengthM: c0 / 1e9 / 4,
  effectivePermittivity: 1,
  lossSqrtDbPerM: 0,
  lossLinearDbPerM: 0,
} as const;

describe('worked values (Pozar, Microwave Engineering, Table 4.1)', () => {
  it('quarter-wave line of 60 ohm in 50: S11 = 0.180328', () => {
    expect(at(line, 1e9)[0]).toBeCloseTo(0.180328, 6);
  });

  it('25 ohm in series: S11 = 0.2, S21 = 0.8', () => {
    const s = at({ kind: 'series', resistanceOhm: 25 }, 1e9);
    expect([s[0], s[4]]).toEqual([expect.closeTo(0.2, 12), expect.closeTo(0.8, 12)]);
  });

  it('50 ohm in shunt: S11 = -1/3, S21 = 2/3', () => {
    const s = at({ kind: 'shunt', resistanceOhm: 50 }, 1e9);
    expect([s[0], s[4]]).toEqual([expect.closeTo(-1 / 3, 12), expect.closeTo(2 / 3, 12)]);
  });

  it('10 dB pads as tee, pi and attenuator: matched, S21 = 0.316228', () => {
    const tee: ChannelElement = {
      kind: 'tee',
      near: { resistanceOhm: 25.9747 },
      shunt: { resistanceOhm: 35.1364 },
      far: { resistanceOhm: 25.9747 },
    };
    const pi: ChannelElement = {
      kind: 'pi',
      near: { resistanceOhm: 96.2475 },
      series: { resistanceOhm: 71.1512 },
      far: { resistanceOhm: 96.2475 },
    };
    const pad: ChannelElement = { kind: 'attenuator', attenuationDb: 10, z0Ohm: 50 };
    for (const element of [tee, pi, pad]) {
      const s = at(element, 1e9);
      expect(s[0]).toBeCloseTo(0, 5);
      expect(s[4]).toBeCloseTo(0.316228, 5);
    }
  });

  it('transformer n:1: S11 = (n^2 - 1)/(n^2 + 1)', () => {
    expect(at({ kind: 'transformer', turnsRatio: 2 }, 1e9)[0]).toBeCloseTo(0.6, 12);
  });
});

describe('singular points', () => {
  it('a series capacitor at 0 Hz is an open, a shunt one nothing', () => {
    expect(at({ kind: 'series', capacitanceF: 1e-9 }, 0).slice(0, 6)).toEqual([1, 0, 0, 0, 0, 0]);
    const shunt = at({ kind: 'shunt', capacitanceF: 1e-9 }, 0);
    expect(Math.hypot(shunt[4]! - 1, shunt[5]!)).toBe(0);
  });

  it('an ideal short in shunt lets nothing through', () => {
    const s = at({ kind: 'shunt', resistanceOhm: 0 }, 1e9);
    expect([s[0], s[4]]).toEqual([-1, 0]);
  });

  it.each([
    ['open', 1e9],
    ['short', 2e9],
  ] as const)('a stub that ends %s is a short at %d Hz', (end, frequencyHz) => {
    const s = at({ ...line, kind: 'stub', end }, frequencyHz);
    expect(s.every(Number.isFinite)).toBe(true);
    expect(Math.hypot(s[4]!, s[5]!)).toBeLessThan(1e-14);
  });

  it('a line of the least impedance there is stays finite at 0 Hz', () => {
    expect(at({ ...line, z0Ohm: 1e-6 }, 0).every(Number.isFinite)).toBe(true);
    expect(at({ kind: 'attenuator', attenuationDb: 0, z0Ohm: 1e-6 }, 0).every(Number.isFinite)).toBe(true);
  });

  it('a stub in its own impedance is that load wherever one looks', () => {
    const s = at({ ...line, z0Ohm: 50, kind: 'stub', end: 'load', load: { resistanceOhm: 50 } }, 0.7e9);
    expect(s[0]).toBeCloseTo(-1 / 3, 12);
  });

  it('a line of RLGC constants at 0 Hz is its resistance', () => {
    const s = at(
      {
        kind: 'rlgc-line',
        resistanceOhmPerM: 100,
        inductanceHPerM: 3e-7,
        conductanceSPerM: 0,
        capacitanceFPerM: 1e-10,
        lengthM: 0.25,
      },
      0,
    );
    expect([s[0], s[4]]).toEqual([expect.closeTo(0.2, 12), expect.closeTo(0.8, 12)]);
  });
});

describe('a long lossy line', () => {
  it('keeps the relative accuracy of S21 down to -220 dB', () => {
    const element: ChannelElement = { ...line, z0Ohm: 50, lengthM: 1, lossLinearDbPerM: 220 };
    const s = at(element, 1e9);
    expect(Math.hypot(s[4]!, s[5]!) / 10 ** (-220 / 20)).toBeCloseTo(1, 10);
    expect(elementTollDb(element, Float64Array.of(1e9), context())![0]).toBeCloseTo(220, 12);
  });
});

describe('pairs', () => {
  it('turn skew into conversion: SDD21 = cos(theta/2), SCD21 = sin(theta/2)', () => {
    const leg = { ...line, z0Ohm: 50 };
    const { kind: _kind, ...p } = leg;
    const theta = 0.1;
    const n = { ...p, lengthM: p.lengthM + (theta / (2 * Math.PI)) * (c0 / 1e9) };
    const s = built({ kind: 'line-pair', p, n }, [1e9], 'differential');
    const mixed = new Float64Array(32);
    toMixedModeInto(mixed, s, 1);
    const size = (row: number, column: number) =>
      Math.hypot(mixed[(row * 4 + column) * 2]!, mixed[(row * 4 + column) * 2 + 1]!);
    expect(size(1, 0)).toBeCloseTo(Math.cos(theta / 2), 10);
    expect(size(3, 0)).toBeCloseTo(Math.sin(theta / 2), 10);
  });

  it('refuse a single-ended channel', () => {
    expect(elementProblems(newElement('coupled-line', 'differential'), 'single-ended')[0]!.path).toBe('kind');
  });
});

describe('any circuit kind', () => {
  const kinds = [
    'line',
    'rlgc-line',
    'series',
    'shunt',
    'stub',
    'tee',
    'pi',
    'transformer',
    'attenuator',
    'budget-loss',
    'capacitor',
    'coupled-line',
    'line-pair',
    'pair-series',
    'pair-shunt',
    'connector',
  ] as const;

  it.each(kinds)('%s is finite, passive and reciprocal at every frequency', (kind) => {
    const element = newElement(kind, 'differential');
    fc.assert(
      fc.property(fc.double({ min: 0, max: 60e9, noNaN: true }), (frequencyHz) => {
        const s = built(element, [frequencyHz], 'differential');
        expect(s.every(Number.isFinite)).toBe(true);
        expect(largestSingularValue(s, 4, 0)).toBeLessThan(1 + 1e-9);
        for (let row = 0; row < 4; row++) {
          for (let column = 0; column < row; column++) {
            const [a, b] = [(row * 4 + column) * 2, (column * 4 + row) * 2];
            expect(Math.hypot(s[a]! - s[b]!, s[a + 1]! - s[b + 1]!)).toBeLessThan(1e-12);
          }
        }
      }),
      { numRuns: 200, seed: 20260601 },
    );
  });
});

describe('a Touchstone part', () => {
  const text = '# GHz S RI R 50\n1 0.1 0 0.9 0 0.9 0 0.1 0\n2 0.1 0 0.8 0 0.8 0 0.1 0\n';
  const part = { sha256: 'x', file: readTouchstone('part.s2p', new TextEncoder().encode(text)) };
  const parts = new Map([['part.s2p', part]]);
  const element: ChannelElement = {
    kind: 'touchstone',
    file: 'part.s2p',
    interpolation: 'polar',
    reversed: false,
    below: 'refuse',
    above: 'refuse',
  };

  function problemOf(of: ChannelElement, signaling: Signaling, known: BuildContext['parts']) {
    try {
      elementCoverage(of, context(signaling, known));
      return undefined;
    } catch (error) {
      if (error instanceof ElementError) return error.problem;
      throw error;
    }
  }

  it('answers within its band, and stands once in each leg of a pair', () => {
    expect(elementCoverage(element, context('single-ended', parts))[0]).toMatchObject({
      fromHz: 1e9,
      toHz: 2e9,
    });
    const { s } = buildElement(element, Float64Array.of(1e9), context('differential', parts));
    expect(s[(2 * 4 + 0) * 2]).toBeCloseTo(0.9, 12);
    expect(s[(3 * 4 + 1) * 2]).toBeCloseTo(0.9, 12);
  });

  it('that is not at hand is named', () => {
    expect(problemOf(element, 'single-ended', new Map())!.path).toBe('file');
  });

  it('of four ports wants an order, and is held against the data', () => {
    const rows = [
      '0 0',
      '0.01 0',
      '0.99 0',
      '0 0',
      '0.01 0',
      '0 0',
      '0 0',
      '0.99 0',
      '0.99 0',
      '0 0',
      '0 0',
      '0.01 0',
      '0 0',
      '0.99 0',
      '0.01 0',
      '0 0',
    ];
    const four = [
      '# GHz S RI R 50',
      ...[1, 2].map(
        (f) =>
          `${f} ${rows.slice(0, 4).join(' ')}\n${rows.slice(4, 8).join(' ')}\n${rows.slice(8, 12).join(' ')}\n${rows.slice(12).join(' ')}`,
      ),
      '',
    ].join('\n');
    const known = new Map([
      ['part.s2p', { sha256: 'y', file: readTouchstone('part.s4p', new TextEncoder().encode(four)) }],
    ]);
    expect(problemOf(element, 'differential', known)!.mend).toContain('1-3,2-4');
    expect(problemOf({ ...element, portOrder: '1-2,3-4' }, 'differential', known)!.mend).toContain('1-3,2-4');
    expect(problemOf({ ...element, portOrder: '1-3,2-4' }, 'differential', known)).toBeUndefined();
  });

  it('named twice or not at all is refused', () => {
    expect(
      elementProblems({ ...element, fileId: '00000000-0000-4000-8000-000000000000' }, 'single-ended')[0]!
        .message,
    ).toContain('twice');
    const { file: _file, ...nameless } = element;
    expect(elementProblems(nameless, 'single-ended')[0]!.path).toBe('file');
  });

  it('is measured or supplied only with source and date', () => {
    expect(elementStanding({ ...element, standing: 'measured' }).standing).toBe('assumed');
    const source = { text: 'bench, our own', date: '2026-05-01' };
    expect(elementStanding({ ...element, standing: 'measured', source }).standing).toBe('measured');
    expect(elementStanding({ ...element, source }).standing).toBe('supplied');
    expect(elementStanding({ ...element, standing: 'assumed', source }).standing).toBe('assumed');
  });
});
