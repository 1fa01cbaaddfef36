import { parseQuantity } from '@tollgate/quantities';

export interface LineProblem {
  /** Counted from 1, as editors do. */
  readonly line: number;
  readonly message: string;
}

export interface ReadPoints {
  /** [Hz, dB], in the order of the text. */
  readonly points: readonly [number, number][];
  readonly problems: readonly LineProblem[];
}

/**
 * Reads a mask's points as they are pasted: a frequency and a loss a line, split by a comma, semicolon, tab or space.
 * A frequency without a unit is in GHz. A first line of words is a head and is passed over.
 */
export function readPoints(text: string): ReadPoints {
  const points: [number, number][] = [];
  const problems: LineProblem[] = [];
  text.split(/\r\n|\r|\n/).forEach((raw, i) => {
    const line = raw.replace(/^\ufeff/, '').trim();
    if (line === '' || line.startsWith('#') || (i === 0 && !/\d/.test(line))) return;
    const cells = cellsOf(line);
    const read =
      cells.length === 2 ? pointOf(cells[0]!, cells[1]!) : 'Write a frequency and a loss, such as "4, 12.5".';
    if (typeof read === 'string') problems.push({ line: i + 1, message: read });
    else if (points.length && read[0] < points.at(-1)![0]) {
      problems.push({ line: i + 1, message: 'The frequency is below the one before: points ascend.' });
    } else points.push(read);
  });
  return { points, problems };
}

/** The points as they are pasted again. */
export function writePoints(points: readonly (readonly [number, number])[]): string {
  return points
    .map(([frequencyHz, db]) => `${Number((frequencyHz / 1e9).toPrecision(12))}, ${db}`)
    .join('\n');
}

function cellsOf(line: string): string[] {
  const marked = /[;\t]/.test(line) ? line.split(/[;\t]/) : line.split(',');
  const cells = marked.map((cell) => cell.trim()).filter((cell) => cell !== '');
  if (cells.length > 1) return cells;
  // "4 GHz 12.5 dB" or "4 12.5": the second number starts the second cell.
  const match = /^(\S+(?:\s+[A-Za-z]+)?)\s+([-+\d.].*)$/.exec(line);
  return match ? [match[1]!, match[2]!] : cells;
}

function pointOf(frequency: string, loss: string): [number, number] | string {
  const x = parseQuantity(frequency, 'frequency', 'GHz');
  if (!x.ok) return x.message;
  const y = parseQuantity(loss, 'loss', 'dB');
  if (!y.ok) return y.message;
  return x.value < 0 ? 'A frequency is not negative.' : [x.value, y.value];
}
