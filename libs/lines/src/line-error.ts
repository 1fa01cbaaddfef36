/** A cross-section or material that no listed closed form covers: what, where, and how to mend it. */
export class LineError extends Error {
  constructor(
    readonly reason: string,
    readonly mend: string,
    /** The field at fault, such as `widthM`. */
    readonly at: string,
  ) {
    super(`${at}: ${reason} ${mend}`);
    this.name = 'LineError';
  }
}

/** Refuses what is not a finite number above zero. */
export function checkPositive(value: number, at: string): void {
  if (!(value > 0) || !Number.isFinite(value)) {
    throw new LineError(`The value ${value} is not above zero.`, 'Give a finite number above zero.', at);
  }
}
