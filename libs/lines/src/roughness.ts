import { checkPositive } from './line-error';

/** One face of a foil. Hammerstad and Groiss take the rms height Rq, the cannonball model the ten-point height Rz. */
export type Roughness =
  | { readonly model: 'none' }
  | { readonly model: 'hammerstad'; readonly rqM: number }
  | { readonly model: 'groiss'; readonly rqM: number }
  | { readonly model: 'cannonball'; readonly rzM: number };

/** Sphere radius over Rz in the cannonball stack, 1/(4 sqrt 3 (1 + sqrt 2)) = 0.0598, rounded as published. */
const cannonballRadius = 0.06;

/**
 * How much a rough face adds to the resistance of a smooth one, from 1 up (formulas B11).
 *
 * Hammerstad: 1 + (2/pi) arctan[1.4 (Rq/delta)^2], to about 5 GHz or Rq under 2 um. Groiss: 1 + exp[-(delta/2 Rq)^1.6] (from
 * memory). Cannonball (Simonovich, after Huray): 1 + (7 pi/3)/(1 + delta/r + delta^2/(2 r^2)), r = 0.06 Rz.
 *
 * @param skinDepthM delta; Infinity at 0 Hz gives 1
 */
export function roughnessFactor(roughness: Roughness, skinDepthM: number): number {
  if (roughness.model === 'none' || skinDepthM === Infinity) return 1;
  if (roughness.model === 'cannonball') {
    const ratio = skinDepthM / (cannonballRadius * roughness.rzM);
    return roughness.rzM === 0 ? 1 : 1 + (7 * Math.PI) / 3 / (1 + ratio + (ratio * ratio) / 2);
  }
  const height = roughness.rqM / skinDepthM;
  if (height === 0) return 1;
  return roughness.model === 'hammerstad'
    ? 1 + (2 / Math.PI) * Math.atan(1.4 * height * height)
    : 1 + Math.exp(-((1 / (2 * height)) ** 1.6));
}

/** Skin depth sqrt(1/(pi f mu0 sigma)) in metres; Infinity at 0 Hz. */
export function skinDepth(frequencyHz: number, conductivitySPerM: number): number {
  checkPositive(conductivitySPerM, 'conductivitySPerM');
  return 1 / Math.sqrt(Math.PI * frequencyHz * 4e-7 * Math.PI * conductivitySPerM);
}

/** Surface resistance sqrt(pi f mu0/sigma) in ohm. */
export function surfaceResistance(frequencyHz: number, conductivitySPerM: number): number {
  return Math.sqrt((Math.PI * frequencyHz * 4e-7 * Math.PI) / conductivitySPerM);
}

/** Conductivity of copper at a temperature from that at 20 degrees: resistivity rises by 0.00393 a kelvin (B13, from memory). */
export function copperConductivityAt(conductivitySPerM: number, temperatureC: number): number {
  return conductivitySPerM / (1 + 0.00393 * (temperatureC - 20));
}
