import type { ChannelResponse, CompleteChannel, FieldProblem, Warning } from '@tollgate/contracts';
import { elementDelayS, elementModel, elementStanding } from '@tollgate/elements';
import { commonBand, compileMask, judgeLimit, spokenHz, type Coverage, type Subject } from '@tollgate/masks';
import { NetworkError, toMixedMode, type Network } from '@tollgate/network';
import type { CheckCache } from './cache';
import { cautionsOf } from './cautions';
import { withCorners } from './corners/judge-corners';
import { createChain, evaluateChain, type Chain, type Evaluation } from './chain';
import type { Check, CheckResult, JudgedLimit, Part } from './check.types';
import { gridOf } from './grid';
import { ledgersOf } from './ledger';
import { CheckRefused, ofElement } from './problem';
import { partsNeeded } from './read';
import { spoilsOf } from './spoils';

/** From this many frequencies on, building them again for a later check costs more than keeping them. */
const worthKeeping = 200;

/**
 * Checks a channel that `readChannel` has read: the cascade of its elements on its grid, each limit's verdict, tolls.
 * Frequencies that some part does not cover are left out; a limit there is not judged and says what is missing.
 * @param parts by the element's `file` or `fileId`
 * @param options.cache keeps elements from check to check
 * @param options.abandoned asked before each element: true ends the check
 * @throws CheckAbandoned
 */
export function checkChannel(
  channel: CompleteChannel,
  parts: ReadonlyMap<string, Part>,
  options: { cache?: CheckCache; abandoned?: () => boolean } = {},
): CheckResult {
  try {
    refuseMissingParts(channel, parts);
    return { ok: true, check: checked(createChain(channel, parts, options.cache, options.abandoned)) };
  } catch (error) {
    if (error instanceof CheckRefused) return { ok: false, problems: error.problems };
    if (error instanceof NetworkError) {
      return { ok: false, problems: [{ path: error.at ?? '', message: error.reason, mend: error.mend }] };
    }
    throw error;
  }
}

function refuseMissingParts(channel: CompleteChannel, parts: ReadonlyMap<string, Part>): void {
  const problems = partsNeeded(channel).flatMap(({ key, path }): FieldProblem[] => {
    if (parts.has(key)) return [];
    return [
      { path, message: `The part ${key} is not at hand.`, mend: 'Supply the Touchstone file it names.' },
    ];
  });
  if (problems.length) throw new CheckRefused(problems);
}

function checked(chain: Chain): Check {
  const { channel, context, coverage } = chain;
  const band = commonBand(coverage);
  if (!band) throw new CheckRefused([noCommonBand(coverage)]);
  const elementDelaysS = channel.elements.map((element, i) =>
    ofElement(i, () => elementDelayS(element, context)),
  );
  const delayS = elementDelaysS.reduce((sum, each) => sum + each, 0);
  const grid = gridOf(channel, delayS);
  const covered = grid.frequenciesHz.filter((f) => f >= band[0] && f <= band[1]);
  const { network, facts, trappedPoints } = evaluateChain(chain, covered, true);
  const varied = (other: CompleteChannel): Chain => ({
    ...chain,
    channel: other,
    context: { ...context, stackup: other.stackup },
  });
  const limits = withCorners(channel, judgeAll(channel, subjectOf(chain, network, grid.frequenciesHz)), {
    judge: (other) => {
      const { network: at } = evaluateChain(varied(other), covered, true);
      return judgeAll(other, subjectOf(varied(other), at, grid.frequenciesHz));
    },
    subjectOf: (other) => subjectOf(varied(other), network, grid.frequenciesHz),
  });
  return {
    channel,
    network,
    ...(network.ports === 4 ? { mixedMode: toMixedMode(network) } : {}),
    limits,
    ledger: ledgersOf(chain, limits, delayS),
    spoils: spoilsOf(chain, limits, delayS),
    lines: linesOf(channel, facts),
    models: channel.elements.flatMap((element, i) => {
      const model = ofElement(i, () => elementModel(element, channel.signaling, channel.stackup));
      return model ? [model] : [];
    }),
    parts: channel.elements.flatMap(({ id }, i) => {
      const { part } = facts[i]!;
      return part ? [{ element: id, ...part }] : [];
    }),
    standings: channel.elements.map((element) => ({
      element: element.id,
      ...elementStanding(element, channel.stackup),
    })),
    warnings: [
      ...grid.warnings,
      ...gapWarnings(grid.frequenciesHz, coverage),
      ...cautionsOf(channel, facts, coverage),
      ...trappedWarning(trappedPoints),
    ],
    delayS,
    elementDelaysS,
  };
}

function subjectOf(chain: Chain, network: Network, gridHz: Float64Array): Subject {
  const { channel } = chain;
  return {
    signaling: channel.signaling,
    from: channel.from,
    to: channel.to,
    gridHz: [gridHz[0]!, gridHz.at(-1)!],
    grid: network,
    parts: chain.coverage,
    evaluate: (frequenciesHz) =>
      evaluateChain(chain, frequenciesHz, frequenciesHz.length >= worthKeeping).network,
  };
}

function judgeAll(channel: CompleteChannel, subject: Subject): JudgedLimit[] {
  return channel.limits.map((limit, i) => {
    const compiled = compileMask(limit, `limits[${i}]`);
    if (!compiled.ok) throw new CheckRefused([...compiled.problems]);
    return { mask: compiled.mask, judgement: judgeLimit(limit, compiled.mask, subject) };
  });
}

function noCommonBand(coverage: readonly Coverage[]): FieldProblem {
  const bands = coverage.map(
    ({ what, fromHz, toHz }) => `${what} from ${spokenHz(fromHz)} to ${spokenHz(toHz)}`,
  );
  return {
    path: 'elements',
    message: `No frequency is common to all parts: ${bands.join('; ')}.`,
    mend: 'Use parts whose bands overlap.',
  };
}

/** The grid points that some part does not reach are not computed; says which parts and where. */
function gapWarnings(gridHz: Float64Array, coverage: readonly Coverage[]): Warning[] {
  const [first, last] = [gridHz[0]!, gridHz.at(-1)!];
  return coverage
    .filter(({ fromHz, toHz }) => fromHz > first || toHz < last)
    .map(({ what, fromHz, toHz }) => ({
      path: 'grid',
      message: `${what} answers from ${spokenHz(fromHz)} to ${spokenHz(toHz)} only; the grid asks for ${spokenHz(first)} to ${spokenHz(last)}. Nothing is computed outside.`,
    }));
}

function trappedWarning(points: number): Warning[] {
  if (points === 0) return [];
  const message = `Between two elements a wave is trapped without loss at ${points} points; it is taken as not there.`;
  return [{ path: 'elements', message }];
}

type Line = ChannelResponse['lines'][number];

/** Traces say what their line is like; other elements have nothing to say. */
function linesOf(channel: CompleteChannel, facts: Evaluation['facts']): Line[] {
  return channel.elements.flatMap((element, i) => {
    const { line: modes } = facts[i]!;
    return modes ? [{ element: element.id, modes }] : [];
  });
}
