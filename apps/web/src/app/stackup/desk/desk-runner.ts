import { computed, DestroyRef, inject, Injectable, signal } from '@angular/core';
import { takeUntilDestroyed, toObservable } from '@angular/core/rxjs-interop';
import { layerProblems, type CrossSection, type FieldProblem } from '@tollgate/contracts';
import {
  catchError,
  concat,
  debounceTime,
  map,
  merge,
  of,
  Subject,
  switchMap,
  tap,
  type Observable,
} from 'rxjs';
import { ApiClient } from '../../api/api-client';
import { apiProblemOf } from '../../api/api-problem';
import { Availability } from '../../api/availability';
import { StackupStore } from '../document/stackup-store';
import { startQuestion, type DeskQuestion } from './desk-question';

const settleMs = 120;

/** Asks the server of the section as it stands, a moment after each change: first its figures, then what they answer to. */
@Injectable()
export class DeskRunner {
  private readonly api = inject(ApiClient);
  private readonly availability = inject(Availability);
  private readonly destroyed = inject(DestroyRef);
  private readonly store = inject(StackupStore);
  private readonly again = new Subject<void>();
  private readonly asked = signal<DeskQuestion>(startQuestion);
  private readonly answered = signal<{ section: CrossSection; of: DeskQuestion } | undefined>(undefined);
  private readonly said = signal('');
  private readonly told = signal<readonly FieldProblem[]>([]);

  /** As it was asked; the layer is the first signal layer until one is chosen. */
  readonly question = computed<DeskQuestion>(() => {
    const asked = this.asked();
    const layers = this.store.signalLayers();
    return layers.includes(asked.layer) ? asked : { ...asked, layer: layers[0] ?? '' };
  });
  private readonly request = computed(() => {
    const stackup = this.store.stackup();
    const question = this.question();
    return stackup && question.layer ? { stackup, ...question } : undefined;
  });
  /** The last answer; what shows while a newer one is on its way or cannot be given. */
  readonly section = computed(() => this.answered()?.section);
  /** The question the last answer is of. */
  readonly answeredQuestion = computed(() => this.answered()?.of ?? this.question());
  readonly behind = computed(() => this.answered() !== undefined && this.answered()!.of !== this.request());
  /** Why there is no answer to the question as it stands. */
  readonly failure = this.said.asReadonly();
  readonly waiting = signal(false);

  constructor() {
    merge(toObservable(this.request), this.again)
      .pipe(
        debounceTime(settleMs),
        map(() => this.request()),
        switchMap((request) => (request ? this.ask(request) : of(undefined))),
        takeUntilDestroyed(),
      )
      .subscribe();
  }

  change(change: Partial<DeskQuestion>): void {
    this.asked.set({ ...this.question(), ...change });
  }

  /** The sentence of the last refusal for one field of the question. */
  problemAt(path: keyof DeskQuestion): string {
    const found = this.told().find((problem) => problem.path === path);
    return found ? [found.message, found.mend].filter(Boolean).join(' ') : '';
  }

  private ask(request: NonNullable<ReturnType<typeof this.request>>): Observable<void> {
    const wrong = layerProblems(request.stackup.layers)[0];
    if (wrong) {
      this.said.set(`${wrong.message} ${wrong.mend ?? ''}`.trim());
      return of(undefined);
    }
    this.waiting.set(true);
    const post = (sensitivities: boolean) =>
      this.api.post<CrossSection>('/stackups/cross-section', { ...request, sensitivities }).pipe(
        tap((section) => {
          this.answered.set({ section, of: request });
          this.said.set('');
          this.told.set([]);
        }),
      );
    return concat(post(false), post(true)).pipe(
      map(() => undefined),
      catchError((error: unknown) => this.failed(error)),
      tap({ finalize: () => this.waiting.set(false) }),
    );
  }

  private failed(error: unknown): Observable<void> {
    const problem = apiProblemOf(error);
    if (problem.away) {
      this.said.set('Not solved while the server is away.');
      this.availability
        .lost()
        .pipe(takeUntilDestroyed(this.destroyed))
        .subscribe(() => this.again.next());
    } else if (problem.problem.id !== 'superseded') {
      this.told.set(problem.fields);
      const [first] = problem.fields;
      this.said.set(first ? `${first.message} ${first.mend ?? ''}`.trim() : problem.message);
    }
    return of(undefined);
  }
}
