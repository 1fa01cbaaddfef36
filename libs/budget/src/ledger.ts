import { evaluationHz, type Ledger, type LedgerRow } from '@tollgate/contracts';
import { commonBand, limitAt } from '@tollgate/masks';
import { uniformReference } from '@tollgate/network';
import { tollOfSection, type Chain } from './chain';
import type { JudgedLimit } from './check.types';
import { finiteOrNull, leaveOneOut, sectionsAt, spreadAround, throughLoss } from './leave-one-out';

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
  const sections = sectionsAt(chain, frequenciesHz);
  const losses = leaveOneOut(chain, sections, frequenciesHz, spot.reference, throughLoss);
  const tolls = sections.map((section, i) => tollOfSection(chain, i, section, frequenciesHz));
  const totalDb = losses.all[here]!;
  const elements = chain.channel.elements;
  const rows = elements.map((element, i): LedgerRow => {
    const saved = losses.without[i]!.map((lossDb, k) => losses.all[k]! - lossDb);
    return {
      element: element.id,
      tollDb: finiteOrNull(tolls[i]![here]!),
      savedIfIdealDb: finiteOrNull(saved[here]!),
      savedRangeDb: [finiteOrNull(Math.min(...saved)), finiteOrNull(Math.max(...saved))],
      ...(spot.allotted && element.allotmentDb !== undefined ? { allotmentDb: element.allotmentDb } : {}),
    };
  });
  const reflection = totalDb - tolls.reduce((sum, toll) => sum + toll[here]!, 0);
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
