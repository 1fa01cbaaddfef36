import type { FieldProblem } from '@tollgate/contracts';
import { ElementError } from '@tollgate/elements';
import { NetworkError } from '@tollgate/network';
import { pathInside } from './read';

/** Stops a check that cannot be made; carried to its result as problems. */
export class CheckRefused extends Error {
  constructor(readonly problems: FieldProblem[]) {
    super(problems.map(({ path, message }) => `${path}: ${message}`).join(' '));
    this.name = 'CheckRefused';
  }
}

/** Thrown out of a check whose caller no longer wants it. */
export class CheckAbandoned extends Error {
  constructor() {
    super('The check was abandoned.');
    this.name = 'CheckAbandoned';
  }
}

/** Runs something of element `index`; what the element or the algebra refuses is told with its path in the channel. */
export function ofElement<Result>(index: number, run: () => Result): Result {
  try {
    return run();
  } catch (error) {
    const at = `elements[${index}]`;
    if (error instanceof ElementError) {
      const { path, message, mend } = error.problem;
      throw new CheckRefused([{ path: pathInside(at, path), message, mend }]);
    }
    if (error instanceof NetworkError) {
      throw new CheckRefused([{ path: at, message: error.reason, mend: error.mend }]);
    }
    throw error;
  }
}
