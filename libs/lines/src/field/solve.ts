import { vacuumImpedance } from '../constants';
import type { WallShares } from '../conductor';
import type { ModeName } from '../models';
import { kernelOf, type Kernel } from './kernel';
import { meshOf, type Fineness, type Mesh } from './mesh';
import { airCharges, chargeOf, freeCharge, type Symmetry } from './moments';
import { outlineOf } from './outline';
import { wallSharesOf } from './recession';
import { shapeOf, type FieldSection, type Shape } from './section';

export interface FieldMode {
  /** Lossless, quasi-static, of one conductor. */
  readonly z0Ohm: number;
  readonly effectivePermittivity: number;
  readonly airOhm: number;
  /**
   * How the effective permittivity grows with that of each sheet, and of the mask last; with what air adds it is homogeneous of
   * degree one: ee = sum of filling x er + the filling of air.
   */
  readonly filling: readonly number[];
  readonly shares: WallShares;
}

/** What one mesh tells of a mode; the walls' shares are found apart. */
type FieldCharges = Omit<FieldMode, 'shares'>;

export interface FieldSolution {
  readonly modes: Partial<Record<ModeName, FieldMode>>;
  /** Relative, from two meshes: the difference between them, which the extrapolated value stays well inside. */
  readonly error: { readonly z0: number; readonly permittivity: number };
  /** Segments of the finer mesh. */
  readonly unknowns: number;
}

const coarse: Fineness = { copper: 8, between: 6, open: 20 };
const fine: Fineness = { copper: 12, between: 9, open: 30 };
/** Halving the segments takes the error down by about this power of two. */
const order = 2;
/** What cut faces and corners leave open where the meshes happen to agree, in one dielectric and in several. */
const leastError = { z0: 2e-4, layeredZ0: 5e-4, permittivity: 1e-3 };

/**
 * Impedance, effective permittivity, fillings and wall shares of a cross-section by the method of moments: charges on copper and
 * bound charges on the faces between dielectrics, constant on each segment, in the space over a plane; quasi-static, no dispersion.
 * Two meshes give the value (extrapolated) and its error.
 *
 * @param finer times the segments of the standard meshes, for proofs of these
 * @throws LineError for a section that is none
 */
export function solveSection(section: FieldSection, finer = 1): FieldSolution {
  const shape = shapeOf(section);
  const names: readonly ModeName[] = section.gapM === undefined ? ['single'] : ['even', 'odd'];
  const meshes = [coarse, fine].map((mesh) => timesFiner(mesh, finer));
  const [rough, good] = meshes.map((mesh) => solveOn(shape, names, mesh));
  const shares = wallSharesOf(shape, names.map(symmetryOf), meshes[0]!);
  const modes: Partial<Record<ModeName, FieldMode>> = {};
  const error = { z0: 0, permittivity: 0 };
  const reach = 1 / ((fine.copper / coarse.copper) ** order - 1);
  names.forEach((name, i) => {
    const [a, b] = [rough!.modes[i]!, good!.modes[i]!];
    const extrapolated = (pick: (mode: FieldCharges) => number) => pick(b) + reach * (pick(b) - pick(a));
    modes[name] = {
      z0Ohm: extrapolated((mode) => mode.z0Ohm),
      effectivePermittivity: extrapolated((mode) => mode.effectivePermittivity),
      airOhm: extrapolated((mode) => mode.airOhm),
      filling: b.filling.map((_, k) => extrapolated((mode) => mode.filling[k]!)),
      shares: shares[i]!,
    };
    const z0 = Math.abs(a.z0Ohm / b.z0Ohm - 1);
    const permittivity = Math.abs(a.effectivePermittivity / b.effectivePermittivity - 1);
    // One dielectric throughout is itself the answer.
    const layered = permittivity > 0;
    error.z0 = Math.max(error.z0, z0 + (layered ? leastError.layeredZ0 : leastError.z0));
    error.permittivity = Math.max(error.permittivity, layered ? permittivity + leastError.permittivity : 0);
  });
  return { modes, error, unknowns: good!.unknowns };
}

function timesFiner({ copper, between, open }: Fineness, finer: number): Fineness {
  return {
    copper: Math.round(copper * finer),
    between: Math.round(between * finer),
    open: Math.round(open * finer),
  };
}

function solveOn(
  shape: Shape,
  names: readonly ModeName[],
  fineness: Fineness,
): { modes: FieldCharges[]; unknowns: number } {
  const mesh = meshOf(outlineOf(shape), fineness);
  const kernel = kernelOf(mesh);
  return { modes: names.map((name) => modeOn(shape, mesh, kernel, name)), unknowns: mesh.count };
}

function symmetryOf(name: ModeName): Symmetry {
  return name === 'odd' ? -1 : 1;
}

function modeOn({ section }: Shape, mesh: Mesh, kernel: Kernel, name: ModeName): FieldCharges {
  const symmetry = symmetryOf(name);
  const alone = name === 'single';
  const charges = airCharges(mesh, kernel, symmetry);
  const airCharge = chargeOf(mesh, charges);
  const airOhm = vacuumImpedance / (airCharge * (alone ? 2 : 1));
  const given = [...section.sheets, ...(section.mask ? [section.mask] : [])].map(({ dk }) => dk);
  // Without a face between dielectrics one sheet fills all.
  const homogeneous = mesh.count === mesh.copperCount;
  const filled = homogeneous ? undefined : freeCharge(mesh, kernel, symmetry, [...given, 1]);
  const effectivePermittivity = filled ? filled.charge / airCharge : given[0]!;
  const filling = given.map((_, k) => (filled ? filled.slopes[k]! / airCharge : 1));
  const z0Ohm = airOhm / Math.sqrt(effectivePermittivity);
  return { z0Ohm, effectivePermittivity, airOhm, filling };
}
