import { evaluationHz, type CompleteChannel, type Warning } from '@tollgate/contracts';
import { commonBand, spokenHz, type Coverage } from '@tollgate/masks';
import type { Evaluation } from './chain';
import { jointOhmOf, referencesOf } from './references';

/** What a person should know of a channel that was checked, beside its grid. */
export function cautionsOf(
  channel: CompleteChannel,
  facts: Evaluation['facts'],
  coverage: readonly Coverage[],
): Warning[] {
  return [
    ...ofParts(facts),
    ...ofPlaceholders(channel),
    ...ofStackup(channel),
    ...ofEvaluation(channel, coverage),
  ];
}

/** Below this an interpolated S is as good as the file's own. */
const noticeableError = 1e-6;

function ofParts(facts: Evaluation['facts']): Warning[] {
  return facts.flatMap(({ warnings, part }, i) => {
    const messages = [...warnings];
    const interpolationErrorAbs = part?.interpolationErrorAbs;
    if (interpolationErrorAbs !== undefined && interpolationErrorAbs > noticeableError) {
      const error = Number(interpolationErrorAbs.toPrecision(2));
      messages.push(`Interpolated between the file's points: its S may be off by about ${error}.`);
    }
    return messages.map((message) => ({ path: `elements[${i}]`, message }));
  });
}

/** A placeholder is matched in one real reference; where the channel's ports have others, it is not matched in theirs. */
function ofPlaceholders(channel: CompleteChannel): Warning[] {
  const reference = referencesOf(channel);
  const jointOhm = jointOhmOf(reference);
  const isJoint = (value: number, k: number): boolean => value === (k % 2 === 0 ? jointOhm : 0);
  if (reference.every(isJoint)) return [];
  return channel.elements.flatMap((element, i) => {
    const holds =
      element.kind === 'budget-loss' ||
      (element.kind === 'connector' && element.circuit?.some(({ kind }) => kind === 'budget-loss'));
    if (!holds) return [];
    const message = `A placeholder is matched in one real reference, here ${jointOhm} ohm; the channel's ports differ or are complex, and it is not matched in all of them.`;
    return [{ path: `elements[${i}]`, message }];
  });
}

function ofStackup({ stackup, elements }: CompleteChannel): Warning[] {
  const used = new Set(elements.flatMap((element) => (element.kind === 'trace' ? element.layer : [])));
  if (!stackup || used.size === 0) return [];
  const found: Warning[] = (stackup.layers ?? []).flatMap((layer, i) => {
    if (layer.kind !== 'copper' || !used.has(layer.name) || layer.roughness !== undefined) return [];
    const message = `Smooth copper assumed on ${layer.name}: real foil is rougher and loses more.`;
    return [{ path: `stackup.layers[${i}].roughness`, message }];
  });
  if (stackup.temperatureC === undefined) {
    found.push({ path: 'stackup.temperatureC', message: 'No temperature is given: 20 °C assumed.' });
  }
  return found;
}

function ofEvaluation(channel: CompleteChannel, coverage: readonly Coverage[]): Warning[] {
  const atHz = evaluationHz(channel);
  const band = commonBand(coverage);
  if (atHz === undefined || !band || (atHz >= band[0] && atHz <= band[1])) return [];
  const path = channel.evaluationHz === undefined ? '' : 'evaluationHz';
  const message = `The parts answer from ${spokenHz(band[0])} to ${spokenHz(band[1])} only: there is no ledger at ${spokenHz(atHz)}.`;
  return [{ path, message }];
}
