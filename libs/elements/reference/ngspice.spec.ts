import { impedanceOhm, flightS } from '../src/via/ladder';
import { vacuumPermittivity } from '../src/via/medium';
import { mediumAt, modelVia, runsOf, type ViaModel } from '../src/via/model';
import { scatterOf } from '../src/via/scatter';
import type { Piece } from '../src/via/sections';
import { eightLayers, farthest, via } from '../src/via/testing/boards';
import { describeWith, ngspice } from '../../../test/support/needs';
import { scatterBySpice } from './ngspice';

/** Lossless lines and capacitors of a single via. */
function losslessCircuit(model: ViaModel): string[] {
  const lines: string[] = [];
  const chain = (pieces: readonly Piece[], name: string, from: string, to: string): void => {
    if (pieces.length === 0) return;
    pieces.forEach((piece, i) => {
      const near = i === 0 ? from : `${name}${i}`;
      const far = i === pieces.length - 1 ? to : `${name}${i + 1}`;
      const { dk } = model.sections.materials[piece.material]!;
      const [mode] = piece.modes as [number];
      if (piece.lengthM > 0) {
        lines.push(
          `T${name}${i} ${near} 0 ${far} 0 Z0=${impedanceOhm(mode, dk)} TD=${flightS(piece.lengthM, dk)}`,
        );
      } else {
        lines.push(
          `C${name}${i} ${near} 0 ${mode * dk * vacuumPermittivity}`,
          `V${name}${i} ${near} ${far} 0`,
        );
      }
    });
    lines.push(`R${name} ${to} 0 1e15`);
  };
  const { through, nearStub, farStub } = runsOf(model);
  chain(nearStub, 'n', 'port1', 'nend');
  chain(through, 't', 'port1', 'port2');
  chain(farStub, 'f', 'port2', 'fend');
  return lines;
}

/** Cells a piece of line is cut into. */
const cells = 24;

/**
 * A pair at one frequency as a ladder of cells: coupled inductors with their resistance, capacitors and conductances to ground and
 * between the legs, half of them at each end of a cell.
 */
function pairCircuit(model: ViaModel, frequencyHz: number): string[] {
  const medium = mediumAt(model, Float64Array.of(frequencyHz));
  const omega = 2 * Math.PI * frequencyHz;
  const lines: string[] = [];
  let count = 0;
  const shunt = (p: string, n: string, c: readonly number[], piece: Piece, share: number): void => {
    const er = medium.permittivities[piece.material]!;
    const branches = [
      [p, '0', c[0]! + c[1]!],
      [n, '0', c[2]! + c[1]!],
      [p, n, -c[1]!],
    ] as const;
    for (const [a, b, value] of branches) {
      const capacitance = value * share * vacuumPermittivity;
      lines.push(`C${++count} ${a} ${b} ${capacitance * er[0]!}`);
      if (capacitance * er[1]! !== 0) lines.push(`R${count} ${a} ${b} ${1 / (omega * capacitance * er[1]!)}`);
    }
  };
  const run = (pieces: readonly Piece[], name: string, from: number, to: number): void => {
    let [p, n] = [`port${from}`, `port${from + 1}`];
    pieces.forEach((piece, i) => {
      const c = matrixOf(piece);
      if (piece.lengthM === 0) {
        shunt(p, n, c, piece, 1);
        return;
      }
      const cellM = piece.lengthM / cells;
      const det = c[0] * c[2] - c[1] * c[1];
      const inside = medium.barrelOhmPerM[1]! / omega;
      const inductance = (k: number) => cellM * ((4e-7 * Math.PI * k) / det + inside);
      const [own, other] = [inductance(c[2]), inductance(c[0])];
      const mutual = (-cellM * 4e-7 * Math.PI * c[1]) / det;
      const resistance = cellM * medium.barrelOhmPerM[0]!;
      for (let k = 0; k < cells; k++) {
        const last = i === pieces.length - 1 && k === cells - 1 && to > 0;
        const [nextP, nextN] = last
          ? [`port${to}`, `port${to + 1}`]
          : [`${name}p${i}x${k}`, `${name}n${i}x${k}`];
        shunt(p, n, c, piece, cellM / 2);
        const id = ++count;
        lines.push(
          `Lp${id} ${p} m${id}p ${own}`,
          `Ln${id} ${n} m${id}n ${other}`,
          `K${id} Lp${id} Ln${id} ${mutual / Math.sqrt(own * other)}`,
          `Rp${id} m${id}p ${nextP} ${resistance}`,
          `Rn${id} m${id}n ${nextN} ${resistance}`,
        );
        shunt(nextP, nextN, c, piece, cellM / 2);
        [p, n] = [nextP, nextN];
      }
    });
  };
  const { through, nearStub, farStub } = runsOf(model);
  run(nearStub, 'a', 1, 0);
  run(through, 't', 1, 3);
  run(farStub, 'b', 3, 0);
  return lines;
}

/** pp, pn, nn of a piece from its modes, over the permittivity. */
function matrixOf({ modes, angleRad }: Piece): [number, number, number] {
  const [first, second] = modes as [number, number];
  const [cos, sin] = [Math.cos(angleRad), Math.sin(angleRad)];
  return [
    cos * cos * first + sin * sin * second,
    cos * sin * (first - second),
    sin * sin * first + cos * cos * second,
  ];
}

describeWith(ngspice, 'ngspice, the same sections as a ladder', () => {
  it.each([
    ['with a stub below', via()],
    ['with pads', via({ padM: 0.45e-3 })],
    [
      'with stubs on both sides, upward, pads on some layers',
      via({ fromLayer: 'L6', toLayer: 'L3', padM: { L3: 0.5e-3, L6: 0.45e-3 } }),
    ],
    ['drilled back', via({ padM: 0.45e-3, backdrill: { bottomResidualM: 0.2e-3 } })],
    [
      'among return vias',
      via({
        padM: 0.45e-3,
        returnVias: [
          [0.8e-3, 0.1e-3],
          [-0.7e-3, 0.3e-3],
        ],
      }),
    ],
  ])('agrees on a lossless via %s', (_, fields) => {
    const constant = {
      layers: eightLayers.layers!.map((layer) =>
        layer.kind === 'copper' ? layer : { ...layer, df: 0, dispersion: 'constant' as const },
      ),
    };
    const model = { ...modelVia(fields, 'single-ended', constant), conductivitySPerM: 1e30 };
    const frequencies = { fromHz: 1e9, toHz: 6e10, points: 60 };
    const frequenciesHz = Float64Array.from({ length: 60 }, (__, k) => 1e9 * (k + 1));
    const theirs = scatterBySpice(losslessCircuit(model), 2, frequencies, 50);
    expect(farthest(scatterOf(model, frequenciesHz, 50), theirs)).toBeLessThan(1e-8);
  });

  it.each([
    ['without return vias', via({ pitchM: 0.6e-3, padM: 0.4e-3 })],
    [
      'with mirrored return vias',
      via({
        pitchM: 1e-3,
        padM: 0.4e-3,
        returnVias: [
          [-1.1e-3, 0],
          [1.1e-3, 0],
        ],
      }),
    ],
    [
      'with return vias that favour a leg',
      via({
        pitchM: 1e-3,
        padM: 0.4e-3,
        returnVias: [
          [1.2e-3, 0.2e-3],
          [0.3e-3, 1e-3],
        ],
      }),
    ],
    [
      'from inside, with stubs on both sides',
      via({ fromLayer: 'L3', toLayer: 'L6', pitchM: 1e-3, returnVias: [[1.2e-3, 0.2e-3]] }),
    ],
  ])('agrees on a lossy pair %s', (_, fields) => {
    const model = modelVia(fields, 'differential', eightLayers);
    for (const frequencyHz of [1e9, 1.3e10, 2.5e10]) {
      const frequencies = { fromHz: frequencyHz, toHz: frequencyHz, points: 1 };
      const theirs = scatterBySpice(pairCircuit(model, frequencyHz), 4, frequencies, 50);
      // What is left is the cells: (beta times cell)^2.
      expect(farthest(scatterOf(model, Float64Array.of(frequencyHz), 50), theirs)).toBeLessThan(1e-4);
    }
  });
});
