import type { Signaling, Stackup } from '@tollgate/contracts';
import type { Via } from './barrel';
import { impedanceOhm } from './ladder';
import { modelVia } from './model';
import { notchOf } from './notch';
import type { Piece } from './sections';

/** A stretch of barrel as a reviewer sees it: lossless, permittivity as given. Pairs tell even and odd, of one conductor. */
export interface ViaSection {
  readonly layer: string;
  readonly part: 'above' | 'through' | 'below';
  readonly what: 'barrel' | 'pad';
  readonly lengthM: number;
  readonly permittivity: number;
  readonly z0Ohm?: number;
  readonly evenZ0Ohm?: number;
  readonly oddZ0Ohm?: number;
}

export interface ViaFacts {
  /** From top to bottom. */
  readonly sections: readonly ViaSection[];
  readonly throughM: number;
  /** Open stubs; 0 where there is none. */
  readonly stubs: { readonly aboveM: number; readonly belowM: number };
  /** The model's own minimum of |S21| (SDD21 of a pair); null without a stub. */
  readonly notchHz: number | null;
  /** Half of the notch; null where no stub limits the model. */
  readonly validToHz: number | null;
  /** The largest estimate of mesh error among the sections, as a share; 0 where none needed a mesh. */
  readonly meshErrorShare: number;
  /** The publications the sections come from. */
  readonly sources: readonly string[];
}

const coaxialSource = 'coaxial line about the barrel (60 ohm/sqrt(er) x ln(antipad/drill))';
const rodsSource = 'two rods in their antipads, method of moments (Harrington, 1968)';
const wiresSource = 'round wires against the return vias, by multipoles (Smythe, ch. 4)';
const padSource = 'pad faces as steps of a coaxial line (Somlo, 1967)';

/**
 * What the model of a via is made of, for a reviewer and for a drawing.
 * @throws ElementError
 */
export function viaFacts(via: Via, signaling: Signaling, stackup: Stackup | undefined): ViaFacts {
  const model = modelVia(via, signaling, stackup);
  const { sections, barrel } = model;
  const told = (part: ViaSection['part'], pieces: readonly Piece[]): ViaSection[] =>
    pieces.flatMap((piece) => {
      if (piece.what === 'pad-face') return [];
      const permittivity = sections.materials[piece.material]!.dk;
      const [first, second] = piece.modes.map((mode) => impedanceOhm(mode, permittivity));
      const { layer, what, lengthM } = piece;
      const impedances = second === undefined ? { z0Ohm: first! } : { evenZ0Ohm: first!, oddZ0Ohm: second };
      return [{ layer, part, what, lengthM, permittivity, ...impedances }];
    });
  const notchHz = notchOf(model);
  const pieces = [...sections.above, ...sections.through, ...sections.below];
  return {
    sections: [
      ...told('above', sections.above),
      ...told('through', sections.through),
      ...told('below', sections.below),
    ],
    throughM: barrel.lowerM - barrel.upperM,
    stubs: {
      aboveM: Math.max(0, barrel.upperM - barrel.topM),
      belowM: Math.max(0, barrel.bottomM - barrel.lowerM),
    },
    notchHz,
    validToHz: notchHz === null ? null : notchHz / 2,
    meshErrorShare: Math.max(0, ...pieces.map((piece) => piece.meshErrorShare)),
    sources: [
      via.pitchM === undefined ? coaxialSource : rodsSource,
      ...(via.returnVias?.length ? [wiresSource] : []),
      ...(pieces.some(({ what }) => what === 'pad-face') ? [padSource] : []),
    ],
  };
}
