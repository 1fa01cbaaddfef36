/** All that a formula may call, with the number of arguments each takes. */
export const functions = {
  sqrt: { least: 1, most: 1 },
  log10: { least: 1, most: 1 },
  log: { least: 1, most: 1 },
  exp: { least: 1, most: 1 },
  abs: { least: 1, most: 1 },
  min: { least: 2, most: 10 },
  max: { least: 2, most: 10 },
} as const;
export type FunctionName = keyof typeof functions;

export function isFunctionName(name: string): name is FunctionName {
  return Object.hasOwn(functions, name);
}

/** The one variable: frequency in GHz. */
export const variable = 'f';

export const largestDepth = 32;
export const largestNodes = 200;

export const vocabularyMend =
  'A formula has f (in GHz), numbers, + - * / ^, brackets, and sqrt, log10, log (natural), exp, abs, min, max.';
