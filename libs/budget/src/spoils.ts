import type { LimitQuantity, Spoils } from '@tollgate/contracts';
import { commonBand } from '@tollgate/masks';
import { uniformReference } from '@tollgate/network';
import type { Chain } from './chain';
import type { JudgedLimit } from './check.types';
import { finiteOrNull, leaveOneOut, modeLoss, sectionsAt, spreadAround, type LossOf } from './leave-one-out';

/** Return losses by quantity: which end, and the mode of a pair. */
const returnLosses: Partial<Record<LimitQuantity, LossOf>> = {
  'return-loss-near': (s, ports, points) => modeLoss(s, ports, points, 0, 0, -1),
  'return-loss-far': (s, ports, points) => modeLoss(s, ports, points, 1, 1, -1),
  'common-return-loss-near': (s, ports, points) => modeLoss(s, ports, points, 0, 0, 1),
  'common-return-loss-far': (s, ports, points) => modeLoss(s, ports, points, 1, 1, 1),
};

/**
 * What each element spoils of a return loss, at the worst refined point of every limit on one: how much the return loss would
 * rise were the element left out, and the range of that within half a turn of the channel's delay. It does not add up.
 */
export function spoilsOf(chain: Chain, limits: readonly JudgedLimit[], delayS: number): Spoils[] {
  const band = commonBand(chain.coverage);
  return chain.channel.limits.flatMap((limit, i): Spoils[] => {
    const lossOf = returnLosses[limit.quantity];
    const atHz = limits[i]!.judgement.worstRefined?.frequencyHz;
    if (!lossOf || atHz === undefined || !band || atHz < band[0] || atHz > band[1]) return [];
    const legs = chain.ports / 2;
    const reference =
      limit.referenceOhm === undefined
        ? chain.sectionReference
        : uniformReference(chain.sectionPorts, limit.referenceOhm / legs);
    const frequenciesHz = spreadAround(chain, atHz, delayS);
    const here = frequenciesHz.indexOf(atHz);
    const sections = sectionsAt(chain, frequenciesHz);
    const { all, without } = leaveOneOut(chain, sections, frequenciesHz, reference, lossOf);
    const rows = chain.channel.elements.map((element, k) => {
      const spoiled = without[k]!.map((lossDb, point) => lossDb - all[point]!);
      return {
        element: element.id,
        spoilsDb: finiteOrNull(spoiled[here]!),
        rangeDb: [finiteOrNull(Math.min(...spoiled)), finiteOrNull(Math.max(...spoiled))] as [
          number | null,
          number | null,
        ],
      };
    });
    return [{ limitId: limit.id, atHz, returnLossDb: finiteOrNull(all[here]!), rows }];
  });
}
