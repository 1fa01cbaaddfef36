import type { Refusal } from './option-line';
import type { MatrixFormat, TwoPortOrder } from './touchstone-file';

/** Ports beyond this are refused: a matrix of 512 x 512 already takes 4 MB a point. */
export const mostPorts = 512;

/** What the keywords of version 2 have said so far. */
export interface Keywords {
  version?: '1.0' | '2.0' | '2.1';
  ports?: number;
  twoPortOrder?: TwoPortOrder;
  frequencies?: number;
  noiseFrequencies?: number;
  /** Tokens of [Reference], which may go on over lines. */
  reference?: string[];
  matrixFormat?: MatrixFormat;
  modeOrder?: string[];
  /** Keywords seen, to refuse a second one. */
  readonly seen: Set<string>;
}

/** What the reader does next. */
export type KeywordStep = 'header' | 'information' | 'reference' | 'network' | 'noise' | 'end';

const no = (reason: string, mend: string): Refusal => ({ reason, mend });

function count(text: string, keyword: string, least: number, most: number): number | Refusal {
  if (!/^\d+$/.test(text))
    return no(`[${keyword}] has the value "${text}".`, 'Write a whole number behind it.');
  const value = Number(text);
  if (value < least || value > most) {
    return no(`[${keyword}] is ${text}.`, `Give a number from ${least} to ${most}.`);
  }
  return value;
}

type Handler = (keywords: Keywords, argument: string) => KeywordStep | Refusal;

const handlers: Readonly<Record<string, Handler>> = {
  version: (keywords, argument) => {
    const version = /^(1\.[01]|2\.[01])$/.exec(argument)?.[1];
    if (!version) return no(`[Version] is "${argument}".`, 'Versions 1.0, 1.1, 2.0 and 2.1 are read.');
    keywords.version = version.startsWith('1') ? '1.0' : (version as '2.0' | '2.1');
    return 'header';
  },
  'number of ports': (keywords, argument) => {
    const ports = count(argument, 'Number of Ports', 1, mostPorts);
    if (typeof ports !== 'number') return ports;
    keywords.ports = ports;
    return 'header';
  },
  'two-port data order': (keywords, argument) => {
    const order = (['12_21', '21_12'] as const).find((known) => known === argument);
    if (!order) return no(`[Two-Port Data Order] is "${argument}".`, 'Write 12_21 or 21_12.');
    keywords.twoPortOrder = order;
    return 'header';
  },
  'two-port order': (keywords, argument) => handlers['two-port data order']!(keywords, argument),
  'number of frequencies': (keywords, argument) => {
    const frequencies = count(argument, 'Number of Frequencies', 1, 1e8);
    if (typeof frequencies !== 'number') return frequencies;
    keywords.frequencies = frequencies;
    return 'header';
  },
  'number of noise frequencies': (keywords, argument) => {
    const frequencies = count(argument, 'Number of Noise Frequencies', 1, 1e8);
    if (typeof frequencies !== 'number') return frequencies;
    keywords.noiseFrequencies = frequencies;
    return 'header';
  },
  reference: (keywords, argument) => {
    keywords.reference = argument.split(/\s+/).filter(Boolean);
    return 'reference';
  },
  'matrix format': (keywords, argument) => {
    const format = (['Full', 'Lower', 'Upper'] as const).find(
      (known) => known.toLowerCase() === argument.toLowerCase(),
    );
    if (!format) return no(`[Matrix Format] is "${argument}".`, 'Write Full, Lower or Upper.');
    keywords.matrixFormat = format;
    return 'header';
  },
  'mixed-mode order': (keywords, argument) => {
    keywords.modeOrder = argument.split(/\s+/).filter(Boolean);
    return 'header';
  },
  'begin information': () => 'information',
  'end information': () => 'header',
  'network data': () => 'network',
  'noise data': () => 'noise',
  end: () => 'end',
};

/** One keyword line of version 2, `[Keyword] argument`, comment removed. */
export function takeKeyword(keywords: Keywords, text: string): KeywordStep | Refusal {
  const match = /^\[([^\]]*)\]\s*(.*?)\s*$/.exec(text);
  if (!match) return no(`"${text.slice(0, 60)}" begins like a keyword and has no "]".`, 'Close the bracket.');
  const name = match[1]!.trim().toLowerCase().replace(/\s+/g, ' ');
  const handler = handlers[name];
  if (!handler) {
    return no(
      `[${match[1]}] is no keyword of Touchstone 2.`,
      'Remove it, or put it between [Begin Information] and [End Information].',
    );
  }
  if (keywords.seen.has(name)) return no(`[${match[1]}] stands twice.`, 'Keep one of them.');
  keywords.seen.add(name);
  return handler(keywords, match[2]!);
}
