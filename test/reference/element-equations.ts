import type { ChannelElement, ElementOf } from '@tollgate/contracts';
import type { Network } from '@tollgate/network';
import { add, divide, exponential, multiply, scale, squareRoot, subtract, type Complex } from './linear';

/** Where the unknowns of one joint stand. */
export interface Joint {
  readonly voltage: (conductor: number) => number;
  readonly current: (conductor: number) => number;
}

/** One term of an equation that sums to 0; a current flows into the element. */
export interface Term {
  readonly side: 'near' | 'far';
  readonly conductor: number;
  readonly of: 'voltage' | 'current';
  readonly coefficient: Complex;
}

export interface Place {
  readonly frequencyHz: number;
  readonly point: number;
  readonly conductors: number;
  /** What a placeholder is matched in. */
  readonly jointOhm: number;
  readonly parts: ReadonlyMap<string, Network>;
}

type Line = Pick<
  ElementOf<'line'>,
  'z0Ohm' | 'lengthM' | 'effectivePermittivity' | 'lossSqrtDbPerM' | 'lossLinearDbPerM'
>;
type Branch = { resistanceOhm?: number; inductanceH?: number; capacitanceF?: number };
/** An immittance as a fraction: of two numbers one may be 0. */
type Fraction = readonly [over: Complex, under: Complex];

const one: Complex = [1, 0];
const minus = (a: Complex): Complex => [-a[0], -a[1]];
const term =
  (of: Term['of'], side: Term['side']) =>
  (conductor: number, coefficient: Complex): Term => ({ side, conductor, of, coefficient });
const vNear = term('voltage', 'near');
const vFar = term('voltage', 'far');
const iNear = term('current', 'near');
const iFar = term('current', 'far');

/** A kind that is several two-terminal branches stands in the row as these, a connector's circuit as its parts. */
export function simpleParts(element: ChannelElement): ChannelElement[] {
  switch (element.kind) {
    case 'tee':
      return [
        { kind: 'series', ...element.near },
        { kind: 'shunt', ...element.shunt },
        { kind: 'series', ...element.far },
      ];
    case 'pi':
      return [
        { kind: 'shunt', ...element.near },
        { kind: 'series', ...element.series },
        { kind: 'shunt', ...element.far },
      ];
    case 'capacitor': {
      const { seriesResistanceOhm: resistanceOhm, seriesInductanceH: inductanceH, capacitanceF } = element;
      const pad: ChannelElement = { kind: 'shunt', capacitanceF: element.padCapacitanceF };
      return [pad, { kind: 'series', resistanceOhm, inductanceH, capacitanceF }, pad];
    }
    case 'connector':
      return element.circuit ? element.circuit.flatMap(simpleParts) : [element];
    default:
      return [element];
  }
}

/** The equations between voltages and currents on both sides of an element at one frequency. */
export function elementEquations(element: ChannelElement, place: Place): Term[][] {
  const { frequencyHz: f, conductors, jointOhm } = place;
  const legs = [...Array(conductors).keys()];
  switch (element.kind) {
    case 'line':
      return legs.flatMap((leg) => lineEquations(element, f, [[leg, 1]]));
    case 'line-pair':
      return [element.p, element.n].flatMap((line, leg) => lineEquations(line, f, [[leg, 1]]));
    case 'coupled-line':
      return coupledEquations(element, f);
    case 'rlgc-line':
      return legs.flatMap((leg) => rlgcEquations(element, f, leg));
    case 'series':
      return legs.flatMap((leg) => seriesEquations(leg, impedance(element, f)));
    case 'shunt':
      return legs.flatMap((leg) => shuntEquations(leg, inverse(impedance(element, f))));
    case 'stub':
      return legs.flatMap((leg) => shuntEquations(leg, stubAdmittance(element, f)));
    case 'transformer':
      return legs.flatMap((leg) => [
        [vNear(leg, one), vFar(leg, [-element.turnsRatio, 0])],
        [iFar(leg, one), iNear(leg, [element.turnsRatio, 0])],
      ]);
    case 'attenuator': {
      const pass: Complex = [10 ** (-element.attenuationDb / 20), 0];
      return legs.flatMap((leg) => passEquations([element.z0Ohm, 0], pass, [[leg, 1]]));
    }
    case 'pair-series':
      return pairSeriesEquations(element, f);
    case 'pair-shunt':
      return pairShuntEquations(element, f);
    case 'budget-loss': {
      const [reflection, pass] = placeholder(element, f);
      return legs.flatMap((leg) =>
        waveEquations(
          jointOhm,
          [leg],
          [
            [reflection, pass],
            [pass, reflection],
          ],
        ),
      );
    }
    case 'touchstone':
      return partEquations(element, place);
    default:
      throw new Error(`There are no equations for ${element.kind}.`);
  }
}

/** Waves of a line: V - Z I on one side is what V + Z I was on the other, once through. `mode` weighs conductors. */
function passEquations(z: Complex, pass: Complex, mode: readonly (readonly [number, number])[]): Term[][] {
  const through = multiply(z, pass);
  return [
    mode.flatMap(([leg, w]) => [
      ...[vNear(leg, scale(one, w)), iNear(leg, scale(z, -w))],
      ...[vFar(leg, scale(pass, -w)), iFar(leg, scale(through, -w))],
    ]),
    mode.flatMap(([leg, w]) => [
      ...[vFar(leg, scale(one, w)), iFar(leg, scale(z, -w))],
      ...[vNear(leg, scale(pass, -w)), iNear(leg, scale(through, -w))],
    ]),
  ];
}

function lineEquations(line: Line, f: number, mode: readonly (readonly [number, number])[]): Term[][] {
  return passEquations([line.z0Ohm, 0], exponential(minus(turn(line, f))), mode);
}

/** gamma l: nepers and radians of the whole line. */
function turn(line: Line, f: number): Complex {
  const gHz = f / 1e9;
  const dB = (line.lossSqrtDbPerM * Math.sqrt(gHz) + line.lossLinearDbPerM * gHz) * line.lengthM;
  return [
    (dB * Math.LN10) / 20,
    (2 * Math.PI * f * line.lengthM * Math.sqrt(line.effectivePermittivity)) / 299_792_458,
  ];
}

function coupledEquations(element: ElementOf<'coupled-line'>, f: number): Term[][] {
  const mode = (name: 'even' | 'odd'): Line => ({
    z0Ohm: element[`${name}Z0Ohm`],
    lengthM: element.lengthM,
    effectivePermittivity: element[`${name}EffectivePermittivity`],
    lossSqrtDbPerM: element[`${name}Loss`].sqrtDbPerM,
    lossLinearDbPerM: element[`${name}Loss`].linearDbPerM,
  });
  return [
    ...lineEquations(mode('even'), f, [
      [0, 1],
      [1, 1],
    ]),
    ...lineEquations(mode('odd'), f, [
      [0, 1],
      [1, -1],
    ]),
  ];
}

function rlgcEquations(element: ElementOf<'rlgc-line'>, f: number, leg: number): Term[][] {
  const w = 2 * Math.PI * f;
  const z: Complex = [element.resistanceOhmPerM, w * element.inductanceHPerM];
  const y: Complex = [element.conductanceSPerM, w * element.capacitanceFPerM];
  const { lengthM } = element;
  // With no series impedance, or no admittance, at 0 Hz there is no wave.
  if (Math.hypot(...z) === 0) return shuntEquations(leg, [scale(y, lengthM), one]);
  if (Math.hypot(...y) === 0) return seriesEquations(leg, [scale(z, lengthM), one]);
  const gamma = squareRoot(multiply(z, y));
  return passEquations(divide(gamma, y), exponential(scale(gamma, -lengthM)), [[leg, 1]]);
}

/** R, L and C in series: (1 + j w C (R + j w L))/(j w C). */
function impedance(branch: Branch, f: number): Fraction {
  const w = 2 * Math.PI * f;
  const z: Complex = [branch.resistanceOhm ?? 0, w * (branch.inductanceH ?? 0)];
  if (branch.capacitanceF === undefined) return [z, one];
  const y: Complex = [0, w * branch.capacitanceF];
  return [add(one, multiply(y, z)), y];
}

const inverse = ([over, under]: Fraction): Fraction => [under, over];

/** By the voltage V and current I at the load and the turn of the line: Y = (I ch + V sh/Z)/(V ch + I Z sh). */
function stubAdmittance(stub: ElementOf<'stub'>, f: number): Fraction {
  const [over, under] =
    stub.end === 'open'
      ? [one, [0, 0] as const]
      : stub.end === 'short'
        ? [[0, 0] as const, one]
        : impedance(stub.load!, f);
  const pass = exponential(scale(turn(stub, f), -2));
  const [plus, less] = [add(one, pass), subtract(one, pass)];
  return [
    add(multiply(under, plus), scale(multiply(over, less), 1 / stub.z0Ohm)),
    add(multiply(over, plus), scale(multiply(under, less), stub.z0Ohm)),
  ];
}

function seriesEquations(leg: number, [z, under]: Fraction): Term[][] {
  return [
    [vNear(leg, under), vFar(leg, minus(under)), iNear(leg, minus(z))],
    [iNear(leg, one), iFar(leg, one)],
  ];
}

function shuntEquations(leg: number, [y, under]: Fraction): Term[][] {
  return [
    [vNear(leg, one), vFar(leg, minus(one))],
    [iNear(leg, under), iFar(leg, under), vNear(leg, minus(y))],
  ];
}

function pairSeriesEquations(element: ElementOf<'pair-series'>, f: number): Term[][] {
  const w = 2 * Math.PI * f;
  return [0, 1].flatMap((leg) => [
    [
      ...[vNear(leg, one), vFar(leg, minus(one))],
      ...[iNear(leg, [0, -w * element.inductanceH]), iNear(1 - leg, [0, -w * element.mutualInductanceH])],
    ],
    [iNear(leg, one), iFar(leg, one)],
  ]);
}

function pairShuntEquations(element: ElementOf<'pair-shunt'>, f: number): Term[][] {
  const w = 2 * Math.PI * f;
  const siemens = (ohm: number | undefined) => (ohm === undefined ? 0 : 1 / ohm);
  const toGround: Complex = [siemens(element.resistanceOhm), w * element.capacitanceF];
  const between: Complex = [siemens(element.mutualResistanceOhm), w * element.mutualCapacitanceF];
  return [0, 1].flatMap((leg) => [
    [vNear(leg, one), vFar(leg, minus(one))],
    [
      ...[iNear(leg, one), iFar(leg, one)],
      ...[vNear(leg, minus(add(toGround, between))), vNear(1 - leg, between)],
    ],
  ]);
}

/** The placeholder as it is defined: loss falls to 0; what returns is in quadrature to what passes, and no more than is left. */
function placeholder(element: ElementOf<'budget-loss'>, f: number): [reflection: Complex, pass: Complex] {
  const { lossDb, atHz, shape, returnLossDb, delayS = 0 } = element;
  const pass = 10 ** ((-lossDb * (shape === 'sqrt' ? Math.sqrt(f / atHz) : f / atHz)) / 20);
  const asked = returnLossDb === undefined ? 0 : 10 ** (-returnLossDb / 20);
  const phase = exponential([0, -2 * Math.PI * f * delayS]);
  const reflection = Math.min(asked, Math.sqrt(Math.max(0, 1 - pass * pass)));
  return [multiply([0, reflection], phase), scale(phase, pass)];
}

/** A part by its own scattering parameters at its own real reference: (1 - S) V = R (1 + S) I. */
function waveEquations(ohm: number, legs: readonly number[], s: readonly (readonly Complex[])[]): Term[][] {
  const ports = [
    ...legs.map((leg) => ({ leg, v: vNear, i: iNear })),
    ...legs.map((leg) => ({ leg, v: vFar, i: iFar })),
  ];
  return s.map((row, r) =>
    row.flatMap((value, c) => {
      const own: Complex = r === c ? one : [0, 0];
      const { leg, v, i } = ports[c]!;
      return [v(leg, subtract(own, value)), i(leg, scale(add(own, value), -ohm))];
    }),
  );
}

/** Places (near p, near n, far p, far n) among the file's ports, counted from 0, for each order. */
const places = { '1-3,2-4': [0, 1, 2, 3], '1-2,3-4': [0, 2, 1, 3], '1-4,2-3': [0, 1, 3, 2] } as const;

function partEquations(element: ElementOf<'touchstone'>, { point, conductors, parts }: Place): Term[][] {
  const { ports, s, referenceOhm } = parts.get(element.file!)!;
  const entry = (row: number, column: number): Complex => {
    const at = ((point * ports + row) * ports + column) * 2;
    return [s[at]!, s[at + 1]!];
  };
  const forward: readonly number[] = ports === 4 ? places[element.portOrder!] : [0, 1];
  const half = forward.length / 2;
  const order = element.reversed ? [...forward.slice(half), ...forward.slice(0, half)] : forward;
  const matrix = order.map((row) => order.map((column) => entry(row, column)));
  if (ports === 4) return waveEquations(referenceOhm[0]!, [0, 1], matrix);
  return [...Array(conductors).keys()].flatMap((leg) => waveEquations(referenceOhm[0]!, [leg], matrix));
}
