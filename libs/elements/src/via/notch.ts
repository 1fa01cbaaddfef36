import { debyeHighHz } from '@tollgate/lines';
import { flightS } from './ladder';
import type { ViaModel } from './model';
import { rememberer } from './remembered';
import { scatterOf } from './scatter';

const remembered = rememberer<number>();
/** Reference of the search. Where the stub shorts its node hardly depends on it. */
const referenceOhm = 50;
const scanned = 512;
const refined = 33;
/** Relative width of the bracket at which the search ends. */
const narrow = 1e-7;

/**
 * The via's own minimum of |S21| (SDD21 of a pair) up to a little above the quarter wave of its longest stub, found by evaluating the model.
 * @returns Hz, or null without a stub, or where it would lie above the band of the dielectric's model (1 THz)
 */
export function notchOf(model: ViaModel): number | null {
  const { above, below } = model.sections;
  const longestS = Math.max(...[above, below].map((stub) => timeOf(stub, model)));
  if (longestS === 0) return null;
  const toHz = Math.min(1.25 / (4 * longestS), debyeHighHz);
  const found = remembered(
    JSON.stringify([model.sections, model.barrel.downward, model.drillM, model.conductivitySPerM]),
    () => searched(model, toHz),
  );
  return found < toHz * (1 - 1e-6) ? found : null;
}

function timeOf(pieces: ViaModel['sections']['above'], model: ViaModel): number {
  return pieces.reduce(
    (sum, { lengthM, material }) => sum + flightS(lengthM, model.sections.materials[material]!.dk),
    0,
  );
}

function searched(model: ViaModel, toHz: number): number {
  let [lowHz, highHz] = [toHz / scanned, toHz];
  for (let count = scanned; ; count = refined) {
    const frequenciesHz = Float64Array.from(
      { length: count },
      (_, i) => lowHz + ((highHz - lowHz) * i) / (count - 1),
    );
    const least = smallest(scatterOf(model, frequenciesHz, referenceOhm), count);
    const at = frequenciesHz[least]!;
    lowHz = frequenciesHz[Math.max(0, least - 1)]!;
    highHz = frequenciesHz[Math.min(count - 1, least + 1)]!;
    if (highHz - lowHz < narrow * at) return at;
  }
}

/** Index of the point with the smallest transmission. */
function smallest(s: Float64Array, points: number): number {
  const single = s.length === points * 8;
  const size = (point: number): number => {
    if (single) return Math.hypot(s[point * 8 + 4]!, s[point * 8 + 5]!);
    // SDD21 = (S31 - S32 - S41 + S42)/2 in the order p near, n near, p far, n far (formula A6).
    const at = point * 32;
    const part = (k: number): number =>
      (s[at + 16 + k]! - s[at + 18 + k]! - s[at + 24 + k]! + s[at + 26 + k]!) / 2;
    return Math.hypot(part(0), part(1));
  };
  let least = 0;
  for (let point = 1; point < points; point++) if (size(point) < size(least)) least = point;
  return least;
}
