import type { ChannelElement, CompleteChannel, ElementOf } from '@tollgate/contracts';
import { simpleParts } from './element-equations';

/** Writes a channel of lumped elements and lines as a circuit that ngspice analyses with `.sp`; references are real. */
export function netlistOf(
  channel: CompleteChannel,
  grid: { from: number; to: number; points: number },
): string {
  const net = new Netlist();
  const conductors = channel.signaling === 'differential' ? 2 : 1;
  const near = Array.from({ length: conductors }, () => net.node());
  const far = channel.elements
    .flatMap(simpleParts)
    .reduce((nodes, element) => place(net, element, nodes), near);
  const ports = [...near, ...far];
  const { referenceOhm } = channel;
  ports.forEach((node, k) => {
    const ohm = Array.isArray(referenceOhm) ? referenceOhm[k]! : referenceOhm;
    net.add('V', `${node} 0 dc 0 ac ${k === 0 ? 1 : 0} portnum ${k + 1} z0 ${ohm as number}`);
  });
  const entries = ports.flatMap((_, row) => ports.map((_unused, column) => `S_${row + 1}_${column + 1}`));
  return [
    '* a random channel',
    ...net.lines,
    // A node between capacitors alone has no voltage at 0 Hz, where ngspice begins.
    '.options rshunt=1e13',
    '.control',
    ...['set numdgt=15', 'set width=200', 'set nobreak'],
    `sp lin ${grid.points} ${grid.from} ${grid.to}`,
    ...entries.map((entry) => `print real(${entry}) imag(${entry})`),
    'quit',
    '.endc',
    '.end',
    '',
  ].join('\n');
}

/** S from what ngspice printed: the entries in their order, each a table of the points. */
export function scatteringFrom(printed: string, ports: number, points: number): Float64Array {
  const rows = [...printed.matchAll(/^(\d+)\s+(\S+e\S+)\s+(\S+e\S+)\s+(\S+e\S+)\s*$/gm)];
  if (rows.length !== ports * ports * points)
    throw new Error(`ngspice printed ${rows.length} rows:\n${printed}`);
  const s = new Float64Array(rows.length * 2);
  rows.forEach(([, index, , re, im], k) => {
    const entry = Math.floor(k / points);
    s.set([Number(re), Number(im)], (Number(index) * ports * ports + entry) * 2);
  });
  return s;
}

class Netlist {
  readonly lines: string[] = [];
  private count = 0;

  node(): string {
    return `n${++this.count}`;
  }

  /** Adds a device and returns its name. */
  add(letter: string, rest: string): string {
    const name = `${letter}${++this.count}`;
    this.lines.push(`${name} ${rest}`);
    return name;
  }
}

type Branch = { resistanceOhm?: number; inductanceH?: number; capacitanceF?: number };

/** R, L and C one after the other between two nodes. */
function branch(net: Netlist, from: string, to: string, parts: Branch): void {
  const devices = [
    ['R', parts.resistanceOhm],
    ['L', parts.inductanceH],
    ['C', parts.capacitanceF],
  ].filter(([, value]) => value !== undefined);
  let at = from;
  devices.forEach(([letter, value], k) => {
    const next = k === devices.length - 1 ? to : net.node();
    net.add(letter as string, `${at} ${next} ${value}`);
    at = next;
  });
}

/** Adds an element behind `near` and returns the nodes of its far side. */
function place(net: Netlist, element: ChannelElement, near: readonly string[]): string[] {
  switch (element.kind) {
    case 'line-pair':
      return near.map((node, leg) => line(net, node, leg === 0 ? element.p : element.n));
    case 'coupled-line':
      return coupledLine(net, element, near);
    case 'pair-series': {
      const far = near.map(() => net.node());
      const [p, n] = near.map((node, leg) => net.add('L', `${node} ${far[leg]} ${element.inductanceH}`));
      net.add('K', `${p} ${n} ${element.mutualInductanceH / element.inductanceH}`);
      return far;
    }
    case 'pair-shunt': {
      const { capacitanceF, mutualCapacitanceF, resistanceOhm, mutualResistanceOhm } = element;
      near.forEach((node) => net.add('C', `${node} 0 ${capacitanceF}`));
      if (resistanceOhm !== undefined) near.forEach((node) => net.add('R', `${node} 0 ${resistanceOhm}`));
      net.add('C', `${near[0]} ${near[1]} ${mutualCapacitanceF}`);
      if (mutualResistanceOhm !== undefined) net.add('R', `${near[0]} ${near[1]} ${mutualResistanceOhm}`);
      return [...near];
    }
    default:
      return near.map((node) => leg(net, element, node));
  }
}

function leg(net: Netlist, element: ChannelElement, near: string): string {
  const far = net.node();
  switch (element.kind) {
    case 'line':
      return line(net, near, element);
    case 'rlgc-line':
      return lossyLine(net, near, element);
    case 'series':
      branch(net, near, far, element);
      return far;
    case 'shunt':
      branch(net, near, '0', element);
      return near;
    case 'stub': {
      const end = line(net, near, element);
      if (element.end === 'short') net.add('R', `${end} 0 1e-9`);
      if (element.end === 'load') branch(net, end, '0', element.load!);
      return near;
    }
    case 'attenuator': {
      const k = 10 ** (element.attenuationDb / 20);
      const toGround = (element.z0Ohm * (k + 1)) / (k - 1);
      net.add('R', `${near} 0 ${toGround}`);
      net.add('R', `${near} ${far} ${(element.z0Ohm * (k * k - 1)) / (2 * k)}`);
      net.add('R', `${far} 0 ${toGround}`);
      return far;
    }
    case 'transformer': {
      const inside = net.node();
      const sensor = net.add('V', `${near} ${inside} 0`);
      net.add('E', `${inside} 0 ${far} 0 ${element.turnsRatio}`);
      net.add('F', `0 ${far} ${sensor} ${element.turnsRatio}`);
      return far;
    }
    default:
      throw new Error(`There is no circuit of ${element.kind} for ngspice.`);
  }
}

type Line = Pick<ElementOf<'line'>, 'z0Ohm' | 'lengthM' | 'effectivePermittivity'>;

/** A line without loss. */
function line(net: Netlist, near: string, part: Line, far = net.node()): string {
  const delayS = (part.lengthM * Math.sqrt(part.effectivePermittivity)) / 299_792_458;
  net.add('T', `${near} 0 ${far} 0 Z0=${part.z0Ohm} TD=${delayS}`);
  return far;
}

/** Constant R, L and C a metre; ngspice has no line with a conductance as well. */
function lossyLine(net: Netlist, near: string, part: ElementOf<'rlgc-line'>): string {
  const far = net.node();
  const model = `line${far}`;
  const { resistanceOhmPerM, inductanceHPerM, capacitanceFPerM, lengthM } = part;
  net.add('O', `${near} 0 ${far} 0 ${model}`);
  net.lines.push(
    `.model ${model} LTRA(R=${resistanceOhmPerM} L=${inductanceHPerM} C=${capacitanceFPerM} LEN=${lengthM})`,
  );
  return far;
}

/**
 * A symmetric pair as two lines, one a mode, between ideal transformers of controlled sources: Vp = Ve + Vo, Vn = Ve - Vo,
 * Ie = Ip + In, Io = Ip - In, so that the mode lines have half the modes' impedances.
 */
function coupledLine(net: Netlist, element: ElementOf<'coupled-line'>, near: readonly string[]): string[] {
  const far = near.map(() => net.node());
  const [nearModes, farModes] = [near, far].map((conductors) => modesAt(net, conductors));
  (['even', 'odd'] as const).forEach((name, mode) => {
    const { lengthM } = element;
    const effectivePermittivity = element[`${name}EffectivePermittivity`];
    const part = { z0Ohm: element[`${name}Z0Ohm`] / 2, lengthM, effectivePermittivity };
    line(net, nearModes![mode]!, part, farModes![mode]);
  });
  return far;
}

function modesAt(net: Netlist, conductors: readonly string[]): [string, string] {
  const [even, odd] = [net.node(), net.node()];
  conductors.forEach((conductor, k) => {
    const sign = k === 0 ? 1 : -1;
    const [inside, between] = [net.node(), net.node()];
    const sensor = net.add('V', `${conductor} ${inside} 0`);
    net.add('E', `${inside} ${between} ${even} 0 1`);
    net.add('E', `${between} 0 ${odd} 0 ${sign}`);
    net.add('F', `0 ${even} ${sensor} 1`);
    net.add('F', `0 ${odd} ${sensor} ${sign}`);
  });
  return [even, odd];
}
