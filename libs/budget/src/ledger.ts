import { evaluationHz, type Ledger, type LedgerRow } from '@tollgate/contracts';
import { commonBand, limitAt } from '@tollgate/masks';
import { leaveOneOutInto, lossDb, prefixCascades, suffixCascades, uniformReference } from '@tollgate/network';
import { atReference, sectionsOf, tollOfSection, type Chain } from './chain';
import type { JudgedLimit } from './check.types';

/** Points at which `saved if ideal` is looked at around a ledger's frequency. */
const spreadPoints = 33;
/** A reflection this small is rounding, dB. */
const rounding = 1e-10;

interface LedgerSpot {
  readonly atHz: number;
  readonly reference: Float64Array;
  readonly limitId?: string;
  readonly limitDb?: number | null;
  /** Allotments are stated for the evaluation frequency only. */
  readonly allotted: boolean;
}

/** Ledgers at the evaluation frequency and at the worst refined point of every limit on insertion loss. */
export function ledgersOf(chain: Chain, limits: readonly JudgedLimit[], delayS: number): Ledger[] {
  const band = commonBand(chain.coverage);
  const spots = [...evaluationSpot(chain, limits), ...worstSpots(chain, limits)];
  return spots
    .filter(({ atHz }) => band !== null && atHz >= band[0] && atHz <= band[1])
    .map((spot) => ledgerAt(chain, spot, delayS));
}

function evaluationSpot(chain: Chain, limits: readonly JudgedLimit[]): LedgerSpot[] {
  const atHz = evaluationHz(chain.channel);
  if (atHz === undefined) return [];
  const bounds = chain.channel.limits.flatMap((limit, i) => {
    if (limit.quantity !== 'insertion-loss' || limit.sense !== 'max') return [];
    const limitDb = limitAt(limits[i]!.mask, 'max', atHz);
    return limitDb === null ? [] : [{ limitId: limit.id, limitDb }];
  });
  const strictest = bounds.sort((a, b) => a.limitDb - b.limitDb)[0];
  return [{ atHz, reference: chain.sectionReference, allotted: true, ...strictest }];
}

function worstSpots(chain: Chain, limits: readonly JudgedLimit[]): LedgerSpot[] {
  const evaluatedAt = evaluationHz(chain.channel);
  const legs = chain.ports / 2;
  return chain.channel.limits.flatMap((limit, i): LedgerSpot[] => {
    const { mask, judgement } = limits[i]!;
    if (limit.quantity !== 'insertion-loss' || !judgement.worstRefined) return [];
    const atHz = judgement.worstRefined.frequencyHz;
    const reference =
      limit.referenceOhm === undefined
        ? chain.sectionReference
        : uniformReference(chain.sectionPorts, limit.referenceOhm / legs);
    const limitDb = limitAt(mask, limit.sense, atHz);
    return [{ atHz, reference, limitId: limit.id, limitDb, allotted: atHz === evaluatedAt }];
  });
}

function ledgerAt(chain: Chain, spot: LedgerSpot, delayS: number): Ledger {
  const { atHz } = spot;
  const frequenciesHz = spreadAround(chain, atHz, delayS);
  const here = frequenciesHz.indexOf(atHz);
  const losses = lossesAround(chain, frequenciesHz, spot.reference);
  const totalDb = losses.all[here]!;
  const elements = chain.channel.elements;
  const rows = elements.map((element, i): LedgerRow => {
    const saved = losses.without[i]!.map((lossDb, k) => losses.all[k]! - lossDb);
    return {
      element: element.id,
      tollDb: finiteOrNull(losses.tolls[i]![here]!),
      savedIfIdealDb: finiteOrNull(saved[here]!),
      savedRangeDb: [finiteOrNull(Math.min(...saved)), finiteOrNull(Math.max(...saved))],
      ...(spot.allotted && element.allotmentDb !== undefined ? { allotmentDb: element.allotmentDb } : {}),
    };
  });
  const reflection = totalDb - losses.tolls.reduce((sum, tolls) => sum + tolls[here]!, 0);
  const reserveDb = spot.allotted ? reserveOf(chain, spot.limitDb) : undefined;
  return {
    atHz,
    ...(spot.limitId === undefined ? {} : { limitId: spot.limitId }),
    ...(spot.limitDb === undefined ? {} : { limitDb: spot.limitDb }),
    totalDb: finiteOrNull(totalDb),
    reflectionDb: Math.abs(reflection) < rounding ? 0 : finiteOrNull(reflection),
    ...(reserveDb === undefined ? {} : { reserveDb }),
    rows,
  };
}

/** The limit less all allotments; none where nothing was allotted. */
function reserveOf({ channel }: Chain, limitDb: number | null | undefined): number | undefined {
  if (limitDb === undefined || limitDb === null) return undefined;
  const allotments = [
    ...channel.elements.map(({ allotmentDb }) => allotmentDb),
    channel.reflectionAllotmentDb,
  ];
  const given = allotments.filter((allotment) => allotment !== undefined);
  return given.length ? given.reduce((left, allotment) => left - allotment, limitDb) : undefined;
}

/** The frequency itself and points within half a turn of the channel's delay to both sides, inside the parts' band. */
function spreadAround(chain: Chain, atHz: number, delayS: number): Float64Array {
  if (!(delayS > 0)) return Float64Array.of(atHz);
  const reach = 1 / (2 * delayS);
  const [bandFrom, bandTo] = commonBand(chain.coverage) ?? [0, Infinity];
  const from = Math.max(bandFrom, atHz - reach);
  const to = Math.min(bandTo, atHz + reach);
  const points = new Set([atHz]);
  for (let k = 0; k < spreadPoints; k++) {
    points.add(k === spreadPoints - 1 ? to : from + ((to - from) * k) / (spreadPoints - 1));
  }
  return Float64Array.from(points).sort();
}

interface Losses {
  /** Of the channel, by frequency. */
  readonly all: Float64Array;
  /** Of the channel without each element. */
  readonly without: Float64Array[];
  /** Of each element by itself. */
  readonly tolls: Float64Array[];
}

function lossesAround(chain: Chain, frequenciesHz: Float64Array, reference: Float64Array): Losses {
  const points = frequenciesHz.length;
  const ports = chain.sectionPorts;
  const sections = Array.from(sectionsOf(chain, frequenciesHz, false), ({ s }) => s);
  const prefixes = prefixCascades(sections, ports, points);
  const suffixes = suffixCascades(sections, ports, points);
  const left = new Float64Array(points * ports * ports * 2);
  const lossOf = (s: Float64Array): Float64Array =>
    throughLoss(atReference(chain, s, frequenciesHz, reference).s, ports, points);
  return {
    all: lossOf(prefixes.at(-1)!),
    without: sections.map((_, i) => {
      leaveOneOutInto(left, prefixes, suffixes, i, ports, points);
      return lossOf(left);
    }),
    tolls: sections.map((section, i) => tollOfSection(chain, i, section, frequenciesHz)),
  };
}

/** Insertion loss near to far, of SDD21 = (S31 - S32 - S41 + S42)/2 for four ports. */
function throughLoss(s: Float64Array, ports: 2 | 4, points: number): Float64Array {
  const losses = new Float64Array(points);
  for (let point = 0; point < points; point++) {
    if (ports === 2) {
      losses[point] = lossDb(s[point * 8 + 4]!, s[point * 8 + 5]!);
      continue;
    }
    const k = point * 32 + 16;
    const re = s[k]! - s[k + 2]! - s[k + 8]! + s[k + 10]!;
    const im = s[k + 1]! - s[k + 3]! - s[k + 9]! + s[k + 11]!;
    losses[point] = lossDb(re / 2, im / 2);
  }
  return losses;
}

function finiteOrNull(value: number): number | null {
  return Number.isFinite(value) ? value : null;
}
