import type { Layer } from '@tollgate/contracts';
import { formatQuantity, parseQuantity } from '@tollgate/quantities';
import type { Written } from '../../channel/entries/written-entry';

export type FurtherPoints = NonNullable<Exclude<Layer, { kind: 'copper' }>['furtherPoints']>;

/** Dk, Df and frequency of further points of a data sheet: `3.62 0.0085 10 GHz, 3.6 0.009 20 GHz`. */
export function writePoints(points: FurtherPoints | undefined): string {
  return (points ?? [])
    .map(({ dk, df, atHz }) => `${dk} ${df} ${formatQuantity(atHz, 'frequency', { digits: 6 })}`)
    .join(', ');
}

export function readPoints(text: string): Written<FurtherPoints> {
  if (text.trim() === '') return { ok: true, value: undefined };
  const points: FurtherPoints = [];
  for (const part of text.split(',')) {
    const [dk, df, ...frequency] = part.trim().split(/\s+/);
    const at = parseQuantity(frequency.join(' '), 'frequency', 'GHz');
    const numbers = [Number(dk), Number(df)];
    if (!dk || !df || !numbers.every(Number.isFinite) || !at.ok || at.value <= 0) {
      return {
        ok: false,
        message: 'Write Dk, Df and frequency, points apart by commas: 3.62 0.0085 10 GHz.',
      };
    }
    points.push({ dk: numbers[0]!, df: numbers[1]!, atHz: at.value });
  }
  return { ok: true, value: points };
}
