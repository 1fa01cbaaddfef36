import { vacuumImpedance } from './constants';
import { airMicrostrip, microstripPermittivity } from './microstrip';

/** Static even- and odd-mode values of a pair of microstrips. */
export interface PairOnSubstrate {
  readonly evenZ0Ohm: number;
  readonly oddZ0Ohm: number;
  readonly evenPermittivity: number;
  readonly oddPermittivity: number;
}

/**
 * Edge-coupled microstrips of zero thickness, static (M. Kirschning and R. H. Jansen, IEEE Trans. MTT-32 no. 1, 1984, pp. 83-90, corrected
 * in MTT-33, 1985; formula B3). For 0.1 <= u <= 10, 0.1 <= g <= 10, 1 <= er <= 18; within 0.33 % of a Galerkin solution.
 *
 * @param u width, and g gap, over height
 */
export function kirschningPair(u: number, g: number, er: number): PairOnSubstrate {
  const ee = microstripPermittivity(u, er);
  const z = airMicrostrip(u) / Math.sqrt(ee);
  const v = (u * (20 + g * g)) / (10 + g * g) + g * Math.exp(-g);
  const even = microstripPermittivity(v, er);
  const ao = 0.7287 * (ee - (er + 1) / 2) * (1 - Math.exp(-0.179 * u));
  const bo = (0.747 * er) / (0.15 + er);
  const co = bo - (bo - 0.207) * Math.exp(-0.414 * u);
  const d = 0.593 + 0.694 * Math.exp(-0.562 * u);
  const odd = ((er + 1) / 2 + ao - ee) * Math.exp(-co * g ** d) + ee;
  const { q4, q10 } = couplingTerms(u, g);
  const scale = (z / vacuumImpedance) * Math.sqrt(ee);
  return {
    evenZ0Ohm: (z * Math.sqrt(ee / even)) / (1 - scale * q4),
    oddZ0Ohm: (z * Math.sqrt(ee / odd)) / (1 - scale * q10),
    evenPermittivity: even,
    oddPermittivity: odd,
  };
}

function couplingTerms(u: number, g: number): { q4: number; q10: number } {
  const q1 = 0.8695 * u ** 0.194;
  const q2 = 1 + 0.7519 * g + 0.189 * g ** 2.31;
  const q3 = 0.1975 + (16.6 + (8.4 / g) ** 6) ** -0.387 + Math.log(g ** 10 / (1 + (g / 3.4) ** 10)) / 241;
  const q4 = (2 * q1) / q2 / (Math.exp(-g) * u ** q3 + (2 - Math.exp(-g)) * u ** -q3);
  const q5 = 1.794 + 1.14 * Math.log(1 + 0.638 / (g + 0.517 * g ** 2.43));
  const q6 =
    0.2305 + Math.log(g ** 10 / (1 + (g / 5.8) ** 10)) / 281.3 + Math.log(1 + 0.598 * g ** 1.154) / 5.1;
  const q7 = (10 + 190 * g * g) / (1 + 82.3 * g ** 3);
  const q8 = Math.exp(-6.5 - 0.95 * Math.log(g) - (g / 0.15) ** 5);
  const q9 = Math.log(q7) * (q8 + 1 / 16.5);
  const q10 = (q2 * q4 - q5 * Math.exp(Math.log(u) * q6 * u ** -q9)) / q2;
  return { q4, q10 };
}

/**
 * Widths that make the pair of thickness t in air one of zero thickness (R. H. Jansen, IEEE Trans. MTT-26, 1978, from memory): the single
 * strip's gain dw, in the even mode less what the gap takes, in the odd mode more by the plates of the side walls, 2 t h/s.
 *
 * @param u width, g gap, t thickness, all over height
 */
function thickWidths(u: number, g: number, t: number): { even: number; odd: number } {
  const gain = (t / Math.PI) * (1 + Math.log(u > 1 / (2 * Math.PI) ? 2 / t : (4 * Math.PI * u) / t));
  const plates = (2 * t) / g;
  const even = u + gain * (1 - 0.5 * Math.exp((-0.69 * gain) / plates));
  return { even, odd: even + plates };
}

/** Air impedances of a pair of microstrips of finite thickness; against finite elements within 2 %. */
export function thickAirPair(u: number, g: number, t: number): { even: number; odd: number } {
  if (t === 0) {
    const thin = kirschningPair(u, g, 1);
    return { even: thin.evenZ0Ohm, odd: thin.oddZ0Ohm };
  }
  const widths = thickWidths(u, g, t);
  return {
    even: kirschningPair(widths.even, g, 1).evenZ0Ohm,
    odd: kirschningPair(widths.odd, g, 1).oddZ0Ohm,
  };
}

/**
 * Effective permittivities with thickness: the thickness adds capacitance in air only, beside and above the strips, so
 * C(t) = C_er(0) + C_air(t) - C_air(0).
 */
export function thickPairPermittivity(
  u: number,
  g: number,
  t: number,
  er: number,
): { even: number; odd: number } {
  const thin = kirschningPair(u, g, er);
  if (t === 0) return { even: thin.evenPermittivity, odd: thin.oddPermittivity };
  const thinAir = kirschningPair(u, g, 1);
  const air = thickAirPair(u, g, t);
  const filled = (own: number, thinOwn: number, z: number, permittivity: number): number =>
    1 + (Math.sqrt(permittivity) / z - 1 / thinOwn) * own;
  return {
    even: filled(air.even, thinAir.evenZ0Ohm, thin.evenZ0Ohm, thin.evenPermittivity),
    odd: filled(air.odd, thinAir.oddZ0Ohm, thin.oddZ0Ohm, thin.oddPermittivity),
  };
}
