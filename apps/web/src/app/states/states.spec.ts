import { ErrorHandler } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { ApiProblem } from '../api/api-problem';
import { UnexpectedErrors } from '../shell/unexpected-errors';
import { Failure } from './failure';
import { ToastList } from './toast-list';
import { Toasts } from './toasts';

function problem(status: number) {
  const words = {
    type: 'x',
    id: 'x',
    title: 'The board',
    detail: 'It could not be read.',
    instance: 'req-7',
  };
  return new ApiProblem({ ...words, status, fields: [] });
}

async function failed(status: number) {
  const fixture = TestBed.createComponent(Failure);
  fixture.componentRef.setInput('error', problem(status));
  await fixture.whenStable();
  return fixture;
}

describe('a failed read', () => {
  it('says what happened and how the log names it', async () => {
    const { nativeElement } = await failed(500);
    const text = (nativeElement as HTMLElement).textContent;
    expect(text).toContain('It could not be read.');
    expect(text).toContain('req-7');
  });

  it('offers to try again', async () => {
    const fixture = await failed(500);
    let tried = 0;
    fixture.componentInstance.retry.subscribe(() => tried++);
    (fixture.nativeElement as HTMLElement).querySelector('button')?.click();
    expect(tried).toBe(1);
  });

  it('offers nothing to try where it would fail again', async () => {
    const fixture = await failed(404);
    expect((fixture.nativeElement as HTMLElement).querySelector('button')).toBeNull();
  });
});

describe('toasts', () => {
  beforeEach(() => jest.useFakeTimers());
  afterEach(() => jest.useRealTimers());

  it('go by themselves when something is done, and stay when it failed', () => {
    const toasts = TestBed.inject(Toasts);
    toasts.done('Saved.');
    toasts.failure('Not saved.');
    jest.advanceTimersByTime(6000);
    expect(toasts.shown().map((toast) => toast.text)).toEqual(['Not saved.']);
  });

  it('say the same failure once', () => {
    const toasts = TestBed.inject(Toasts);
    toasts.failure('Not saved.');
    toasts.failure('Not saved.');
    expect(toasts.shown()).toHaveLength(1);
  });

  it('are read out: their region is there before the first', () => {
    const host = TestBed.createComponent(ToastList).nativeElement as HTMLElement;
    expect(host.getAttribute('aria-live')).toBe('polite');
  });

  it('tell the problem of a request that nobody caught', () => {
    TestBed.configureTestingModule({ providers: [{ provide: ErrorHandler, useExisting: UnexpectedErrors }] });
    TestBed.inject(ErrorHandler).handleError(problem(409));
    expect(TestBed.inject(Toasts).shown()[0]?.text).toBe('It could not be read.');
  });
});
