/** The one source of time; tests give their own and move it. */
export interface Clock {
  now(): Date;
}

export const systemClock: Clock = { now: () => new Date() };

/** A clock that stands until it is moved. */
export class SteppingClock implements Clock {
  constructor(private instant: Date = new Date('2026-06-01T08:00:00.000Z')) {}

  now(): Date {
    return new Date(this.instant);
  }

  advance(milliseconds: number): void {
    this.instant = new Date(this.instant.getTime() + milliseconds);
  }
}
