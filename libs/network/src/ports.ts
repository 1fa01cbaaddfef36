import type { Network } from './network';
import { NetworkError } from './network';

function checkPortList(network: Network, ports: readonly number[]): void {
  ports.forEach((port, k) => {
    if (!Number.isInteger(port) || port < 0 || port >= network.ports) {
      throw new NetworkError(
        `Port ${port + 1} does not exist in a network of ${network.ports} ports.`,
        `Name ports from 1 to ${network.ports}.`,
        `ports[${k}]`,
      );
    }
    if (ports.indexOf(port) !== k) {
      throw new NetworkError(`Port ${port + 1} is named twice.`, 'Name each port once.', `ports[${k}]`);
    }
  });
}

/**
 * The ports named, in that order (counted from 0); every other port is ended in its own reference, which for power waves
 * means that its row and column are left out.
 */
export function pickPorts(network: Network, ports: readonly number[]): Network {
  checkPortList(network, ports);
  const points = network.frequenciesHz.length;
  const from = network.ports;
  const size = ports.length;
  const s = new Float64Array(points * size * size * 2);
  const offsets = Int32Array.from(ports.flatMap((row) => ports.map((column) => (row * from + column) * 2)));
  let k = 0;
  for (let point = 0; point < points; point++) {
    const at = point * from * from * 2;
    for (let e = 0; e < offsets.length; e++) {
      s[k++] = network.s[at + offsets[e]!]!;
      s[k++] = network.s[at + offsets[e]! + 1]!;
    }
  }
  const referenceOhm = Float64Array.from(
    ports.flatMap((port) => [network.referenceOhm[port * 2]!, network.referenceOhm[port * 2 + 1]!]),
  );
  return { ports: size, frequenciesHz: network.frequenciesHz, s, referenceOhm };
}

/** The same network with its ports in another order: new port i is old port `order[i]` (from 0). */
export function reorderPorts(network: Network, order: readonly number[]): Network {
  if (order.length !== network.ports) {
    throw new NetworkError(
      `An order of ${order.length} ports for a network of ${network.ports}.`,
      'Name every port once.',
    );
  }
  return pickPorts(network, order);
}

/** Turned round: the far half of the ports becomes the near half. */
export function reversePorts(network: Network): Network {
  if (network.ports % 2 !== 0) {
    throw new NetworkError(
      `A network of ${network.ports} ports has no two ends of equal size.`,
      'Pick an even number of ports first.',
      'ports',
    );
  }
  const half = network.ports / 2;
  return reorderPorts(
    network,
    Array.from({ length: network.ports }, (_, k) => (k + half) % network.ports),
  );
}

/** Orders in which 4-port files are met, as through pairs; left of the dash is the near end. */
export const portOrders4 = ['1-3,2-4', '1-2,3-4', '1-4,2-3'] as const;
export type PortOrder4 = (typeof portOrders4)[number];

/** The file's ports (from 0) in the order near p, near n, far p, far n. */
export function portsOfOrder(order: PortOrder4): [number, number, number, number] {
  switch (order) {
    case '1-3,2-4':
      return [0, 1, 2, 3];
    case '1-2,3-4':
      return [0, 2, 1, 3];
    case '1-4,2-3':
      return [0, 1, 3, 2];
  }
}

export interface PortOrderTest {
  /** The order that the data speak for, or null where they do not tell. */
  readonly likely: PortOrder4 | null;
  /** For each order the mean of the smaller |S| of its two through paths over the lowest decade. */
  readonly scores: Readonly<Record<PortOrder4, number>>;
  /** The frequencies the test looked at. */
  readonly fromHz: number;
  readonly toHz: number;
}

/** Below this mean transmission the best order proves nothing (a blocked or very lossy part). */
const leastTransmission = 0.3;
/** The best order must be this many times the second best. */
const leastLead = 2;

/**
 * Which ports of a 4-port belong together: over the lowest decade the through partner of a port carries its largest |S|
 * (A6). A best score under 0.3, or under twice the second, tells nothing, and a person must confirm.
 */
export function testPortOrder(network: Network): PortOrderTest {
  if (network.ports !== 4 || network.frequenciesHz.length === 0) {
    throw new NetworkError(
      'The port order test is for 4 ports with data.',
      'Name the ports of this part.',
      'ports',
    );
  }
  const { frequenciesHz, s } = network;
  // A row at 0 Hz has no decade; it counts as part of the lowest one.
  const lowest = frequenciesHz.find((f) => f > 0) ?? 0;
  const count = frequenciesHz.findLastIndex((f) => f <= lowest * 10) + 1;
  const mean = (order: PortOrder4): number => {
    const [nearP, nearN, farP, farN] = portsOfOrder(order);
    let sum = 0;
    for (let point = 0; point < count; point++) {
      const size = (row: number, column: number): number => {
        const k = ((point * 4 + row) * 4 + column) * 2;
        return Math.hypot(s[k]!, s[k + 1]!);
      };
      sum += Math.min(
        Math.max(size(farP, nearP), size(nearP, farP)),
        Math.max(size(farN, nearN), size(nearN, farN)),
      );
    }
    return sum / count;
  };
  const scores = Object.fromEntries(portOrders4.map((order) => [order, mean(order)])) as Record<
    PortOrder4,
    number
  >;
  const [best, second] = [...portOrders4].sort((a, b) => scores[b] - scores[a]) as [PortOrder4, PortOrder4];
  const tells = scores[best] >= leastTransmission && scores[best] >= leastLead * scores[second];
  return {
    likely: tells ? best : null,
    scores,
    fromHz: frequenciesHz[0]!,
    toHz: frequenciesHz[count - 1]!,
  };
}
