import { Readable } from 'node:stream';
import { buildElement } from '@tollgate/elements';
import type { ElementOf } from '@tollgate/contracts';
import { uniformReference } from '@tollgate/network';
import { writeTouchstone } from '@tollgate/touchstone';

type Connector = ElementOf<'connector'>;

const mezzanine: NonNullable<Connector['circuit']> = [
  { kind: 'pair-shunt', capacitanceF: 45e-15, mutualCapacitanceF: 9e-15 },
  { kind: 'pair-series', inductanceH: 130e-12, mutualInductanceH: 22e-12 },
  {
    kind: 'coupled-line',
    evenZ0Ohm: 54,
    oddZ0Ohm: 47.5,
    evenEffectivePermittivity: 3.1,
    oddEffectivePermittivity: 3.05,
    lengthM: 0.0085,
    evenLoss: { sqrtDbPerM: 7, linearDbPerM: 3.2 },
    oddLoss: { sqrtDbPerM: 7.5, linearDbPerM: 3.4 },
  },
  { kind: 'pair-series', inductanceH: 110e-12, mutualInductanceH: 18e-12 },
  { kind: 'pair-shunt', capacitanceF: 52e-15, mutualCapacitanceF: 10e-15 },
];

const launch: NonNullable<Connector['circuit']> = [
  { kind: 'shunt', capacitanceF: 60e-15 },
  {
    kind: 'line',
    z0Ohm: 48.5,
    lengthM: 0.006,
    effectivePermittivity: 2.9,
    lossSqrtDbPerM: 6,
    lossLinearDbPerM: 4,
  },
  { kind: 'series', inductanceH: 90e-12 },
];

export interface DemoPart {
  readonly name: string;
  readonly text: string;
}

function written(
  name: string,
  circuit: NonNullable<Connector['circuit']>,
  signaling: 'single-ended' | 'differential',
  stopHz: number,
): DemoPart {
  const points = stopHz / 10e6;
  const frequenciesHz = Float64Array.from({ length: points }, (_unused, i) => (i + 1) * 10e6);
  const ports = signaling === 'differential' ? 4 : 2;
  const element: Connector = {
    kind: 'connector',
    interpolation: 'polar',
    reversed: false,
    below: 'refuse',
    above: 'refuse',
    circuit,
  };
  const { s } = buildElement(element, frequenciesHz, { signaling, jointOhm: 50, parts: new Map() });
  const text = writeTouchstone(
    { ports, frequenciesHz, s, referenceOhm: uniformReference(ports, 50) },
    {
      version: '1.1',
      format: 'RI',
      unit: 'Hz',
      comments: [
        'Invented for the demonstration of Tollgate: a circuit model written out point by point, no measurement of any product.',
      ],
    },
  );
  return { name, text };
}

/** Touchstone files of the demonstration, computed by the engine from invented circuits: the same on every machine. */
export function demoParts(): { mezzanine: DemoPart; launch: DemoPart } {
  return {
    mezzanine: written('mezzanine_pair.s4p', mezzanine, 'differential', 30e9),
    launch: written('edge_launch_10ghz.s2p', launch, 'single-ended', 10e9),
  };
}

export function streamOf(part: DemoPart): Readable {
  return Readable.from([Buffer.from(part.text, 'latin1')]);
}
