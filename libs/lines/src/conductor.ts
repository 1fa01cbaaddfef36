import { vacuumImpedance } from './constants';
import type { Rectangle } from './cross-section';
import { checkPositive } from './line-error';
import type { Roughness } from './roughness';
import { skinDepth, surfaceResistance } from './roughness';
import { roughnessExcess } from './rough-impedance';

/** Metal of a trace and of the planes it returns on. */
export interface Conductor {
  /** S/m, at the temperature of the board. */
  readonly conductivitySPerM: number;
  /** Absent faces are smooth. */
  readonly roughness?: {
    readonly foot: Roughness;
    readonly top: Roughness;
    /** The face of the plane that looks at the trace; default: as the face of the trace that looks at it. */
    readonly planeBelow?: Roughness;
    readonly planeAbove?: Roughness;
  };
}

/** How fast the impedance in air grows as each wall recedes, ohm a metre (Wheeler's incremental inductance). */
export interface WallShares {
  readonly lower: number;
  readonly upper: number;
  readonly sides: number;
  readonly planeBelow: number;
  readonly planeAbove: number;
}

/**
 * Incremental inductance (H. A. Wheeler, Proc. IRE 30, 1942, pp. 412-424; Pozar eq. 2.106; formula B8), wall by wall, so that every face
 * can have its own roughness: R = (Rs/eta0) sum of dZ0air/dn. Valid where width and thickness are more than 3 to 4 skin depths.
 */
export function wallShares(rectangle: Rectangle, airOhm: (rectangle: Rectangle) => number): WallShares {
  const { widthM, thicknessM, belowM, aboveM, gapM } = rectangle;
  const step = 1e-4 * Math.min(widthM, thicknessM, belowM, aboveM, gapM);
  const slope = (recede: (by: number) => Partial<Rectangle>): number =>
    (airOhm({ ...rectangle, ...recede(step) }) - airOhm({ ...rectangle, ...recede(-step) })) / (2 * step);
  return {
    lower: slope((by) => ({ thicknessM: thicknessM - by, belowM: belowM + by })),
    upper: slope((by) => ({ thicknessM: thicknessM - by, aboveM: aboveM + by })),
    sides: slope((by) => ({ widthM: widthM - 2 * by, gapM: gapM + 2 * by })),
    planeBelow: slope((by) => ({ belowM: belowM + by })),
    planeAbove: aboveM === Infinity ? 0 : slope((by) => ({ aboveM: aboveM + by })),
  };
}

const smooth: Roughness = { model: 'none' };

/**
 * Internal impedance a metre at each frequency, pairs (R, X) in ohm/m. The skin-effect resistance of the walls is joined to the resistance
 * at 0 Hz by the impedance of a slab, Rdc x coth x with x = (1 + j) Rskin/Rdc (formula B8): it tends to both, and is causal.
 * Roughness adds to the skin part wall by wall, resistance and reactance together (roughnessExcess); the etched sides count as
 * the mean of foot and top.
 */
export function internalImpedance(
  conductor: Conductor,
  rectangle: Rectangle,
  foot: 'down' | 'up',
  shares: WallShares,
  frequenciesHz: Float64Array,
): Float64Array {
  const { conductivitySPerM, roughness } = conductor;
  checkPositive(conductivitySPerM, 'conductivitySPerM');
  const directOhmPerM = 1 / (conductivitySPerM * rectangle.widthM * rectangle.thicknessM);
  const faceFoot = roughness?.foot ?? smooth;
  const faceTop = roughness?.top ?? smooth;
  const lower = foot === 'down' ? faceFoot : faceTop;
  const upper = foot === 'down' ? faceTop : faceFoot;
  const faces = (
    [
      [shares.lower + shares.sides / 2, lower],
      [shares.upper + shares.sides / 2, upper],
      [shares.planeBelow, roughness?.planeBelow ?? lower],
      [shares.planeAbove, roughness?.planeAbove ?? upper],
    ] as const
  ).filter(([share, face]) => share > 0 && face.model !== 'none');
  const smoothSum = shares.lower + shares.upper + shares.sides + shares.planeBelow + shares.planeAbove;
  const out = new Float64Array(frequenciesHz.length * 2);
  frequenciesHz.forEach((f, k) => {
    const depth = skinDepth(f, conductivitySPerM);
    const sheet = surfaceResistance(f, conductivitySPerM) / vacuumImpedance;
    const [re, im] = slab((sheet * smoothSum) / directOhmPerM);
    out[k * 2] = directOhmPerM * re;
    out[k * 2 + 1] = directOhmPerM * im;
    for (const [share, face] of faces) {
      const [resistance, reactance] = roughnessExcess(face, depth);
      out[k * 2]! += sheet * share * resistance;
      out[k * 2 + 1]! += sheet * share * reactance;
    }
  });
  return out;
}

/** x coth x for x = (1 + j) a, a from 0 up. */
function slab(a: number): [number, number] {
  if (a < 1e-3) return [1 + (4 / 45) * a ** 4, (2 / 3) * a * a];
  if (a > 20) return [a, a];
  // coth((1 + j) a) = (sinh 2a - j sin 2a)/(cosh 2a - cos 2a)
  const size = Math.cosh(2 * a) - Math.cos(2 * a);
  const re = Math.sinh(2 * a) / size;
  const im = -Math.sin(2 * a) / size;
  return [a * (re - im), a * (re + im)];
}
