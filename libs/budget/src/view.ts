import {
  evaluationHz,
  nyquistHz,
  standings,
  type ChannelVerdict,
  type CheckView,
  type LimitView,
  type Source,
} from '@tollgate/contracts';
import { outlineOf } from '@tollgate/masks';
import { lossDb } from '@tollgate/network';
import type { Check, ElementStanding } from './check.types';
import { limitResultOf } from './response';
import { engineVersion } from './version';

/** Curves are drawn, not computed with: this many steps a dB are plenty. */
const stepsPerDb = 1e6;

/** What the channel's screen draws and tells: curves, verdicts, ledgers; never the S matrices. */
export function toView(check: Check, fingerprint: string): CheckView {
  const { channel, network } = check;
  const weakest = weakestOf(check.standings);
  const worst = worstOf(check);
  return {
    fingerprint,
    engine: engineVersion,
    verdict: verdictOf(check),
    worstMarginDb: worst?.marginDb ?? null,
    worstLimitId: worst?.id ?? null,
    worstFrequencyHz: worst?.frequencyHz ?? null,
    weakestStanding: weakest.standing,
    weakestElement: weakest.element,
    elementStandings: check.standings.map((standing) => ({ ...standing })),
    evaluationHz: evaluationHz(channel),
    nyquistHz: nyquistHz(channel),
    temperatureC: channel.stackup?.temperatureC,
    delayS: check.delayS,
    elementDelaysS: [...check.elementDelaysS],
    frequenciesHz: Array.from(network.frequenciesHz),
    curves: curvesOf(check),
    limits: channel.limits.map((_, i) => limitViewOf(check, i)),
    ledger: [...check.ledger],
    spoils: [...check.spoils],
    models: [...check.models],
    parts: [...check.parts],
    warnings: [...check.warnings],
  };
}

/** Exceeds where any limit does; not judged where any is not, or there is none; else holds. */
export function verdictOf(check: Pick<Check, 'limits'>): ChannelVerdict {
  const verdicts = check.limits.map(({ judgement }) => judgement.verdict);
  if (verdicts.includes('exceeds')) return 'exceeds';
  return verdicts.length === 0 || verdicts.includes('not-judged') ? 'not-judged' : 'holds';
}

/** The least refined margin, at the worst corner where there are any, over the limits that were judged; limits on time (seconds) do not compare and are left out. */
function worstOf(check: Check): { id: string; frequencyHz: number; marginDb: number } | undefined {
  const margins = check.limits.flatMap(({ judgement: { id, verdict, ...judgement } }, i) => {
    const worstRefined = judgement.corner ?? judgement.worstRefined;
    const inSeconds = ['delay', 'pair-skew'].includes(check.channel.limits[i]!.quantity);
    if (verdict === 'not-judged' || inSeconds || !worstRefined || worstRefined.marginDb === null) return [];
    return { id, frequencyHz: worstRefined.frequencyHz, marginDb: worstRefined.marginDb };
  });
  return margins.sort((a, b) => a.marginDb - b.marginDb)[0];
}

function weakestOf(all: readonly ElementStanding[]): ElementStanding {
  return all.reduce((weakest, one) =>
    standings.indexOf(one.standing) > standings.indexOf(weakest.standing) ? one : weakest,
  );
}

/** Differential channels show SDD. */
function curvesOf({ network, mixedMode }: Check): CheckView['curves'] {
  const { s, ports } = mixedMode ?? network;
  const curve = (row: number, column: number): (number | null)[] =>
    Array.from(network.frequenciesHz, (_, point) => {
      const k = ((point * ports + row) * ports + column) * 2;
      return roundedDb(lossDb(s[k]!, s[k + 1]!));
    });
  return { insertionLossDb: curve(1, 0), returnLossNearDb: curve(0, 0), returnLossFarDb: curve(1, 1) };
}

function roundedDb(db: number): number | null {
  return Number.isFinite(db) ? Math.round(db * stepsPerDb) / stepsPerDb : null;
}

function limitViewOf(check: Check, index: number): LimitView {
  const limit = check.channel.limits[index]!;
  const judged = check.limits[index]!;
  const { title, quantity, sense, status, from, to, includes } = limit;
  return {
    ...limitResultOf(judged),
    ...{ title, quantity, sense, status, from, to, includes },
    source: limit.source === undefined ? undefined : sourceWords(limit.source),
    referenceOhm: judged.judgement.referenceOhm,
    outline: outlineOf(judged.mask),
    missingHz: judged.judgement.missingHz,
    beyond: limit.beyond ?? [],
  };
}

function sourceWords(source: Source): string {
  if (typeof source === 'string') return source;
  // An identifier is no word for a person; it stands in where there is no other.
  const words = [source.text, source.date].filter((part) => part !== undefined);
  return words.length ? words.join(', ') : (source.itemRevision ?? '');
}
