import type { CompleteChannel, CornerResult } from '@tollgate/contracts';
import { marginAt, type Mask, type Subject } from '@tollgate/masks';
import type { JudgedLimit } from '../check.types';
import {
  atCorner,
  corners,
  tolerancedQuantities,
  tolerancesOf,
  type Corner,
  type Tolerance,
} from './tolerances';

export interface CornerTools {
  /** Judges a varied channel on the grid of the nominal one. */
  readonly judge: (channel: CompleteChannel) => readonly JudgedLimit[];
  /** The varied channel as its limits see it, evaluated only where asked. */
  readonly subjectOf: (channel: CompleteChannel) => Subject;
}

/**
 * Each judged limit at the corners of the stackup's tolerances: the worst one and what drives it there. The verdict stands on
 * the worst corner. Without tolerances nothing is said, and the verdict is a nominal one.
 */
export function withCorners(
  channel: CompleteChannel,
  nominal: readonly JudgedLimit[],
  { judge, subjectOf }: CornerTools,
): readonly JudgedLimit[] {
  const tolerances = tolerancesOf(channel);
  if (tolerances.length === 0) return nominal;
  const varied = corners.map((corner) => ({ corner, limits: judge(atCorner(channel, corner, tolerances)) }));
  return nominal.map((judged, i) => {
    if (judged.judgement.verdict === 'not-judged' || !judged.judgement.worstRefined) return judged;
    const worst = varied
      .flatMap(({ corner, limits }) => {
        const { worstRefined, verdict, holds } = limits[i]!.judgement;
        return worstRefined && verdict !== 'not-judged' ? [{ corner, holds, ...worstRefined }] : [];
      })
      .sort((a, b) => (a.marginDb ?? -Infinity) - (b.marginDb ?? -Infinity))[0];
    if (!worst) return judged;
    const nominalDb = judged.judgement.worstRefined.marginDb ?? -Infinity;
    if ((worst.marginDb ?? -Infinity) >= nominalDb) {
      return withCorner(judged, { name: 'nominal', ...judged.judgement.worstRefined, drivenBy: '' }, true);
    }
    const drivenBy = driverOf(
      { channel, nominal, tolerances, subjectOf },
      i,
      worst.corner,
      worst.frequencyHz,
    );
    const { corner: name, frequencyHz, marginDb } = worst;
    return withCorner(judged, { name, frequencyHz, marginDb, drivenBy }, worst.holds);
  });
}

function withCorner(judged: JudgedLimit, corner: CornerResult, holds: boolean): JudgedLimit {
  const { judgement } = judged;
  const stands = judgement.holds && holds;
  return {
    ...judged,
    judgement: { ...judgement, corner, holds: stands, verdict: stands ? 'holds' : 'exceeds' },
  };
}

interface Driven {
  readonly channel: CompleteChannel;
  readonly nominal: readonly JudgedLimit[];
  readonly tolerances: readonly Tolerance[];
  readonly subjectOf: CornerTools['subjectOf'];
}

/** The quantity, and of that the layer, whose tolerance alone takes most of the margin at the worst point. */
function driverOf(driven: Driven, index: number, corner: Corner, frequencyHz: number): string {
  const { channel, nominal, tolerances, subjectOf } = driven;
  const limit = channel.limits[index]!;
  const mask: Mask = nominal[index]!.mask;
  const marginOf = (some: readonly Tolerance[]): number =>
    marginAt(limit, mask, subjectOf(atCorner(channel, corner, some)), frequencyHz) ?? Infinity;
  const worstOf = (groups: readonly (readonly Tolerance[])[]): readonly Tolerance[] =>
    groups.length < 2
      ? (groups[0] ?? [])
      : groups.map((group) => ({ group, margin: marginOf(group) })).sort((a, b) => a.margin - b.margin)[0]!
          .group;
  const byQuantity = tolerancedQuantities
    .map((quantity) => tolerances.filter((each) => each.quantity === quantity))
    .filter((group) => group.length > 0);
  const [driver] = worstOf(worstOf(byQuantity).map((tolerance) => [tolerance]));
  return driver ? `${driver.quantity} of ${driver.layer}` : '';
}
