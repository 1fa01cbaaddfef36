import type { LimitView, PartFacts } from '@tollgate/contracts';
import { formatDb, formatQuantity } from '@tollgate/quantities';

const quantityWords: Readonly<Record<LimitView['quantity'], string>> = {
  'insertion-loss': 'insertion loss',
  'return-loss-near': 'return loss, near',
  'return-loss-far': 'return loss, far',
  'common-return-loss-near': 'common-mode return loss, near',
  'common-return-loss-far': 'common-mode return loss, far',
  'mode-conversion': 'mode conversion',
  'fitted-attenuation': 'fitted attenuation',
  'insertion-loss-deviation': 'insertion loss deviation',
  delay: 'delay',
  'pair-skew': 'pair skew',
};

export function quantityTitle(quantity: LimitView['quantity']): string {
  return quantityWords[quantity];
}

/** `1.84 dB left at 12.9 GHz`, or `0.31 dB over at 4 GHz`; times are in seconds behind the same field. */
export function marginWords(limit: LimitView): string {
  return wordsOf(limit, limit.corner ?? limit.worstRefined ?? limit.worst);
}

const cornerWord: Readonly<Record<NonNullable<LimitView['corner']>['name'], string>> = {
  nominal: 'the nominal stackup',
  'most-loss': 'most loss',
  'lowest-impedance': 'lowest impedance',
  'highest-impedance': 'highest impedance',
};

/** On which end of the stackup's tolerances the verdict stands, what drives it there, and what the nominal stackup gives. */
export function cornerWords(limit: LimitView): string {
  if (limit.verdict === 'not-judged') return '';
  if (!limit.corner) return 'Nominal: no tolerances of the stackup enter.';
  const { name, drivenBy } = limit.corner;
  const driven = drivenBy ? `, driven by ${drivenBy}` : '';
  return `Worst at ${cornerWord[name]}${driven}; nominal ${wordsOf(limit, limit.worstRefined)}.`;
}

function wordsOf(limit: LimitView, at: LimitView['worst']): string {
  if (!at) return '';
  if (limit.quantity === 'delay' || limit.quantity === 'pair-skew') {
    const margin = at.marginDb ?? 0;
    return `${formatQuantity(Math.abs(margin), 'time', { digits: 4 })} ${margin < 0 ? 'over' : 'left'}`;
  }
  const frequency = formatQuantity(at.frequencyHz, 'frequency', { digits: 4 });
  if (at.marginDb === null) return `no transmission at ${frequency}`;
  return `${formatDb(Math.abs(at.marginDb))} ${at.marginDb < 0 ? 'over' : 'left'} at ${frequency}`;
}

/** Which way a limit runs and where it is measured: `insertion loss at most, TP0 to TP5, 100 ohm`. */
export function limitFacts(limit: LimitView): string {
  return [
    `${quantityWords[limit.quantity]} ${limit.sense === 'max' ? 'at most' : 'at least'}`,
    limit.from || limit.to ? `${limit.from ?? 'near'} to ${limit.to ?? 'far'}` : '',
    `${Number(limit.referenceOhm.toPrecision(5))} ohm`,
    limit.includes?.length ? `with ${limit.includes.join(', ')}` : '',
  ]
    .filter(Boolean)
    .join(', ');
}

const hz = (value: number) => formatQuantity(value, 'frequency', { digits: 4 });

export function rangesWords(ranges: readonly (readonly [number, number])[]): string {
  return ranges
    .map(([from, to]) => (from === to ? `at ${hz(from)}` : `from ${hz(from)} to ${hz(to)}`))
    .join(', ');
}

/** A file behind an element in one line: band, sampling, grades, and what reading between its points may cost. */
export function partWords(part: PartFacts): string {
  const [from, to] = part.bandHz;
  const grades = (['passivity', 'reciprocity', 'causality'] as const).flatMap((metric) => {
    const grade = part.quality?.[metric];
    return grade ? [`${metric} ${grade.grade} (${grade.percent.toFixed(1)} %)`] : [];
  });
  return [
    `${part.fileName}: ${part.ports} ports, ${part.points} points from ${hz(from)} to ${hz(to)}`,
    part.reachesDc ? '' : 'no point at 0 Hz',
    ...grades,
    part.gapsHz.length ? `no points ${rangesWords(part.gapsHz)}` : '',
    `turns by up to ${part.phaseStepDeg.toFixed(0)}° between points`,
    part.interpolationErrorAbs > 0 ? `read to about ${part.interpolationErrorAbs.toPrecision(1)} of S` : '',
    part.extendedHz ? `carried on ${rangesWords([part.extendedHz])}` : '',
  ]
    .filter(Boolean)
    .join(', ');
}

/** The source as people read it: an identifier of a mask set's revision says nothing to them. */
export function sourceWords(source: string | undefined): string {
  return (source ?? '').replace(/,? ?[0-9a-f]{8}-[0-9a-f-]{27}$/i, '');
}
