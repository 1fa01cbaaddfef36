import type { Barrel, PlacedLayer, Via } from './barrel';
import { pairInOpening } from './opening';
import { rememberer } from './remembered';
import { isPlane, returnDiameterM, sizeOn } from './sizes';
import { wireCapacitances, type Wire } from './wires';

/**
 * The modes of a piece of barrel across its axis: capacitance a metre of one conductor over the permittivity around it. A
 * single via has one mode. A pair has two, (cos a, sin a) and (-sin a, cos a) on its p and n legs: even and odd at 45 degrees.
 */
export interface CrossSection {
  readonly modes: readonly number[];
  readonly angleRad: number;
  /** Estimate of what is left of the solver's mesh error, as a share; 0 where the section is solved in closed form or by series. */
  readonly meshErrorShare: number;
}

const even = Math.PI / 4;
const single = 0;
const remembered = rememberer<CrossSection>();

/**
 * Cross-section of a barrel, or of its pad, of a diameter at a layer.
 * At a plane it is coaxial with its antipad (formula C2), a pair two rods in their antipads. Between planes it is a line of
 * round wires against the named return vias, each as thick as this barrel's drill. Where none are named, current is taken to
 * return about the barrel at the radius of the antipads, where it passes from plane to plane (C2 again).
 */
export function crossSection(via: Via, barrel: Barrel, placed: PlacedLayer, diameterM: number): CrossSection {
  const plane = isPlane(placed);
  if (!plane && via.returnVias?.length) return amongReturns(via, diameterM);
  const outerM = plane ? sizeOn(via.antipadM, placed.layer.name)! : returnDiameterM(via, barrel, placed)!;
  if (via.pitchM === undefined) {
    return { modes: [(2 * Math.PI) / Math.log(outerM / diameterM)], angleRad: single, meshErrorShare: 0 };
  }
  const pair = pairInOpening(diameterM, outerM, via.pitchM);
  return { modes: [pair.even, pair.odd], angleRad: even, meshErrorShare: pair.meshErrorShare };
}

/** Where the legs stand about the via's middle: a pair lies along x, p at -pitch/2, n at +pitch/2. */
export function legsOf({ pitchM }: Pick<Via, 'pitchM'>): readonly (readonly [number, number])[] {
  return pitchM === undefined
    ? [[0, 0]]
    : [
        [-pitchM / 2, 0],
        [pitchM / 2, 0],
      ];
}

function amongReturns(via: Via, diameterM: number): CrossSection {
  const returns = via.returnVias ?? [];
  const legs = legsOf(via);
  const key = JSON.stringify([diameterM, via.drillM, via.pitchM, returns]);
  return remembered(key, () => {
    const wire = ([xM, yM]: readonly [number, number], width: number): Wire => ({
      xM,
      yM,
      radiusM: width / 2,
    });
    const wires = [...legs.map((at) => wire(at, diameterM)), ...returns.map((at) => wire(at, via.drillM))];
    const c = wireCapacitances(wires, legs.length);
    return legs.length === 1
      ? { modes: [c[0]!], angleRad: single, meshErrorShare: 0 }
      : modesOf(c[0]!, (c[1]! + c[2]!) / 2, c[3]!);
  });
}

/** Below this share a difference of the legs is rounding. */
const alike = 1e-9;

/** Eigenvalues and the angle of a symmetric 2 x 2 matrix; its modes travel alike, for the space is homogeneous. */
function modesOf(p: number, mutual: number, n: number): CrossSection {
  if (Math.abs(p - n) <= alike * (p + n)) {
    return { modes: [(p + n) / 2 + mutual, (p + n) / 2 - mutual], angleRad: even, meshErrorShare: 0 };
  }
  // The first mode is the even-like one: the lower capacitance, for the mutual term is below 0.
  const half = Math.hypot((p - n) / 2, mutual);
  const angleRad = Math.atan2(-2 * mutual, n - p) / 2;
  return { modes: [(p + n) / 2 - half, (p + n) / 2 + half], angleRad, meshErrorShare: 0 };
}
