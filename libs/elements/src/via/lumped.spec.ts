import type { ElementOf } from '@tollgate/contracts';
import { buildElement } from '../index';
import { buildVia, viaFacts } from './index';
import { contextOf, eightLayers, farthest, via } from './testing/boards';

const c0 = 299_792_458;

/** Inductance and capacitance of one conductor, summed over the sections of a part: L = Z l sqrt(er)/c0, C = l sqrt(er)/(c0 Z). */
function sums(sections: ReturnType<typeof viaFacts>['sections'], mode: 'evenZ0Ohm' | 'oddZ0Ohm') {
  const flights = sections.map(({ lengthM, permittivity }) => (lengthM * Math.sqrt(permittivity)) / c0);
  return {
    inductanceH: sections.reduce((sum, section, i) => sum + section[mode]! * flights[i]!, 0),
    capacitanceF: sections.reduce((sum, section, i) => sum + flights[i]! / section[mode]!, 0),
  };
}

/**
 * Well below its notch a pair of vias is the circuit it is often drawn as: capacitance on either side of coupled inductors, the
 * stub's on the far side. The circuit kinds it is set against are proven by cases of scikit-rf and ngspice.
 */
it('a pair far below its notch is a pair-shunt, a pair-series and a pair-shunt of the sums of its sections', () => {
  const context = contextOf(eightLayers, 'differential');
  const pair = via({
    pitchM: 0.6e-3,
    returnVias: [
      [-1.2e-3, 0],
      [1.2e-3, 0],
    ],
  });
  const { sections } = viaFacts(pair, 'differential', eightLayers);
  const through = sections.filter(({ part }) => part === 'through');
  const below = sections.filter(({ part }) => part === 'below');
  const [even, odd] = (['evenZ0Ohm', 'oddZ0Ohm'] as const).map((mode) => ({
    ...sums(through, mode),
    stubF: sums(below, mode).capacitanceF,
  }));
  const shunt = (evenF: number, oddF: number): ElementOf<'pair-shunt'> => ({
    kind: 'pair-shunt',
    capacitanceF: evenF,
    mutualCapacitanceF: (oddF - evenF) / 2,
  });
  const connector: ElementOf<'connector'> = {
    kind: 'connector',
    interpolation: 'polar',
    reversed: false,
    below: 'refuse',
    above: 'refuse',
    circuit: [
      shunt(even!.capacitanceF / 2, odd!.capacitanceF / 2),
      {
        kind: 'pair-series',
        inductanceH: (even!.inductanceH + odd!.inductanceH) / 2,
        mutualInductanceH: (even!.inductanceH - odd!.inductanceH) / 2,
      },
      shunt(even!.capacitanceF / 2 + even!.stubF, odd!.capacitanceF / 2 + odd!.stubF),
    ],
  };
  const through4 = Float64Array.from({ length: 32 }, (_, k) => ([4, 14, 16, 26].includes(k) ? 1 : 0));
  const [atOne, atHalf] = [1e9, 5e8].map((f) => {
    const own = buildVia(pair, Float64Array.of(f), context).s;
    const circuit = buildElement(connector, Float64Array.of(f), context).s;
    return { circuit: farthest(own, circuit), nothing: farthest(own, through4) };
  });
  expect(atOne!.circuit).toBeLessThan(0.01 * atOne!.nothing);
  expect(atHalf!.circuit).toBeLessThan(0.01 * atHalf!.nothing);
});
