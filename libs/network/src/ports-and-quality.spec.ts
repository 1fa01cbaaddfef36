import type { Network, PortOrder4 } from './index';
import {
  assessQuality,
  cascade2Into,
  cascade4Into,
  checkNetwork,
  connect,
  groupDelayS,
  insertionLossDb,
  maximumAvailableGain,
  NetworkError,
  pickPorts,
  portOrders4,
  portsOfOrder,
  reorderPorts,
  returnLossDb,
  testPortOrder,
  toMixedMode,
  tollDb,
  uniformReference,
  unwrappedPhaseRad,
} from './index';
import { onePoint } from './testing/samples';

const network = (ports: number, frequenciesHz: readonly number[], s: readonly number[]): Network => ({
  ports,
  frequenciesHz: Float64Array.from(frequenciesHz),
  s: Float64Array.from(s),
  referenceOhm: uniformReference(ports, 50),
});

/** A pair of legs with given transmission, ports near p, near n, far p, far n. */
function pair(p: number, n: number, cross = 0.05): Network {
  const s = new Float64Array(32);
  const put = (row: number, column: number, value: number): void => {
    s[(row * 4 + column) * 2] = value;
    s[(column * 4 + row) * 2] = value;
  };
  put(2, 0, p);
  put(3, 1, n);
  put(1, 0, cross);
  put(3, 2, cross);
  return network(4, [1e7], [...s]);
}

describe('port orders of 4-port files', () => {
  it.each(portOrders4)('%s is recognised by its through paths', (order) => {
    const ports = portsOfOrder(order);
    const file = reorderPorts(
      pair(0.97, 0.96),
      ports.map((_, k) => ports.indexOf(k as 0)),
    );
    const test = testPortOrder(file);
    expect(test.likely).toBe(order);
    expect(reorderPorts(file, ports).s).toEqual(pair(0.97, 0.96).s);
  });
  it('cannot be told where little passes, or where two orders are alike', () => {
    expect(testPortOrder(pair(0.2, 0.2, 0.01)).likely).toBeNull();
    expect(testPortOrder(pair(0.7, 0.7, 0.5)).likely).toBeNull();
    expect(testPortOrder(pair(0.7, 0.7, 0.3)).likely).toBe('1-3,2-4');
  });
  it('looks at the lowest decade only', () => {
    const low = pair(0.97, 0.97).s;
    const high = reorderPorts(pair(0.97, 0.97), [0, 2, 1, 3]).s;
    const file = network(4, [1e7, 1e8, 1.1e8, 2e8, 3e8], [...low, ...low, ...high, ...high, ...high]);
    expect(testPortOrder(file)).toMatchObject({ likely: '1-3,2-4', fromHz: 1e7, toHz: 1e8 });
  });
  it('matters: the wrong order turns a good pair into a plausible wrong loss', () => {
    const right = toMixedMode(pair(0.97, 0.97));
    const wrong = toMixedMode(reorderPorts(pair(0.97, 0.97), portsOfOrder('1-2,3-4' satisfies PortOrder4)));
    expect(insertionLossDb(right, 1, 0)[0]).toBeLessThan(0.3);
    expect(insertionLossDb(wrong, 1, 0)[0]).toBeGreaterThan(10);
  });
});

describe('picking ports', () => {
  it('ends the rest in their own references, which a connection with matched ends confirms', () => {
    const s = [0.1, 0, 0.2, 0.1, 0.3, 0, 0.2, 0, 0.05, 0, 0.1, 0, 0.25, 0, 0.1, 0.1, 0, 0.2];
    const three = network(3, [1e9], s);
    const matched = network(1, [1e9], [0, 0]);
    const joined = connect(
      [three, matched],
      [
        [
          { network: 0, port: 2 },
          { network: 1, port: 0 },
        ],
      ],
      [
        { network: 0, port: 1 },
        { network: 0, port: 0 },
      ],
    );
    expect([...pickPorts(three, [1, 0]).s]).toEqual([...joined.s]);
  });
  it('refuses a port that does not exist or is named twice', () => {
    expect(() => pickPorts(pair(1, 1), [0, 4])).toThrow(/Port 5 does not exist/);
    expect(() => pickPorts(pair(1, 1), [0, 0])).toThrow(/named twice/);
  });
});

describe('connection of any ports', () => {
  it('of a two-port to itself end to end needs no network beside it', () => {
    // A tee of three equal lines (S11 = -1/3, rest 2/3) with two arms joined: everything comes back.
    const t = [-1 / 3, 0, 2 / 3, 0, 2 / 3, 0, 2 / 3, 0, -1 / 3, 0, 2 / 3, 0, 2 / 3, 0, 2 / 3, 0, -1 / 3, 0];
    const tee = network(3, [1e9], t);
    const looped = connect(
      [tee],
      [
        [
          { network: 0, port: 1 },
          { network: 0, port: 2 },
        ],
      ],
      [{ network: 0, port: 0 }],
    );
    expect(looped.s[0]).toBeCloseTo(1, 12);
  });
  it('refuses a port used twice and a port that does not exist', () => {
    const one = network(1, [1e9], [0, 0]);
    expect(() =>
      connect(
        [one],
        [],
        [
          { network: 0, port: 0 },
          { network: 0, port: 0 },
        ],
      ),
    ).toThrow(/used twice/);
    expect(() => connect([one], [], [{ network: 1, port: 0 }])).toThrow(/There is no port/);
  });
});

describe('losses', () => {
  it('are positive dB, and infinite where nothing passes', () => {
    const two = network(2, [1e9, 2e9], [0.1, 0, 0.5, 0, 0.5, 0, 0, 0, 1, 0, 0, 0, 0, 0, 1, 0]);
    expect(insertionLossDb(two)[0]).toBeCloseTo(6.0206, 4);
    expect(insertionLossDb(two)[1]).toBe(Infinity);
    expect(returnLossDb(two, 0)[0]).toBeCloseTo(20, 12);
    expect(Object.is(returnLossDb(two, 0)[1], 0)).toBe(true);
  });
  it('have an unwrapped phase and the group delay of a delay line on any grid', () => {
    const f = [0, 1e8, 2.5e8, 3e8, 7e8, 7.5e8, 1e9];
    const s = f.flatMap((x) => {
      const e = [Math.cos(2 * Math.PI * x * 1e-9), -Math.sin(2 * Math.PI * x * 1e-9)];
      return [0, 0, ...e, ...e, 0, 0];
    });
    const two = network(2, f, s);
    f.forEach((x, k) => expect(unwrappedPhaseRad(two, 1, 0)[k]).toBeCloseTo(-2 * Math.PI * x * 1e-9, 9));
    groupDelayS(two, 1, 0).forEach((delay) => expect(delay).toBeCloseTo(1e-9, 18));
  });
});

describe('tolls and stability', () => {
  it('mark a part that may oscillate and give its stable gain', () => {
    const s = Float64Array.of(0.9, 0, 0.1, 0, 5, 0, 0.9, 0);
    const found = maximumAvailableGain(s, 1);
    expect(found.potentiallyUnstable[0]).toBe(1);
    expect(found.stabilityFactor[0]).toBeLessThan(1);
    expect(found.gain[0]).toBeCloseTo(50, 12);
  });
  it('of a one-way amplifier are those of conjugate matching', () => {
    const s = Float64Array.of(0.5, 0, 0, 0, 2, 0, 0.3, 0);
    expect(maximumAvailableGain(s, 1).gain[0]).toBeCloseTo(4 / (0.75 * 0.91), 12);
  });
  it('are infinite where nothing passes and 0 dB for a through', () => {
    expect(tollDb(Float64Array.of(1, 0, 0, 0, 0, 0, 1, 0), 1)[0]).toBe(Infinity);
    expect(Math.abs(tollDb(Float64Array.of(0, 0, 1, 0, 1, 0, 0, 0), 1)[0]!)).toBe(0);
  });
});

describe('trapped waves', () => {
  it('between two ideal shorts give finite zeros, and are counted', () => {
    const short = Float64Array.of(-1, 0, 0, 0, 0, 0, -1, 0);
    const out = new Float64Array(8);
    expect(cascade2Into(out, short, short, 1)).toBe(1);
    expect([...out]).toEqual([-1, 0, 0, 0, 0, 0, -1, 0].map((x) => (x === 0 ? expect.closeTo(0, 15) : x)));
  });
  it('on one leg of a pair leave the other leg alone', () => {
    const s = new Float64Array(32);
    s[0] = -1;
    s[20] = -1;
    s[(1 * 4 + 3) * 2] = 0.9;
    s[(3 * 4 + 1) * 2] = 0.9;
    const out = new Float64Array(32);
    expect(cascade4Into(out, s, s, 1)).toBe(1);
    expect(out[(3 * 4 + 1) * 2]).toBeCloseTo(0.81, 14);
    expect(out[0]).toBe(-1);
    expect(out.every(Number.isFinite)).toBe(true);
  });
});

describe('quality as in IEEE Std 370-2020', () => {
  const diagonal = (sizes: readonly number[]): Network =>
    network(
      2,
      sizes.map((_, k) => (k + 1) * 1e9),
      sizes.flatMap((size) => [size, 0, 0, 0, 0, 0, 0.5, 0]),
    );
  it('scores passivity as worked: norms 1, 1.00001, 1.05, 1.08 give 67.505', () => {
    const { passivity } = assessQuality(diagonal([1, 1.00001, 1.05, 1.08]));
    expect(passivity.percent).toBeCloseTo(67.505, 9);
    expect(passivity.grade).toBe('poor');
    expect(passivity.worst).toEqual({ frequencyHz: 4e9, singularValue: 1.08 });
    expect(passivity.failsHz).toEqual([[3e9, 4e9]]);
  });
  it('scores reciprocity as worked: a difference of 0.01 at every point gives 90.001', () => {
    const two = network(2, [1e9, 2e9], [0, 0, 0.5, 0, 0.51, 0, 0, 0, 0, 0, 0.5, 0, 0.51, 0, 0, 0]);
    const { reciprocity } = assessQuality(two);
    expect(reciprocity!.percent).toBeCloseTo(90.001, 9);
    expect(reciprocity!.grade).toBe('inconclusive');
    expect(assessQuality(onePoint(1, [[0, 0]])).reciprocity).toBeNull();
  });
  const oneOf = (value: (w: number) => readonly [number, number]): Network => {
    const f = Array.from({ length: 101 }, (_, k) => k * 1e8);
    return network(
      1,
      f,
      f.flatMap((x) => value(2 * Math.PI * x)),
    );
  };
  it.each([
    ['a delay of 100 ps', (w: number) => [Math.cos(w * 1e-10), -Math.sin(w * 1e-10)] as const, 100, 'good'],
    ['its conjugate', (w: number) => [Math.cos(w * 1e-10), Math.sin(w * 1e-10)] as const, 0, 'poor'],
    [
      'a delay with an early echo',
      (w: number) =>
        [
          Math.cos(w * 1e-10) + 0.5 * Math.cos(w * 1.5e-10),
          -Math.sin(w * 1e-10) + 0.5 * Math.sin(w * 1.5e-10),
        ] as const,
      80.3604,
      'good',
    ],
  ])('scores causality of %s as worked', (_, value, percent, grade) => {
    const { causality } = assessQuality(oneOf(value));
    expect(causality!.percent).toBeCloseTo(percent, 3);
    expect(causality!.grade).toBe(grade);
  });
});

describe('networks that do not fit together', () => {
  it.each([
    ['a NaN', network(1, [1e9], [NaN, 0]), /holds NaN/],
    ['too few numbers', network(2, [1e9], [0, 0]), /2 numbers where/],
    ['a descending frequency', network(1, [2e9, 1e9], [0, 0, 0, 0]), /does not lie above/],
    ['a frequency twice', network(1, [2e9, 2e9], [0, 0, 0, 0]), /does not lie above/],
    [
      'a reference of zero',
      { ...network(1, [1e9], [0, 0]), referenceOhm: Float64Array.of(0, 0) },
      /port 1 is 0/,
    ],
  ])('are refused: %s', (_, bad, reason) => {
    expect(() => checkNetwork(bad)).toThrow(NetworkError);
    expect(() => checkNetwork(bad)).toThrow(reason);
  });
});
