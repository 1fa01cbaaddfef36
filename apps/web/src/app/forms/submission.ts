import { DestroyRef, ElementRef, inject, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import type { AbstractControl } from '@angular/forms';
import type { FieldProblem } from '@tollgate/contracts';
import { finalize, type Observable } from 'rxjs';
import { apiProblemOf } from '../api/api-problem';
import { landOnFields } from './server-errors';

/** What went wrong with a form as a whole. */
export interface FormFailure {
  readonly text: string;
  /** How the log names it, where the fault is the server's. */
  readonly trace: string;
  /** Problems of fields this form does not show. */
  readonly others: readonly FieldProblem[];
}

/** One form on its way to the server: busy meanwhile, its draft kept when that fails, its errors on its fields. */
export class Submission {
  private readonly host = inject<ElementRef<HTMLElement>>(ElementRef);
  private readonly destroyed = inject(DestroyRef);
  private readonly busySignal = signal(false);
  private readonly failureSignal = signal<FormFailure | undefined>(undefined);

  readonly busy = this.busySignal.asReadonly();
  readonly failure = this.failureSignal.asReadonly();

  /** Create it where a component's fields are initialised. */
  constructor(private readonly form: AbstractControl) {}

  /** Sends what `request` makes, once the form is valid; `done` runs on success only. */
  send<Reply>(request: () => Observable<Reply>, done: (reply: Reply) => void): void {
    if (this.busy()) return;
    this.failureSignal.set(undefined);
    this.form.markAllAsTouched();
    if (this.form.invalid) {
      this.focusFirstError();
      return;
    }
    this.busySignal.set(true);
    request()
      .pipe(
        takeUntilDestroyed(this.destroyed),
        finalize(() => this.busySignal.set(false)),
      )
      .subscribe({ next: done, error: (error: unknown) => this.fail(error) });
  }

  private fail(error: unknown): void {
    const { title, detail, fields, status, instance } = apiProblemOf(error).problem;
    const others = landOnFields(this.form, fields);
    const landed = fields.length > 0 && others.length === 0;
    if (!landed)
      this.failureSignal.set({ text: detail || title, trace: status >= 500 ? instance : '', others });
    else this.focusFirstError();
  }

  private focusFirstError(): void {
    // After the view has marked its fields.
    setTimeout(() => {
      const selector = '[aria-invalid="true"], .ng-invalid:is(input, select, textarea)';
      this.host.nativeElement.querySelector<HTMLElement>(selector)?.focus();
    });
  }
}
