import { responseFormat, type ChannelResponse, type LimitResult } from '@tollgate/contracts';
import type { Network } from '@tollgate/network';
import type { Check, JudgedLimit } from './check.types';
import { engineVersion } from './version';

/** The whole result as scripts read it; `s[point][row][column] = [re, im]`. */
export function toResponse(check: Check, fingerprint: string): ChannelResponse {
  const { network, mixedMode } = check;
  return {
    format: responseFormat,
    engine: engineVersion,
    fingerprint,
    ports: network.ports,
    referenceOhm: referencePairs(network),
    frequenciesHz: Array.from(network.frequenciesHz),
    s: matricesOf(network),
    mixedMode: mixedMode ? matricesOf(mixedMode) : [],
    mixedModeReferenceOhm: mixedMode ? referencePairs(mixedMode) : [],
    limits: check.limits.map(limitResultOf),
    lines: [...check.lines],
    models: [...check.models],
    parts: [...check.parts],
    ledger: [...check.ledger],
    spoils: [...check.spoils],
  };
}

/** What the contract says of a limit, without what only a drawing needs. */
export function limitResultOf({ judgement }: JudgedLimit): LimitResult {
  const { id, verdict, holds, reason, worst, worstRefined, exceedsHz, corner } = judgement;
  return { id, verdict, holds, reason, worst, worstRefined, exceedsHz, ...(corner ? { corner } : {}) };
}

function referencePairs(network: Network): [number, number][] {
  const z = network.referenceOhm;
  return Array.from({ length: network.ports }, (_, port) => [z[port * 2]!, z[port * 2 + 1]!]);
}

function matricesOf(network: Network): [number, number][][][] {
  const { ports, s } = network;
  const points: [number, number][][][] = [];
  let k = 0;
  for (let point = 0; point < network.frequenciesHz.length; point++) {
    const rows: [number, number][][] = [];
    for (let row = 0; row < ports; row++) {
      const entries: [number, number][] = [];
      for (let column = 0; column < ports; column++, k += 2) entries.push([s[k]!, s[k + 1]!]);
      rows.push(entries);
    }
    points.push(rows);
  }
  return points;
}
