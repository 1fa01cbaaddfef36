import { ErrorHandler, inject, Injectable } from '@angular/core';
import { ApiProblem } from '../api/api-problem';
import { Toasts } from '../states/toasts';

/** What nobody caught: told to the person, and to the browser's console where it is a fault of the client. */
@Injectable({ providedIn: 'root' })
export class UnexpectedErrors extends ErrorHandler {
  private readonly toasts = inject(Toasts);

  override handleError(error: unknown): void {
    const cause = error instanceof Error && 'rejection' in error ? error.rejection : error;
    if (cause instanceof ApiProblem) {
      this.toasts.failure(cause.message);
      return;
    }
    super.handleError(cause);
    this.toasts.failure('This page met an error it did not expect. Reload it, and tell us if it comes back.');
  }
}
