import { formatQuantity } from '@tollgate/quantities';
import { assessQuality, testPortOrder } from '@tollgate/network';
import { needsWaves, type TouchstoneFile } from '@tollgate/touchstone';

/** What lists and forms show of a part, read once when it comes in. */
export interface PartSummary {
  readonly ports: number;
  readonly points: number;
  readonly fromHz: number;
  readonly toHz: number;
  readonly referenceOhm: [number, number][];
  readonly likelyPortOrder: string | null;
  readonly warnings: string[];
}

const mostWarnings = 20;

export function summarise(file: TouchstoneFile): PartSummary {
  const { network } = file;
  const frequencies = network.frequenciesHz;
  return {
    ports: network.ports,
    points: frequencies.length,
    fromHz: frequencies[0]!,
    toHz: frequencies[frequencies.length - 1]!,
    referenceOhm: Array.from({ length: network.ports }, (_unused, port): [number, number] => [
      network.referenceOhm[port * 2]!,
      network.referenceOhm[port * 2 + 1]!,
    ]),
    likelyPortOrder: likelyOrder(file),
    warnings: [
      ...file.warnings.map(({ line, text }) => (line > 0 ? `Line ${line}: ${text}` : text)),
      ...modelWarnings(file),
    ].slice(0, mostWarnings),
  };
}

function likelyOrder(file: TouchstoneFile): string | null {
  if (file.network.ports !== 4) return null;
  return testPortOrder(file.network).likely;
}

function modelWarnings(file: TouchstoneFile): string[] {
  const waves = needsWaves(file)
    ? ['The references are complex or change with frequency: say whether the waves are power or pseudo.']
    : [];
  if (file.network.ports > 8) return waves;
  const { passivity } = assessQuality(file.network);
  const active =
    passivity.failsHz.length === 0
      ? []
      : [`Not passive (graded ${passivity.grade}) between ${span(passivity.failsHz)}; flagged, not refused.`];
  return [...waves, ...active];
}

function span(ranges: readonly (readonly [number, number])[]): string {
  const first = ranges[0]![0];
  const last = ranges[ranges.length - 1]![1];
  return `${formatQuantity(first, 'frequency')} and ${formatQuantity(last, 'frequency')}`;
}
