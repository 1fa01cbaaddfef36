import type { Network } from '@tollgate/network';
import { uniformReference } from '@tollgate/network';
import { readTouchstone, TouchstoneError, writeTouchstone, type TouchstoneFile } from '../index';

/** A seeded source of numbers from 0 to below 1 (mulberry32, public domain). */
export function randomSource(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = state;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}

function networkOf(ports: number, points: number, random: () => number): Network {
  return {
    ports,
    frequenciesHz: Float64Array.from({ length: points }, (_, k) => (k + 1) * 1e7),
    s: Float64Array.from({ length: points * ports * ports * 2 }, () =>
      Number((random() * 2 - 1).toPrecision(6)),
    ),
    referenceOhm: uniformReference(ports, 50),
  };
}

/** A sound file to begin with, of a random kind. */
export function soundFile(random: () => number): { name: string; text: string } {
  const ports = 1 + Math.floor(random() * 5);
  const network = networkOf(ports, 1 + Math.floor(random() * 5), random);
  const version = random() < 0.5 ? '1.1' : '2.0';
  const format = (['RI', 'MA', 'DB'] as const)[Math.floor(random() * 3)];
  const unit = (['Hz', 'MHz', 'GHz'] as const)[Math.floor(random() * 3)];
  const noise = {
    frequencyHz: 1e6,
    minimumNoiseFigureDb: 1,
    optimumReflectionMagnitude: 0.5,
    optimumReflectionAngleDeg: 20,
    noiseResistanceOhm: 20,
  };
  const text = writeTouchstone(network, {
    version,
    format,
    unit,
    comments: ['head'],
    noise: ports === 2 && random() < 0.3 ? [noise, { ...noise, frequencyHz: 2e6 }] : undefined,
  });
  return { name: version === '2.0' && random() < 0.5 ? 'x.ts' : `x.s${ports}p`, text };
}

type Break = (text: string, random: () => number) => string;

const pick = (random: () => number, count: number): number => Math.floor(random() * count);
const onLines =
  (change: (lines: string[], random: () => number) => void): Break =>
  (text, random) => {
    const lines = text.split('\n');
    change(lines, random);
    return lines.join('\n');
  };
const onTokens = (change: (tokens: string[], random: () => number) => void): Break =>
  onLines((lines, random) => {
    const at = pick(random, lines.length);
    const tokens = lines[at]!.split(' ');
    change(tokens, random);
    lines[at] = tokens.join(' ');
  });
const oddTokens = [
  'NaN',
  'inf',
  '-inf',
  '1e999',
  '1e-999',
  '1,5',
  '0x10',
  '[',
  '#',
  '!',
  '9'.repeat(400),
  '1e',
  '--1',
  '',
  '\u0000',
  '1d2',
];

const breaks: readonly Break[] = [
  (text, random) => text.slice(0, pick(random, text.length + 1)),
  (text, random) => {
    const at = pick(random, text.length);
    return text.slice(0, at) + String.fromCharCode(pick(random, 256)) + text.slice(at + 1);
  },
  onLines((lines, random) => lines.splice(pick(random, lines.length), 1)),
  onLines((lines, random) => lines.splice(pick(random, lines.length), 0, lines[pick(random, lines.length)]!)),
  onLines((lines, random) => {
    const [a, b] = [pick(random, lines.length), pick(random, lines.length)];
    [lines[a], lines[b]] = [lines[b]!, lines[a]!];
  }),
  onTokens((tokens, random) => tokens.splice(pick(random, tokens.length), 1)),
  onTokens((tokens, random) => tokens.splice(pick(random, tokens.length), 0, String(random()))),
  onTokens((tokens, random) => {
    const [a, b] = [pick(random, tokens.length), pick(random, tokens.length)];
    [tokens[a], tokens[b]] = [tokens[b]!, tokens[a]!];
  }),
  onTokens(
    (tokens, random) => (tokens[pick(random, tokens.length)] = oddTokens[pick(random, oddTokens.length)]!),
  ),
  (text, random) =>
    text.replace(/\[Number of (Ports|Frequencies)\] \d+/, (match) => match + '9'.repeat(pick(random, 9))),
  (text) => text.replace(/\n/g, '\r'),
  (text) => text.replace(/ /g, '\t').replace(/\n/g, '\r\n'),
  (text, random) => text.slice(pick(random, text.length)) + text,
  (text, random) => text.repeat(1 + pick(random, 3)),
];

/** One to three breaks of a sound file. */
export function brokenFile(random: () => number): { name: string; text: string } {
  const { name, text } = soundFile(random);
  let broken = text;
  for (let k = 1 + pick(random, 3); k > 0; k--) broken = breaks[pick(random, breaks.length)]!(broken, random);
  return { name: random() < 0.1 ? `x.s${pick(random, 12)}p` : name, text: broken };
}

/** How many numbers stand in the data of a text, counted without the reader. */
export function numbersIn(text: string): number {
  let count = 0;
  let information = false;
  const ports = Number(/\[\s*number\s+of\s+ports\s*\]\s*(\d+)/i.exec(text)?.[1] ?? 0);
  let references = -1;
  const lines = /^[^\n]*\r[^\n]/.test(text) ? text.split(/[\r\n]/) : text.split('\n');
  for (const line of lines) {
    const plain = line.split('!')[0]!.trim();
    if (/^\[\s*begin information/i.test(plain)) information = true;
    if (/^\[\s*end information/i.test(plain)) information = false;
    const reference = /^\[\s*reference\s*\](.*)/i.exec(plain);
    if (reference) references = reference[1]!.split(/\s+/).filter(Boolean).length;
    else if (plain.startsWith('[')) references = -1;
    if (information || plain === '' || plain === '\u001a' || /^[#[]/.test(plain)) continue;
    const numbers = plain.split(/[\s\u00a0]+/).filter(Boolean).length;
    if (references >= 0 && references < ports) references += numbers;
    else count += numbers;
  }
  return count;
}

/**
 * Feeds one text to the reader.
 * @returns 'read', 'refused', or a sentence about what is wrong with the reader
 */
export function probe(name: string, text: string): string {
  let file: TouchstoneFile;
  try {
    file = readTouchstone(
      name,
      Uint8Array.from(text, (letter) => letter.charCodeAt(0)),
    );
  } catch (error) {
    if (!(error instanceof TouchstoneError)) return `It threw ${String(error)}.`;
    return error.reason && error.mend ? 'refused' : 'It refused without a reason or a mend.';
  }
  const { ports, frequenciesHz, s } = file.network;
  const points = frequenciesHz.length;
  if (points === 0 || s.length !== points * ports * ports * 2) return 'The network has not the size it says.';
  if (!s.every(Number.isFinite)) return 'The network holds what is no finite number.';
  if (frequenciesHz.some((f, k) => k > 0 && f <= frequenciesHz[k - 1]!))
    return 'The frequencies do not rise.';
  const pairs = file.matrixFormat === 'Full' ? ports * ports : (ports * (ports + 1)) / 2;
  const taken = points * (1 + 2 * pairs) + file.noise.length * 5;
  const there = numbersIn(text);
  return taken === there ? 'read' : `It took ${taken} of ${there} numbers.`;
}
