import { uniformReference, type Network } from '@tollgate/network';
import fc from 'fast-check';
import {
  capacitor,
  decades,
  element,
  lineFields,
  oneLegKinds,
  pairKinds,
  real,
  spiceKinds,
  spicePairKinds,
  type Arbitrary,
  type Element,
} from './arbitrary-elements';
import { arbitraryS } from '../../libs/network/src/testing/samples';

/** Random channels as a person might write them, and the measured parts they name. */
export interface RandomChannel {
  readonly document: Record<string, unknown>;
  readonly parts: ReadonlyMap<string, Network>;
}

export const pointsEach = 5;
const circuitOf = (kinds: Arbitrary<Element>[]): Arbitrary<Element> =>
  fc
    .array(fc.oneof(...kinds), { minLength: 1, maxLength: 4 })
    .map((circuit) => ({ kind: 'connector', circuit }));

const orders = { '1-3,2-4': [0, 1, 2, 3], '1-2,3-4': [0, 2, 1, 3], '1-4,2-3': [0, 1, 3, 2] } as const;
type Order = keyof typeof orders;

/** A measured part: a passive network through which more passes than crosses over, in one of the orders of ports. */
interface Measured {
  readonly ports: 2 | 4;
  readonly s: Float64Array;
  readonly order: Order;
  readonly referenceOhm: number;
  readonly reversed: boolean;
}
const measured = (ports: 2 | 4): Arbitrary<Measured> =>
  fc
    .record({
      random: arbitraryS(ports, pointsEach),
      order: fc.constantFrom(...(Object.keys(orders) as Order[])),
      referenceOhm: fc.constantFrom(50, 50, 42.5, 75),
      reversed: fc.boolean(),
    })
    .map(({ random, ...rest }) => {
      const place = ports === 4 ? orders[rest.order] : [0, 1];
      const s = random.map((value) => 0.3 * value);
      for (let point = 0; point < pointsEach; point++) {
        for (let k = 0; k < ports / 2; k++) {
          const [near, far] = [place[k]!, place[k + ports / 2]!];
          s[((point * ports + near) * ports + far) * 2]! += 0.65;
          s[((point * ports + far) * ports + near) * 2]! += 0.65;
        }
      }
      return { ports, s, ...rest };
    });

const reference = real(30, 80);
const singleReference = fc.oneof(fc.constant<unknown>(50), reference, fc.tuple(reference, reference));
const pairReference = fc.oneof(
  fc.constant<unknown>(50),
  reference,
  fc.tuple(reference, reference).map(([near, far]) => [near, near, far, far]),
);

/** Frequencies where something is singular: 0 Hz, and quarter and half waves of the channel's stubs. */
function singularHz(elements: readonly Element[]): number[] {
  const stubs = elements.flatMap((one) => (one.kind === 'connector' ? (one['circuit'] as Element[]) : [one]));
  return stubs.flatMap((stub) => {
    if (stub.kind !== 'stub') return [];
    const { lengthM, effectivePermittivity } = stub as unknown as Record<string, number>;
    const quarter = 299_792_458 / (4 * lengthM! * Math.sqrt(effectivePermittivity!));
    return [quarter, 2 * quarter].filter((f) => f < 4e10);
  });
}

/** How many branches let nothing through at 0 Hz: what lies between two of them floats, and is not defined there. */
function closedAtDc(one: Element): number {
  const open = (parts: unknown): number => ('capacitanceF' in defined(parts) ? 1 : 0);
  const shorted = (parts: unknown): number =>
    'capacitanceF' in defined(parts) || 'resistanceOhm' in defined(parts) ? 0 : 1;
  switch (one.kind) {
    case 'series':
    case 'capacitor':
      return open(one);
    case 'shunt':
      return shorted(one);
    case 'stub':
      return one['end'] === 'short' ? 1 : one['end'] === 'load' ? shorted(one['load']) : 0;
    case 'tee':
      return open(one['near']) + shorted(one['shunt']) + open(one['far']);
    case 'pi':
      return shorted(one['near']) + open(one['series']) + shorted(one['far']);
    case 'connector':
      return (one['circuit'] as Element[]).reduce((sum, part) => sum + closedAtDc(part), 0);
    default:
      return 0;
  }
}
const defined = (parts: unknown): object => JSON.parse(JSON.stringify(parts)) as object;

function gridOf(elements: readonly Element[], others: readonly number[], pick: number): number[] {
  const special = singularHz(elements);
  const chosen = special.length ? [special[pick % special.length]!] : [];
  const hasDc = elements.reduce((sum, one) => sum + closedAtDc(one), 0) <= 1;
  return [...(hasDc ? [0] : []), ...chosen, ...others].slice(0, pointsEach).sort((a, b) => a - b);
}

function assembled(
  signaling: 'single-ended' | 'differential',
  referenceOhm: unknown,
  drawn: readonly (Element | Measured)[],
  others: readonly number[],
  pick: number,
): RandomChannel {
  const elements = drawn.filter((one): one is Element => 'kind' in one);
  const frequenciesHz = gridOf(elements, others, pick);
  const parts = new Map<string, Network>();
  const row = drawn.map((one) => {
    if ('kind' in one) return one;
    const { ports, s, order, reversed } = one;
    const file = `part-${parts.size}.s${ports}p`;
    const z = uniformReference(ports, one.referenceOhm);
    parts.set(file, { ports, s, frequenciesHz: Float64Array.from(frequenciesHz), referenceOhm: z });
    return {
      ...{ kind: 'touchstone', file, reversed },
      ...(ports === 4 ? { portOrder: order, portOrderConfirmed: true } : {}),
    };
  });
  const format = 'tollgate.channel/1';
  const document = {
    format,
    name: 'Random',
    signaling,
    referenceOhm,
    grid: { frequenciesHz },
    elements: row,
  };
  return { document, parts };
}

function channelOf(
  signaling: 'single-ended' | 'differential',
  kinds: Arbitrary<Element>[],
  references: Arbitrary<unknown>,
  part?: Arbitrary<Measured>,
): Arbitrary<RandomChannel> {
  const one = fc.oneof(
    { weight: 20, arbitrary: fc.oneof(...kinds, capacitor) },
    { weight: part ? 1 : 0, arbitrary: circuitOf(kinds) },
    { weight: part ? 1 : 0, arbitrary: part ?? fc.oneof(...kinds) },
  );
  const row = fc.array(one, { minLength: 3, maxLength: 30, size: 'max' });
  const others = fc.uniqueArray(decades(1e6, 4e10), { minLength: pointsEach, maxLength: pointsEach });
  return fc
    .tuple(references, row, others, fc.nat())
    .map(([referenceOhm, drawn, hz, pick]) => assembled(signaling, referenceOhm, drawn, hz, pick));
}

export const singleEndedChannel = channelOf('single-ended', oneLegKinds, singleReference, measured(2));
export const differentialChannel = channelOf(
  'differential',
  [...oneLegKinds, ...pairKinds, ...pairKinds],
  pairReference,
  fc.oneof(measured(4), measured(2)),
);

const complexPort = fc.tuple(reference, real(-30, 30));
export const complexReferenceChannel = fc.oneof(
  channelOf('single-ended', oneLegKinds, fc.tuple(complexPort, complexPort), measured(2)),
  channelOf(
    'differential',
    [...oneLegKinds, ...pairKinds, ...pairKinds],
    fc.tuple(complexPort, complexPort).map(([near, far]) => [near, near, far, far]),
    measured(4),
  ),
);

/** A line of up to 40 dB at 1 GHz, which four or five times over reaches -220 dB. */
const lossyLine = element('line', { ...lineFields, lengthM: real(0.1, 1), lossSqrtDbPerM: real(0, 40) });
export const veryLossyChannel = channelOf(
  'single-ended',
  [lossyLine, lossyLine, ...oneLegKinds],
  singleReference,
  measured(2),
);

/** A grid that ngspice can run, and channels on it. */
export const spiceGrid = { from: 1e7, to: 2.001e10, points: pointsEach };
const onSpiceGrid = (channel: fc.Arbitrary<RandomChannel>): fc.Arbitrary<RandomChannel> =>
  channel.map(({ document, parts }) => {
    const { from: startHz, to: stopHz, points } = spiceGrid;
    return { document: { ...document, grid: { startHz, stopHz, points } }, parts };
  });
export const circuitOfSingleEnded = onSpiceGrid(channelOf('single-ended', spiceKinds, singleReference));
export const circuitOfDifferential = onSpiceGrid(
  channelOf('differential', [...spiceKinds, ...spicePairKinds, ...spicePairKinds], pairReference),
);
