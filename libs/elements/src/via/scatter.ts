import { pairOfModes } from '../legs';
import { mediumAt, modeOfRuns, runsOf, type ViaModel } from './model';
import { turnedPair } from './turned-pair';
import { throughAndStubs } from './through-and-stubs';

const even = Math.PI / 4;

/** S of a via at a real reference: 2 ports, or 4 for a pair. */
export function scatterOf(model: ViaModel, frequenciesHz: Float64Array, referenceOhm: number): Float64Array {
  const runs = runsOf(model);
  const medium = mediumAt(model, frequenciesHz);
  const pieces = [...runs.through, ...runs.nearStub, ...runs.farStub];
  const mode = (index: number) => throughAndStubs(modeOfRuns(runs, index), medium, referenceOhm);
  if (pieces.every((piece) => piece.modes.length === 1)) return mode(0);
  // Return vias that don't mirror the legs mix even and odd on the way.
  return pieces.every((piece) => piece.angleRad === even)
    ? pairOfModes(mode(0), mode(1), frequenciesHz.length)
    : turnedPair(runs, medium, referenceOhm);
}
