import { checkPositive, LineError } from './line-error';

/** A laminate or prepreg: relative permittivity and loss tangent at one frequency, and how they go on from there. */
export interface Dielectric {
  /** Relative permittivity, from 1 up. */
  readonly dk: number;
  /** Loss tangent. */
  readonly df: number;
  readonly atHz: number;
  readonly dispersion: 'wideband-debye' | 'constant';
}

/** Ends of the band over which the wideband model relaxes. */
export const debyeLowHz = 1e3;
export const debyeHighHz = 1e12;

/** Refuses what is no dielectric; `at` names it in the error. */
export function checkDielectric(material: Dielectric, at: string): void {
  if (!(material.dk >= 1) || !Number.isFinite(material.dk)) {
    throw new LineError(`The permittivity is ${material.dk}.`, 'Give a value from 1 up.', `${at}.dk`);
  }
  if (!(material.df >= 0) || !Number.isFinite(material.df)) {
    throw new LineError(`The loss tangent is ${material.df}.`, 'Give a value from 0 up.', `${at}.df`);
  }
  checkPositive(material.atHz, `${at}.atHz`);
}

/**
 * Complex relative permittivity er' - j er'' at each frequency, pairs (er', er''), er'' from 0 up.
 *
 * `wideband-debye`: eps(f) = eps_inf + eps_d ln[(fH + j f)/(fL + j f)], fitted to the one point given (A. R. Djordjevic et al., IEEE Trans.
 * EMC-43 no. 4, 2001, pp. 662-667; C. Svensson and G. E. Dermer, 2001; formula B12); causal. `constant` keeps both numbers, which is not
 * causal.
 */
export function permittivity(material: Dielectric, frequenciesHz: Float64Array): Float64Array {
  checkDielectric(material, 'dielectric');
  const out = new Float64Array(frequenciesHz.length * 2);
  if (material.dispersion === 'constant' || material.df === 0) {
    frequenciesHz.forEach((_, k) => out.set([material.dk, material.dk * material.df], k * 2));
    return out;
  }
  const [re, im] = logarithm(material.atHz);
  const scale = (-material.df * material.dk) / im;
  const atInfinity = material.dk - scale * re;
  frequenciesHz.forEach((f, k) => {
    const [lnRe, lnIm] = logarithm(f);
    out[k * 2] = atInfinity + scale * lnRe;
    out[k * 2 + 1] = -scale * lnIm;
  });
  return out;
}

/** ln[(fH + j f)/(fL + j f)]. */
function logarithm(f: number): [number, number] {
  const re = Math.log(Math.hypot(debyeHighHz, f) / Math.hypot(debyeLowHz, f));
  return [re, Math.atan2(f, debyeHighHz) - Math.atan2(f, debyeLowHz)];
}
