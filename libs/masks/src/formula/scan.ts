import { bounds } from '@tollgate/contracts';
import { FormulaError } from './formula-error';
import { isFunctionName, largestDepth, variable, vocabularyMend } from './vocabulary';

type TokenKind = 'number' | 'variable' | 'function' | 'operator' | 'open' | 'close' | 'comma';

export interface Token {
  readonly kind: TokenKind;
  readonly text: string;
  /** First character, counted from 1. */
  readonly position: number;
}

const pattern = /(?:\d+(?:\.\d*)?|\.\d+)(?:[eE][+-]?\d+)?|[A-Za-z_][A-Za-z_0-9]*|[-+*/^(),]|\s+/y;

/**
 * Splits a formula into tokens before any parser sees it: length, characters, names, bracket depth and products that are
 * not written out are judged here, so that every complaint has a position.
 * @throws FormulaError
 */
export function scan(text: string): Token[] {
  if (text.length > bounds.formulaCharacters) {
    throw new FormulaError(
      `The formula has ${text.length} characters`,
      bounds.formulaCharacters + 1,
      `A formula has at most ${bounds.formulaCharacters} characters: split the range into more segments.`,
    );
  }
  const tokens: Token[] = [];
  let depth = 0;
  for (let at = 0; at < text.length;) {
    pattern.lastIndex = at;
    const found = pattern.exec(text)?.[0];
    if (found === undefined) throw strange(text, at);
    if (found.trim() !== '') {
      const token = { kind: kindOf(found, at + 1), text: found, position: at + 1 };
      if (token.kind === 'open') depth += 1;
      if (token.kind === 'close') depth -= 1;
      checkDepth(depth, token);
      checkNeighbours(tokens.at(-1), token);
      tokens.push(token);
    }
    at += found.length;
  }
  if (tokens.length === 0)
    throw new FormulaError('The formula is empty', 1, 'Write one in f (GHz), such as 1.5 + 4.6*sqrt(f).');
  return tokens;
}

function strange(text: string, at: number): FormulaError {
  const character = String.fromCodePoint(text.codePointAt(at) ?? 0);
  const instead: Record<string, string> = {
    '−': 'Write the minus sign as -.',
    '–': 'Write the minus sign as -.',
    '×': 'Write a product with *.',
    '·': 'Write a product with *.',
    '√': 'Write sqrt( ).',
    '.': 'Write a number before or after the point.',
  };
  return new FormulaError(`"${character}" has no place here`, at + 1, instead[character] ?? vocabularyMend);
}

function kindOf(text: string, position: number): TokenKind {
  if (/^[\d.]/.test(text)) return 'number';
  if (text === '(') return 'open';
  if (text === ')') return 'close';
  if (text === ',') return 'comma';
  if (/^[-+*/^]/.test(text)) return 'operator';
  if (text === variable) return 'variable';
  if (isFunctionName(text)) return 'function';
  throw new FormulaError(`"${text}" is not known`, position, vocabularyMend);
}

function checkDepth(depth: number, token: Token): void {
  if (depth > largestDepth) {
    throw new FormulaError(
      `Brackets are nested more than ${largestDepth} deep`,
      token.position,
      'Write the formula with fewer brackets, or split the range into segments.',
    );
  }
  if (depth < 0)
    throw new FormulaError('A bracket closes that was never opened', token.position, 'Remove it.');
}

function checkNeighbours(before: Token | undefined, token: Token): void {
  const opens = token.kind === 'open';
  if (before?.kind === 'function' && !opens) throw uncalled(before);
  if (!before || !['number', 'variable', 'close'].includes(before.kind)) return;
  if (opens || ['number', 'variable', 'function'].includes(token.kind)) {
    throw new FormulaError(
      `An operator is missing between "${before.text}" and "${token.text}"`,
      token.position,
      'Write a product with *, such as 2*f.',
    );
  }
}

function uncalled(token: Token): FormulaError {
  return new FormulaError(
    `${token.text} stands without its brackets`,
    token.position,
    `Write ${token.text}( ) around what it is of.`,
  );
}

/** Complains about a function name at the very end, which has no token after it to betray it. */
export function checkEnd(tokens: readonly Token[]): void {
  const last = tokens.at(-1);
  if (last?.kind === 'function') throw uncalled(last);
}
