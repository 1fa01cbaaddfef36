import type { CompleteChannel } from '@tollgate/contracts';
import type { Network } from '@tollgate/network';
import { elementEquations, simpleParts, type Joint } from './element-equations';
import { Equations, scale, type Complex } from './linear';

/**
 * A channel without scattering algebra: the voltage and current of every conductor at every joint are unknown, each element
 * gives its equations between those on its two sides, sources behind the references close the ends, and all of it is solved at
 * once. Nothing here is infinite at a resonance or at 0 Hz, and nothing is multiplied up, so that deep losses keep their digits.
 * Waves at the ends: power waves (Kurokawa, IEEE Trans. MTT-13, 1965).
 */
export function solveByKirchhoff(
  channel: CompleteChannel,
  frequenciesHz: readonly number[],
  parts: ReadonlyMap<string, Network>,
): Float64Array {
  const conductors = channel.signaling === 'differential' ? 2 : 1;
  const ports = conductors * 2;
  const references = referencesOf(channel, ports);
  const out = new Float64Array(frequenciesHz.length * ports * ports * 2);
  frequenciesHz.forEach((frequencyHz, point) => {
    const solved = solvedAt(channel, frequencyHz, point, conductors, references, parts);
    solved.forEach((row, r) =>
      row.forEach((value, c) => out.set(value, ((point * ports + r) * ports + c) * 2)),
    );
  });
  return out;
}

function referencesOf({ referenceOhm }: CompleteChannel, ports: number): Complex[] {
  if (typeof referenceOhm === 'number') return Array.from({ length: ports }, () => [referenceOhm, 0]);
  return referenceOhm.map((port): Complex => (typeof port === 'number' ? [port, 0] : port));
}

/** Currents stand in the equations as volts over this many ohms, so that all unknowns are of one size. */
const unitOhm = 50;

function solvedAt(
  channel: CompleteChannel,
  frequencyHz: number,
  point: number,
  conductors: number,
  references: readonly Complex[],
  parts: ReadonlyMap<string, Network>,
): Complex[][] {
  const row = channel.elements.flatMap(simpleParts);
  const joints = row.length + 1;
  const ports = conductors * 2;
  const equations = new Equations(joints * ports, ports);
  const joint = (index: number): Joint => ({
    voltage: (conductor) => index * ports + conductor,
    current: (conductor) => index * ports + conductors + conductor,
  });
  const jointOhm = references.find(([, im]) => im === 0)?.[0] ?? unitOhm;
  source(equations, joint(0), 0, references, conductors, 1);
  row.forEach((element, k) => {
    elementEquations(element, { frequencyHz, point, conductors, jointOhm, parts }).forEach((terms) => {
      equations.add(
        terms.map(({ side, conductor, of, coefficient }) => {
          const at = joint(side === 'near' ? k : k + 1);
          // A current into the far side flows against the direction in which currents are counted here.
          if (of === 'voltage') return [at.voltage(conductor), coefficient] as const;
          return [at.current(conductor), scale(coefficient, (side === 'near' ? 1 : -1) / unitOhm)] as const;
        }),
      );
    });
  });
  source(equations, joint(joints - 1), conductors, references, conductors, -1);
  const unknowns = equations.solve();
  return Array.from({ length: ports }, (_, port) => {
    const far = port >= conductors;
    const at = joint(far ? joints - 1 : 0);
    const z = references[port]!;
    return Array.from({ length: ports }, (_unused, side): Complex => {
      const voltage = unknowns[at.voltage(port % conductors)]![side]!;
      const current = scale(unknowns[at.current(port % conductors)]![side]!, (far ? -1 : 1) / unitOhm);
      // b = (V - Z* I)/(2 sqrt(Re Z))
      const re = voltage[0] - (z[0] * current[0] + z[1] * current[1]);
      const im = voltage[1] - (z[0] * current[1] - z[1] * current[0]);
      return scale([re, im], 1 / (2 * Math.sqrt(z[0])));
    });
  });
}

/** V + Z I = 2 sqrt(Re Z) a at the ports of one end; a is 1 at one port a side. */
function source(
  equations: Equations,
  joint: Joint,
  firstPort: number,
  references: readonly Complex[],
  conductors: number,
  inwards: 1 | -1,
): void {
  for (let conductor = 0; conductor < conductors; conductor++) {
    const port = firstPort + conductor;
    const z = references[port]!;
    equations.add(
      [
        [joint.voltage(conductor), [1, 0]],
        [joint.current(conductor), scale(z, inwards / unitOhm)],
      ],
      references.map((_, side): Complex => [side === port ? 2 * Math.sqrt(z[0]) : 0, 0]),
    );
  }
}
