import { formatQuantity, parseQuantity } from '@tollgate/quantities';
import type { Written } from '../entries/written-entry';

/** One length, or one by layer: `0.5 mm`, or `L1 0.5 mm, L3 0`. */
export type ByLayer = number | Record<string, number>;

const written = (lengthM: number) =>
  lengthM === 0 ? '0' : formatQuantity(lengthM, 'length', { unit: 'mm', digits: 6 });

export function writeByLayer(value: ByLayer): string {
  if (typeof value === 'number') return written(value);
  return Object.entries(value)
    .map(([layer, lengthM]) => `${layer} ${written(lengthM)}`)
    .join(', ');
}

export function readByLayer(text: string): Written<ByLayer> {
  const whole = parseQuantity(text.trim(), 'length', 'mm');
  if (whole.ok) return length(whole.value);
  const byLayer: Record<string, number> = {};
  for (const part of text.split(',')) {
    const match = /^\s*(.+?)\s+([-+\d.][^\s]*(?:\s*[a-zµ]+)?)\s*$/i.exec(part);
    const read = match && parseQuantity(match[2]!, 'length', 'mm');
    if (!match || !read?.ok) {
      return { ok: false, message: 'Write one length, such as 0.5 mm, or one by layer: L1 0.5 mm, L3 0.' };
    }
    if (read.value < 0) return below;
    byLayer[match[1]!] = read.value;
  }
  return { ok: true, value: byLayer };
}

const below = { ok: false, message: 'A length is 0 or more.' } as const;

function length(value: number): Written<ByLayer> {
  return value < 0 ? below : { ok: true, value };
}

type Offset = [number, number];

/** Places of return vias from the middle of the via, in mm: `0.9 0, -0.9 0`. */
export function writeOffsets(offsets: readonly Offset[] | undefined): string {
  const mm = (lengthM: number) => String(Number((lengthM * 1e3).toPrecision(6)));
  return (offsets ?? []).map(([x, y]) => `${mm(x)} ${mm(y)}`).join(', ');
}

export function readOffsets(text: string): Written<Offset[]> {
  if (text.trim() === '') return { ok: true, value: undefined };
  const offsets: Offset[] = [];
  for (const part of text.split(',')) {
    const numbers = part.trim().split(/\s+/).map(Number);
    if (numbers.length !== 2 || !numbers.every(Number.isFinite)) {
      return { ok: false, message: 'Write x and y in mm from the middle of the via: 0.9 0, -0.9 0.' };
    }
    offsets.push([numbers[0]! / 1e3, numbers[1]! / 1e3]);
  }
  return { ok: true, value: offsets };
}
