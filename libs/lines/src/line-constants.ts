import { decibelsPerNeper, speedOfLight } from './constants';

/** One mode of propagation. Pairs are (real, imaginary). */
export interface LineMode {
  /** Lossless, quasi-static, permittivities as given. */
  readonly z0Ohm: number;
  readonly effectivePermittivity: number;
  /** Series impedance and shunt admittance a metre: what a chain of lines needs, finite at 0 Hz too. */
  readonly seriesOhmPerM: Float64Array;
  readonly shuntSPerM: Float64Array;
  /** R/(2 Z0) and G Z0/2 in dB/m, roughness as given. */
  readonly conductorLossDbPerM: Float64Array;
  readonly dielectricLossDbPerM: Float64Array;
}

/** Effective permittivity and impedance at one frequency. */
export interface Propagation {
  readonly effectivePermittivity: number;
  readonly z0Ohm: number;
}

export interface ModeConstants {
  /** Impedance with all dielectrics replaced by air. */
  readonly airOhm: number;
  /** Quasi-static effective permittivity with the permittivities as given. */
  readonly givenPermittivity: number;
  /** Effective permittivity and its loss (ee', ee'') at each frequency. */
  readonly permittivity: Float64Array;
  /** Internal impedance (R, X) in ohm/m at each frequency. */
  readonly internal: Float64Array;
  /** What waveguide dispersion makes of the quasi-static values at point k. */
  readonly disperse?: (k: number, quasiStatic: Propagation) => Propagation;
}

/** Line constants over frequency: the air line and its filling, and what the copper adds. */
export function lineModeOf(constants: ModeConstants, frequenciesHz: Float64Array): LineMode {
  const { airOhm, givenPermittivity, permittivity, internal, disperse } = constants;
  const count = frequenciesHz.length;
  const seriesOhmPerM = new Float64Array(count * 2);
  const shuntSPerM = new Float64Array(count * 2);
  const conductorLossDbPerM = new Float64Array(count);
  const dielectricLossDbPerM = new Float64Array(count);
  for (let k = 0; k < count; k++) {
    const omega = 2 * Math.PI * frequenciesHz[k]!;
    let ee = permittivity[k * 2]!;
    let z0 = airOhm / Math.sqrt(ee);
    const tangent = permittivity[k * 2 + 1]! / ee;
    if (disperse && omega > 0) {
      ({ effectivePermittivity: ee, z0Ohm: z0 } = disperse(k, { effectivePermittivity: ee, z0Ohm: z0 }));
    }
    const slowness = Math.sqrt(ee) / speedOfLight;
    seriesOhmPerM[k * 2] = internal[k * 2]!;
    seriesOhmPerM[k * 2 + 1] = internal[k * 2 + 1]! + omega * z0 * slowness;
    shuntSPerM[k * 2] = (omega * slowness * tangent) / z0;
    shuntSPerM[k * 2 + 1] = (omega * slowness) / z0;
    conductorLossDbPerM[k] = (decibelsPerNeper * internal[k * 2]!) / (2 * z0);
    dielectricLossDbPerM[k] = (decibelsPerNeper * omega * slowness * tangent) / 2;
  }
  return {
    z0Ohm: airOhm / Math.sqrt(givenPermittivity),
    effectivePermittivity: givenPermittivity,
    seriesOhmPerM,
    shuntSPerM,
    conductorLossDbPerM,
    dielectricLossDbPerM,
  };
}
