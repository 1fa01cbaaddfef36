import { readChannel } from '@tollgate/budget';
import type { FieldProblem } from '@tollgate/contracts';

/** A sound channel document, and ways to spoil it. */
export const line = { kind: 'line', z0Ohm: 50, lengthM: 0.1, effectivePermittivity: 3.6 };
export const grid = { startHz: 1e9, stopHz: 2e9, points: 11 };
export const base = {
  format: 'tollgate.channel/1',
  name: 'Test',
  signaling: 'single-ended',
  elements: [line],
  grid,
};
export const withLine = (changes: object) => ({ ...base, elements: [{ ...line, ...changes }] });
export const withElement = (element: object, changes: object = {}) => ({
  ...base,
  elements: [element],
  ...changes,
});
export const withGrid = (changed: object) => ({ ...base, grid: changed });
export const withLimit = (changes: object) => ({
  ...base,
  limits: [{ title: 'Loss', quantity: 'insertion-loss', sense: 'max', ...changes }],
});
export const withFormula = (formula: string, fromHz = 1e9) =>
  withLimit({ segments: [{ fromHz, toHz: 5e9, formula }] });
export const differential = { signaling: 'differential' };

/** What is wrong, where it is told, what of the value the message tells, and how it is mended. */
export type Row = readonly [what: string, document: unknown, path: string, message: RegExp, mend: RegExp];

export function problemsOf(document: unknown): FieldProblem[] {
  const read = readChannel(document);
  return read.ok ? [] : read.problems;
}

export function expectProblem(
  problems: readonly FieldProblem[],
  path: string,
  message: RegExp,
  mend: RegExp,
): void {
  const found = problems.find((problem) => problem.path === path);
  expect(problems.map((problem) => problem.path)).toContain(path);
  expect(found!.message).toMatch(message);
  expect(found!.mend).toMatch(mend);
}
