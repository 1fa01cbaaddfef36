import type { Stackup } from '@tollgate/contracts';
import type { Dielectric } from '@tollgate/lines';
import { isCopper } from '../trace/layers';
import type { Barrel, PlacedLayer, Via } from './barrel';
import { crossSection, type CrossSection } from './cross-section';
import { materialAt } from './materials';
import { stepCapacitanceM } from './pad-step';
import { lengthInM, padOn } from './sizes';

/** A stretch of barrel as a uniform line, or (length 0) the capacitance of a pad's face. */
export interface Piece extends CrossSection {
  readonly layer: string;
  readonly what: 'barrel' | 'pad' | 'pad-face';
  readonly lengthM: number;
  /** Modes of a pad's face are capacitances over the permittivity, in metres. */
  readonly modes: readonly number[];
  /** Index into the model's materials. */
  readonly material: number;
}

/** A via as lines: what leads through and what is left open above and below, each from top to bottom. */
export interface Sections {
  readonly materials: readonly Dielectric[];
  readonly above: readonly Piece[];
  readonly through: readonly Piece[];
  readonly below: readonly Piece[];
}

/** Cuts a barrel into its pieces: each layer it crosses, by its own thickness, pad or no pad, and the faces of the pads. */
export function cutBarrel(via: Via, barrel: Barrel, stackup: Stackup): Sections {
  const materials: Dielectric[] = [];
  const indexOf = (placed: PlacedLayer): number => {
    const material = materialAt(barrel, stackup, placed);
    const known = materials.findIndex((other) => JSON.stringify(other) === JSON.stringify(material));
    return known >= 0 ? known : materials.push(material) - 1;
  };
  const faces = padFaces(via, barrel);
  const between = (topM: number, bottomM: number): Piece[] => {
    const pieces: Piece[] = [];
    if (!(bottomM > topM)) return pieces;
    const addFaces = (atM: number): void => {
      for (const face of faces) {
        if (face.atM === atM) pieces.push(facePiece(via, barrel, face, indexOf(face.beyond)));
      }
    };
    addFaces(topM);
    for (const placed of barrel.layers) {
      const lengthM = lengthInM(placed, { topM, bottomM });
      if (!(lengthM > 0)) continue;
      if (placed.topM > topM) addFaces(placed.topM);
      pieces.push(linePiece(via, barrel, placed, lengthM, indexOf(placed)));
    }
    addFaces(bottomM);
    return pieces;
  };
  return {
    materials,
    above: between(barrel.topM, barrel.upperM),
    through: between(barrel.upperM, barrel.lowerM),
    below: between(barrel.lowerM, barrel.bottomM),
  };
}

function linePiece(via: Via, barrel: Barrel, placed: PlacedLayer, lengthM: number, material: number): Piece {
  const padM = padOn(via, placed);
  return {
    ...crossSection(via, barrel, placed, padM > 0 ? padM : via.drillM),
    layer: placed.layer.name,
    what: padM > 0 ? 'pad' : 'barrel',
    lengthM,
    material,
  };
}

/** A face of a pad that looks into a dielectric. */
interface Face {
  readonly pad: PlacedLayer;
  readonly beyond: PlacedLayer;
  readonly atM: number;
}

/** The outer faces of outermost copper look into air, and count as none. */
function padFaces(via: Via, barrel: Barrel): Face[] {
  return barrel.layers.flatMap((pad, i) => {
    if (padOn(via, pad) === 0 || !(lengthInM(pad, barrel) > 0)) return [];
    const middleM = (pad.topM + pad.bottomM) / 2;
    const sides = [
      { beyond: barrel.layers[i - 1], atM: pad.topM },
      { beyond: barrel.layers[i + 1], atM: pad.bottomM },
    ];
    return sides.flatMap(({ beyond, atM }) => {
      if (beyond === undefined || isCopper(beyond.layer)) return [];
      // A blind barrel ends in the middle of its last pad, whose far face then stands at the end.
      if (atM < barrel.topM && barrel.topM === middleM) return [{ pad, beyond, atM: barrel.topM }];
      if (atM > barrel.bottomM && barrel.bottomM === middleM) return [{ pad, beyond, atM: barrel.bottomM }];
      return atM >= barrel.topM && atM <= barrel.bottomM ? [{ pad, beyond, atM }] : [];
    });
  });
}

/** For each mode the coaxial line of the same capacitance stands in, and the step of its inner conductor. */
function facePiece(via: Via, barrel: Barrel, { pad, beyond }: Face, material: number): Piece {
  const padM = padOn(via, pad) / 2;
  const across = crossSection(via, barrel, pad, padM * 2);
  return {
    angleRad: across.angleRad,
    meshErrorShare: across.meshErrorShare,
    modes: across.modes.map((mode) =>
      stepCapacitanceM(via.drillM / 2, padM, padM * Math.exp((2 * Math.PI) / mode)),
    ),
    layer: beyond.layer.name,
    what: 'pad-face',
    lengthM: 0,
    material,
  };
}
