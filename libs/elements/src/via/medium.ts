import type { Dielectric } from '@tollgate/lines';
import { permittivity, skinDepth, speedOfLight, vacuumPermeability } from '@tollgate/lines';

export const vacuumPermittivity = 1 / (vacuumPermeability * speedOfLight * speedOfLight);

/** Thickness of plating on the wall of a hole (common practice: 20 to 25 um, as IPC-6012 asks on average). */
const platingM = 25e-6;

/** What a barrel's pieces share at each frequency; pairs are (real, imaginary). */
export interface Medium {
  readonly frequenciesHz: Float64Array;
  /** Permittivity (er', er'') of each material. */
  readonly permittivities: readonly Float64Array[];
  /** Internal impedance of the barrel, ohm a metre. */
  readonly barrelOhmPerM: Float64Array;
}

/**
 * @param drillM outer diameter of the barrel
 * @param conductivitySPerM of its plating
 */
export function mediumOf(
  materials: readonly Dielectric[],
  drillM: number,
  conductivitySPerM: number,
  frequenciesHz: Float64Array,
): Medium {
  return {
    frequenciesHz,
    permittivities: materials.map((material) => permittivity(material, frequenciesHz)),
    barrelOhmPerM: barrelImpedance(drillM, conductivitySPerM, frequenciesHz),
  };
}

/**
 * Skin effect in the plated wall, whose current keeps to its outer face: Rdc x coth x with x = (1 + j) t/delta, which tends to
 * the resistance of the wall at 0 Hz and to Rs (1 + j)/(pi d) above (impedance of a slab, formula B8; t much less than d).
 */
function barrelImpedance(
  drillM: number,
  conductivitySPerM: number,
  frequenciesHz: Float64Array,
): Float64Array {
  const wallM = Math.min(platingM, drillM / 2);
  const directOhmPerM = 1 / (conductivitySPerM * Math.PI * wallM * (drillM - wallM));
  const out = new Float64Array(frequenciesHz.length * 2);
  for (let k = 0; k < frequenciesHz.length; k++) {
    const a = wallM / skinDepth(frequenciesHz[k]!, conductivitySPerM);
    // x coth x, with coth((1 + j) a) = (sinh 2a - j sin 2a)/(cosh 2a - cos 2a).
    let re = 1 + (4 / 45) * a ** 4;
    let im = (2 / 3) * a * a;
    if (a > 20) {
      re = a;
      im = a;
    } else if (a > 1e-2) {
      const size = Math.cosh(2 * a) - Math.cos(2 * a);
      re = (a * (Math.sinh(2 * a) + Math.sin(2 * a))) / size;
      im = (a * (Math.sinh(2 * a) - Math.sin(2 * a))) / size;
    }
    out[k * 2] = directOhmPerM * re;
    out[k * 2 + 1] = directOhmPerM * im;
  }
  return out;
}
