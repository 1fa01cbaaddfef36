import { execFileSync } from 'node:child_process';
import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { checkChannel, readChannel, type Part } from '@tollgate/budget';
import type { CompleteChannel } from '@tollgate/contracts';
import { readTouchstone, writeTouchstone } from '@tollgate/touchstone';
import { debianPython } from '../support/needs';
import type { RandomChannel } from './arbitrary-channels';

/** A channel as the engine reads it, with its parts as Touchstone text. */
export interface Evaluated {
  readonly channel: CompleteChannel;
  readonly texts: ReadonlyMap<string, string>;
  readonly frequenciesHz: Float64Array;
  readonly s: Float64Array;
}

/** Reads and checks a channel by the engine's own front doors, its parts from text. */
export function byEngine({ document, parts }: RandomChannel): Evaluated {
  const read = readChannel(document);
  if (!read.ok) throw new Error(`${JSON.stringify(read.problems)}\n${JSON.stringify(document)}`);
  const texts = new Map(
    [...parts].map(([file, network]) => [file, writeTouchstone(network, { version: '1.1' })]),
  );
  const known = new Map<string, Part>();
  for (const [file, text] of texts) {
    known.set(file, { sha256: file, file: readTouchstone(file, new TextEncoder().encode(text)) });
  }
  const result = checkChannel(read.channel, known);
  if (!result.ok) throw new Error(`${JSON.stringify(result.problems)}\n${JSON.stringify(document)}`);
  const { s, frequenciesHz } = result.check.network;
  return { channel: read.channel, texts, frequenciesHz, s };
}

/** All channels by scikit-rf, in one process. */
export function byScikitRf(channels: readonly Evaluated[]): { version: string; s: Float64Array[] } {
  const work = mkdtempSync(join(tmpdir(), 'tg-reference-'));
  try {
    const asked = channels.map(({ channel, texts }, k) => {
      const folder = join(work, String(k));
      mkdirSync(folder);
      for (const [file, text] of texts) writeFileSync(join(folder, file), text);
      return { channel, folder };
    });
    const answer = execFileSync(debianPython, [join(__dirname, 'scikit_rf.py')], {
      input: JSON.stringify(asked),
      maxBuffer: 1 << 28,
      stdio: 'pipe',
    });
    const { version, s } = JSON.parse(answer.toString()) as { version: string; s: unknown[] };
    return { version, s: s.map((one) => Float64Array.from((one as number[]).flat(3))) };
  } finally {
    rmSync(work, { recursive: true, force: true });
  }
}

/** The largest |S - S'| of two networks, entry by entry. */
export function largestDistance(a: Float64Array, b: Float64Array): number {
  let largest = a.length === b.length ? 0 : Infinity;
  for (let k = 0; k < a.length; k += 2) {
    const distance = Math.hypot(a[k]! - b[k]!, a[k + 1]! - b[k + 1]!);
    // A value that is no number is further than any.
    largest = distance <= largest ? largest : Number.isNaN(distance) ? Infinity : distance;
  }
  return largest;
}
