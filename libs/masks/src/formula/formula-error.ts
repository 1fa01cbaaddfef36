/** A formula that cannot be used: why, where (character from 1), and how to mend it. */
export class FormulaError extends Error {
  constructor(
    readonly reason: string,
    readonly position: number,
    readonly mend: string,
  ) {
    super(`${reason} (character ${position}). ${mend}`);
    this.name = 'FormulaError';
  }
}
