import type { Signaling, Stackup } from '@tollgate/contracts';
import { copperConductivityAt } from '@tollgate/lines';
import { isCopper } from '../trace/layers';
import { ElementError, type BuildContext } from '../types';
import { placeBarrel, type Barrel, type Via } from './barrel';
import { ladderOf } from './ladder';
import { mediumOf, type Medium } from './medium';
import { viaProblems } from './problems';
import { cutBarrel, type Piece, type Sections } from './sections';
import type { ThroughAndStubs } from './through-and-stubs';

/** Temperature of a board that states none, in degrees. */
const roomC = 20;

/** A via ready to be computed at any frequency. */
export interface ViaModel {
  readonly barrel: Barrel;
  readonly sections: Sections;
  readonly drillM: number;
  readonly conductivitySPerM: number;
}

/**
 * @throws ElementError with the first of the via's problems
 */
export function modelVia(via: Via, signaling: Signaling, stackup: Stackup | undefined): ViaModel {
  const [first] = viaProblems(via, signaling, stackup);
  if (first) throw new ElementError(first);
  const barrel = placeBarrel(via, stackup);
  const entry = barrel.layers.find(({ layer }) => layer.name === via.fromLayer)!.layer;
  const atRoom = isCopper(entry) ? entry.conductivitySPerM : 5.8e7;
  return {
    barrel,
    sections: cutBarrel(via, barrel, stackup!),
    drillM: via.drillM,
    conductivitySPerM: copperConductivityAt(atRoom, stackup?.temperatureC ?? roomC),
  };
}

export function modelIn(via: Via, { signaling, stackup }: BuildContext): ViaModel {
  return modelVia(via, signaling, stackup);
}

export function mediumAt(model: ViaModel, frequenciesHz: Float64Array): Medium {
  return mediumOf(model.sections.materials, model.drillM, model.conductivitySPerM, frequenciesHz);
}

/** The runs of pieces as a wave from the near side meets them: stubs from their node outward. */
export interface Runs {
  readonly through: readonly Piece[];
  readonly nearStub: readonly Piece[];
  readonly farStub: readonly Piece[];
}

export function runsOf({ barrel, sections }: ViaModel): Runs {
  const above = [...sections.above].reverse();
  return barrel.downward
    ? { through: sections.through, nearStub: above, farStub: sections.below }
    : { through: [...sections.through].reverse(), nearStub: sections.below, farStub: above };
}

/** One mode of the runs; only where the modes are the same all along. */
export function modeOfRuns({ through, nearStub, farStub }: Runs, mode: number): ThroughAndStubs {
  return {
    through: ladderOf(through, mode),
    nearStub: ladderOf(nearStub, mode),
    farStub: ladderOf(farStub, mode),
  };
}
