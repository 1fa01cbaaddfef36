import type { FieldProblem, Limit, Signaling } from '@tollgate/contracts';
import { fitStepHz } from './fit';

const ofPairs = ['common-return-loss-near', 'common-return-loss-far', 'mode-conversion', 'pair-skew'];

/** What is wrong with a limit beyond its shape: a quantity the channel does not have, a fit without a range. */
export function limitProblems(limit: Limit, signaling: Signaling, path: string): FieldProblem[] {
  const problems: FieldProblem[] = [];
  if (signaling === 'single-ended' && ofPairs.includes(limit.quantity)) {
    problems.push({
      path: `${path}.quantity`,
      message: `A single-ended channel has no ${limit.quantity}.`,
      mend: 'Choose a quantity of two ports, or make the channel differential.',
    });
  }
  if (limit.fit && !(limit.fit.toHz - limit.fit.fromHz >= 4 * fitStepHz)) {
    problems.push({
      path: `${path}.fit.toHz`,
      message: `The fit runs from ${limit.fit.fromHz} to ${limit.fit.toHz} Hz, too short for its samples each 10 MHz.`,
      mend: 'End the fit at least 40 MHz above its start.',
    });
  }
  return problems;
}
