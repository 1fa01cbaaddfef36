import { roughnessFactor, type Roughness } from './roughness';

/** Sphere radius over Rz of the cannonball stack, as roughness.ts has it. */
const cannonballRadius = 0.06;
const spheres = (7 * Math.PI) / 3;

/**
 * What roughness adds to the surface impedance (1 + j) Rs of a smooth face, in Rs: (resistance, reactance), causal together.
 *
 * Cannonball: each sphere takes (1 + j)/(1 + (1 - j) delta/2r) (the causal form of Huray's model; E. Bracken, DesignCon 2012; formulas
 * B11), whose real part is the published factor. Hammerstad and Groiss give a resistance alone: the reactance is its Hilbert transform.
 *
 * @param skinDepthM delta, above 0; Infinity at 0 Hz gives nothing
 */
export function roughnessExcess(roughness: Roughness, skinDepthM: number): readonly [number, number] {
  if (skinDepthM === Infinity) return [0, 0];
  if (roughness.model === 'cannonball' && roughness.rzM > 0) {
    const ratio = skinDepthM / (cannonballRadius * roughness.rzM);
    const size = 1 + ratio + (ratio * ratio) / 2;
    return [spheres / size, (spheres * (1 + ratio)) / size];
  }
  const excess = roughnessFactor(roughness, skinDepthM) - 1;
  if (excess === 0 || roughness.model === 'none' || roughness.model === 'cannonball') return [excess, excess];
  return [excess, reactance(roughness.model, (roughness.rqM / skinDepthM) ** 2)];
}

type Resistive = 'hammerstad' | 'groiss';

/** The table runs over this many decades of (Rq/delta)^2, which goes as frequency, to either side of 1. */
const decades = 8;
const stepsPerDecade = 20;
const tables = new Map<Resistive, Float64Array>();

/** Reactance over Rs at y = (Rq/delta)^2, from a table in log y; below it as the inductance it tends to, above as resistance. */
function reactance(model: Resistive, y: number): number {
  let table = tables.get(model);
  if (!table) {
    table = Float64Array.from({ length: 2 * decades * stepsPerDecade + 1 }, (_, k) =>
      hilbert(model, 10 ** (k / stepsPerDecade - decades)),
    );
    tables.set(model, table);
  }
  const at = (Math.log10(y) + decades) * stepsPerDecade;
  if (at <= 0) return table[0]! * Math.sqrt(y * 10 ** decades);
  const k = Math.min(Math.floor(at), table.length - 2);
  const share = Math.min(at - k, 1);
  return table[k]! * (1 - share) + table[k + 1]! * share;
}

/** Half range and step of the transform's variable, the logarithm of the frequency's ratio. */
const reach = 60;
const step = 0.1;

/**
 * X(w) = (2 w/pi) PV of the integral of R(v)/(v^2 - w^2) dv (Kramers and Kronig); with v = w e^t and the two sides taken together it is
 * (1/pi) times the integral over t from 0 of (R(w e^t) - R(w e^-t))/sinh t, smooth everywhere. R in Rs at w.
 */
function hilbert(model: Resistive, y: number): number {
  const resistance = (t: number): number => {
    const turned = y * Math.exp(t);
    // Rs grows with sqrt(frequency), and skin depth 1/sqrt(turned) in heights.
    return Math.exp(t / 2) * (roughnessFactor({ model, rqM: 1 }, 1 / Math.sqrt(turned)) - 1);
  };
  let sum = 0;
  for (let t = step / 2; t < reach; t += step) sum += (resistance(t) - resistance(-t)) / Math.sinh(t);
  return (sum * step) / Math.PI;
}
