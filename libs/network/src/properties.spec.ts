import fc from 'fast-check';
import type { Network } from './index';
import {
  abcdToS2Into,
  abcdToS4Into,
  cascade,
  cascadeAll,
  cascadeInto,
  connect,
  deembedFar,
  deembedNear,
  fromMixedMode,
  largestSingularValue,
  leaveOneOutInto,
  prefixCascades,
  renormalize,
  reversePorts,
  sToAbcd2Into,
  sToAbcd4Into,
  sToTInto,
  suffixCascades,
  through,
  toMixedMode,
  tToSInto,
  uniformReference,
} from './index';
import { arbitraryReference, arbitraryS, largestDifference } from './testing/samples';

const runs = { numRuns: 200, seed: 370 };
const points = 3;
const frequenciesHz = Float64Array.of(1e9, 2e9, 3e9);
const network = (ports: number, s: Float64Array, referenceOhm = uniformReference(ports, 50)): Network => ({
  ports,
  frequenciesHz,
  s,
  referenceOhm,
});
const transposed = (ports: number, s: Float64Array): Float64Array => {
  const out = new Float64Array(s.length);
  for (let k = 0; k < s.length; k++) {
    const entry = k >> 1;
    const inPoint = entry % (ports * ports);
    const to = entry - inPoint + (inPoint % ports) * ports + Math.floor(inPoint / ports);
    out[to * 2 + (k & 1)] = s[k]!;
  }
  return out;
};

describe.each([2, 4] as const)('cascade of %i ports', (ports) => {
  const any = (): fc.Arbitrary<Float64Array> => arbitraryS(ports, points);
  const join = (a: Float64Array, b: Float64Array): Float64Array => {
    const out = new Float64Array(a.length);
    cascadeInto(out, a, b, ports, points);
    return out;
  };

  it('is associative', () => {
    fc.assert(
      fc.property(any(), any(), any(), (a, b, c) => {
        expect(largestDifference(join(join(a, b), c), join(a, join(b, c)))).toBeLessThan(1e-12);
      }),
      runs,
    );
  });
  it('leaves a network alone that is joined to the through on either side', () => {
    fc.assert(
      fc.property(any(), (a) => {
        expect(largestDifference(join(a, through(ports, points)), a)).toBeLessThan(1e-15);
        expect(largestDifference(join(through(ports, points), a), a)).toBeLessThan(1e-15);
      }),
      runs,
    );
  });
  it('of passive parts is passive', () => {
    fc.assert(
      fc.property(any(), any(), (a, b) => {
        const s = join(a, b);
        for (let point = 0; point < points; point++) {
          expect(largestSingularValue(s, ports, point * ports * ports * 2)).toBeLessThan(1 + 1e-12);
        }
      }),
      runs,
    );
  });
  it('of reciprocal parts is reciprocal', () => {
    const symmetric = arbitraryS(ports, points, 0.98, true);
    fc.assert(
      fc.property(symmetric, symmetric, (a, b) => {
        const s = join(a, b);
        expect(largestDifference(s, transposed(ports, s))).toBeLessThan(1e-14);
      }),
      runs,
    );
  });
  it('turned round is the cascade of the turned parts in reverse order, and turning twice is identity', () => {
    fc.assert(
      fc.property(any(), any(), (a, b) => {
        const [left, right] = [network(ports, a), network(ports, b)];
        const turned = reversePorts(cascade(left, right));
        expect(largestDifference(turned.s, cascade(reversePorts(right), reversePorts(left)).s)).toBeLessThan(
          1e-14,
        );
        expect(reversePorts(reversePorts(left)).s).toEqual(a);
      }),
      runs,
    );
  });
  it('is not the product of the scattering matrices', () => {
    const a = through(ports, 1);
    const joined = new Float64Array(a.length);
    cascadeInto(joined, a, a, ports, 1);
    // The square of a through's matrix is the unit matrix, the cascade is the through again.
    expect(joined).toEqual(a);
    expect(joined[0]).not.toBe(1);
  });
  it('agrees with the block form for connected ports', () => {
    fc.assert(
      fc.property(any(), any(), (a, b) => {
        const half = ports / 2;
        const ends = [...Array(half).keys()];
        const joined = connect(
          [network(ports, a), network(ports, b)],
          ends.map((k) => [
            { network: 0, port: half + k },
            { network: 1, port: k },
          ]),
          [
            ...ends.map((port) => ({ network: 0, port })),
            ...ends.map((k) => ({ network: 1, port: half + k })),
          ],
        );
        expect(largestDifference(joined.s, join(a, b))).toBeLessThan(1e-13);
      }),
      runs,
    );
  });
  it('of prefixes and suffixes gives the chain with one section left out', () => {
    fc.assert(
      fc.property(fc.array(any(), { minLength: 1, maxLength: 6 }), fc.nat(), (sections, pick) => {
        const index = pick % sections.length;
        const prefixes = prefixCascades(sections, ports, points);
        const suffixes = suffixCascades(sections, ports, points);
        const out = new Float64Array(sections[0]!.length);
        leaveOneOutInto(out, prefixes, suffixes, index, ports, points);
        const rest = sections.filter((_, k) => k !== index);
        expect(largestDifference(out, cascadeAll(rest, ports, points))).toBeLessThan(1e-12);
        expect(largestDifference(prefixes.at(-1)!, suffixes[0]!)).toBeLessThan(1e-12);
      }),
      runs,
    );
  });
  it('is undone by de-embedding either part', () => {
    fc.assert(
      fc.property(any(), any(), (a, b) => {
        // A fixture must pass something: the random part is added to a through.
        const fixtureS = through(ports, points).map((value, k) => 0.7 * value + 0.25 * a[k]!);
        const [fixture, part] = [network(ports, fixtureS), network(ports, b)];
        expect(largestDifference(deembedNear(cascade(fixture, part), fixture).s, b)).toBeLessThan(1e-11);
        expect(largestDifference(deembedFar(cascade(part, fixture), fixture).s, b)).toBeLessThan(1e-11);
      }),
      runs,
    );
  });
  it('keeps its result when one output array serves as input too', () => {
    fc.assert(
      fc.property(any(), any(), (a, b) => {
        const expected = join(a, b);
        const [left, right] = [a.slice(), b.slice()];
        cascadeInto(left, left, b, ports, points);
        cascadeInto(right, a, right, ports, points);
        expect(left).toEqual(expected);
        expect(right).toEqual(expected);
      }),
      runs,
    );
  });
});

describe('conversions', () => {
  const references = (ports: number): fc.Arbitrary<Float64Array> => arbitraryReference(ports, true);
  const passing = (ports: 2 | 4): fc.Arbitrary<Float64Array> =>
    arbitraryS(ports, points).map((a) =>
      through(ports, points).map((value, k) => 0.6 * value + 0.35 * a[k]!),
    );

  it('from S to ABCD to S are identity for 2 ports with complex, unequal references', () => {
    fc.assert(
      fc.property(passing(2), references(2), (s, z) => {
        const out = new Float64Array(s.length);
        sToAbcd2Into(out, s, points, z);
        abcdToS2Into(out, out, points, z);
        expect(largestDifference(out, s)).toBeLessThan(1e-11);
      }),
      runs,
    );
  });
  it('from S to ABCD to S are identity for 2 + 2 ports with complex, unequal references', () => {
    fc.assert(
      fc.property(passing(4), references(4), (s, z) => {
        const out = new Float64Array(s.length);
        sToAbcd4Into(out, s, points, z);
        abcdToS4Into(out, out, points, z);
        expect(largestDifference(out, s)).toBeLessThan(1e-10);
      }),
      runs,
    );
  });
  it.each([2, 4] as const)('from S to T to S are identity for %i ports', (ports) => {
    fc.assert(
      fc.property(passing(ports), (s) => {
        const out = new Float64Array(s.length);
        sToTInto(out, s, ports, points);
        tToSInto(out, out, ports, points);
        expect(largestDifference(out, s)).toBeLessThan(1e-12);
      }),
      runs,
    );
  });
  it('to mixed mode and back are identity, and keep passive what is passive', () => {
    fc.assert(
      fc.property(arbitraryS(4, points), (s) => {
        const mixed = toMixedMode(network(4, s));
        expect(largestDifference(fromMixedMode(mixed).s, s)).toBeLessThan(1e-15);
        expect(largestSingularValue(mixed.s, 4)).toBeCloseTo(largestSingularValue(s, 4), 13);
        expect([...mixed.referenceOhm]).toEqual([100, 0, 100, 0, 25, 0, 25, 0]);
      }),
      runs,
    );
  });
  it.each([1, 2, 3, 5])('to other references and back are identity for %i ports', (ports) => {
    fc.assert(
      fc.property(arbitraryS(ports, points), references(ports), references(ports), (s, from, to) => {
        const there = renormalize(network(ports, s, from), to);
        expect(largestDifference(renormalize(there, from).s, s)).toBeLessThan(1e-11);
      }),
      runs,
    );
  });
  it('to other references keep passive what is passive (power waves)', () => {
    fc.assert(
      fc.property(arbitraryS(3, points, 0.9), references(3), references(3), (s, from, to) => {
        const there = renormalize(network(3, s, from), to);
        for (let point = 0; point < points; point++) {
          expect(largestSingularValue(there.s, 3, point * 18)).toBeLessThan(1 + 1e-12);
        }
      }),
      runs,
    );
  });
  it('of two ports through ABCD and through renormalisation agree', () => {
    fc.assert(
      fc.property(passing(2), references(2), references(2), (s, from, to) => {
        const chain = new Float64Array(s.length);
        sToAbcd2Into(chain, s, points, from);
        abcdToS2Into(chain, chain, points, to);
        expect(largestDifference(chain, renormalize(network(2, s, from), to).s)).toBeLessThan(1e-10);
      }),
      runs,
    );
  });
  it('of the chain matrix of 2 + 2 ports multiply to the cascade', () => {
    fc.assert(
      fc.property(passing(4), passing(4), (a, b) => {
        const z = uniformReference(4, 50);
        const [ta, tb] = [new Float64Array(a.length), new Float64Array(b.length)];
        sToTInto(ta, a, 4, points);
        sToTInto(tb, b, 4, points);
        const product = new Float64Array(a.length);
        for (let k = 0; k < points; k++) {
          for (let i = 0; i < 4; i++) {
            for (let j = 0; j < 4; j++) {
              let re = 0;
              let im = 0;
              for (let m = 0; m < 4; m++) {
                const p = ((k * 4 + i) * 4 + m) * 2;
                const q = ((k * 4 + m) * 4 + j) * 2;
                re += ta[p]! * tb[q]! - ta[p + 1]! * tb[q + 1]!;
                im += ta[p]! * tb[q + 1]! + ta[p + 1]! * tb[q]!;
              }
              product[((k * 4 + i) * 4 + j) * 2] = re;
              product[((k * 4 + i) * 4 + j) * 2 + 1] = im;
            }
          }
        }
        tToSInto(product, product, 4, points);
        const joined = cascade(network(4, a, z), network(4, b, z));
        expect(largestDifference(product, joined.s)).toBeLessThan(1e-11);
      }),
      runs,
    );
  });
});
