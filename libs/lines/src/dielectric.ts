import { checkPositive, LineError } from './line-error';

/** What a data sheet says of a material at one frequency. */
export interface DielectricPoint {
  /** Relative permittivity, from 1 up. */
  readonly dk: number;
  /** Loss tangent. */
  readonly df: number;
  readonly atHz: number;
}

/** A laminate or prepreg: relative permittivity and loss tangent at one frequency or more, and how they go on from there. */
export interface Dielectric extends DielectricPoint {
  readonly dispersion: 'wideband-debye' | 'constant';
  /** Further points, through which a wideband Debye model is fitted together with the first; a constant has none. */
  readonly furtherPoints?: readonly DielectricPoint[];
}

/** Ends of the band over which the wideband model relaxes. */
export const debyeLowHz = 1e3;
export const debyeHighHz = 1e12;

/** Refuses what is no dielectric; `at` names it in the error. */
export function checkDielectric(material: Dielectric, at: string): void {
  checkPoint(material, at);
  const further = material.furtherPoints ?? [];
  further.forEach((point, i) => checkPoint(point, `${at}.furtherPoints[${i}]`));
  if (further.length > 0 && material.dispersion === 'constant') {
    throw new LineError(
      'A constant permittivity has one point.',
      'Leave the further points out, or choose wideband Debye.',
      `${at}.furtherPoints`,
    );
  }
}

function checkPoint({ dk, df, atHz }: DielectricPoint, at: string): void {
  if (!(dk >= 1) || !Number.isFinite(dk)) {
    throw new LineError(`The permittivity is ${dk}.`, 'Give a value from 1 up.', `${at}.dk`);
  }
  if (!(df >= 0) || !Number.isFinite(df)) {
    throw new LineError(`The loss tangent is ${df}.`, 'Give a value from 0 up.', `${at}.df`);
  }
  checkPositive(atHz, `${at}.atHz`);
}

/** eps(f) = atInfinity + scale ln[(fH + j f)/(fL + j f)]; scale 0 is a lossless constant, which is causal. */
export interface WidebandDebye {
  readonly atInfinity: number;
  readonly scale: number;
  /** How far the model is off the worst of its points, relative: none of one point. */
  readonly worst: { readonly dk: number; readonly df: number };
}

/** A fit this far off in permittivity, relative, is none. */
const mostOff = 0.05;
/** Below this loss tangent a point's loss no longer weighs more in the fit. */
const leastTangent = 1e-4;

/**
 * The wideband Debye model of a material: through its one point exactly, through several by least squares of the relative errors of
 * permittivity and loss, which the model's two numbers enter linearly.
 * @throws LineError where the points contradict each other: their permittivity rises, or falls far more than their loss allows
 */
export function fitWidebandDebye(material: Dielectric): WidebandDebye {
  checkDielectric(material, 'dielectric');
  const points = [material, ...(material.furtherPoints ?? [])];
  // Normal equations of [1, re][a, s] = dk and [0, -im][a, s] = dk df, each over its right side.
  let [aa, as, ss, ba, bs] = [0, 0, 0, 0, 0];
  for (const { dk, df, atHz } of points) {
    const [re, im] = logarithm(atHz);
    const loss = dk * Math.max(df, leastTangent);
    aa += 1 / dk ** 2;
    as += re / dk ** 2;
    ss += (re / dk) ** 2 + (im / loss) ** 2;
    ba += 1 / dk;
    bs += re / dk - (im * dk * df) / loss ** 2;
  }
  const size = aa * ss - as * as;
  const scale = (aa * bs - as * ba) / size;
  const atInfinity = (ss * ba - as * bs) / size;
  const worst = { dk: 0, df: 0 };
  for (const { dk, df, atHz } of points) {
    const [re, im] = logarithm(atHz);
    const fitted = atInfinity + scale * re;
    worst.dk = Math.max(worst.dk, Math.abs(fitted / dk - 1));
    worst.df = Math.max(worst.df, Math.abs((-scale * im) / fitted - df) / Math.max(df, leastTangent));
  }
  if (worst.dk > mostOff) {
    throw new LineError(
      `No wideband Debye model goes through these points; the nearest is ${(worst.dk * 100).toFixed(1)} % off in Dk. Permittivity falls as frequency rises, the more so the greater the loss.`,
      'Look for a mistyped point, or keep only the one nearest to the frequencies that matter.',
      'furtherPoints',
    );
  }
  return { atInfinity, scale, worst };
}

/**
 * Complex relative permittivity er' - j er'' at each frequency, pairs (er', er''), er'' from 0 up.
 *
 * `wideband-debye`: eps(f) = eps_inf + eps_d ln[(fH + j f)/(fL + j f)], fitted to the points given (A. R. Djordjevic et al., IEEE Trans.
 * EMC-43 no. 4, 2001, pp. 662-667; C. Svensson and G. E. Dermer, 2001; formula B12); causal; without loss at its one point it is
 * constant. `constant` keeps both numbers, which is not causal.
 */
export function permittivity(material: Dielectric, frequenciesHz: Float64Array): Float64Array {
  checkDielectric(material, 'dielectric');
  const out = new Float64Array(frequenciesHz.length * 2);
  const lossless = material.df === 0 && !material.furtherPoints?.length;
  if (material.dispersion === 'constant' || lossless) {
    frequenciesHz.forEach((_, k) => out.set([material.dk, material.dk * material.df], k * 2));
    return out;
  }
  const { atInfinity, scale } = fitWidebandDebye(material);
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
