import { computed, inject, Injectable, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { Router } from '@angular/router';
import { roleAllows, type Action, type Session, type SignIn } from '@tollgate/contracts';
import { map, ReplaySubject, switchMap, take, tap, type Observable } from 'rxjs';
import { ApiClient } from '../api/api-client';
import { CsrfToken } from '../api/csrf-token';
import { SignedOut } from '../api/signed-out';
import { paths } from '../paths';

/** Keys under this prefix in localStorage hold unsaved drafts; they go at sign-out. */
export const draftPrefix = 'tollgate.draft.';

/** Who is signed in, read once at the start and again whenever that may have changed. */
@Injectable({ providedIn: 'root' })
export class SessionStore {
  private readonly api = inject(ApiClient);
  private readonly csrf = inject(CsrfToken);
  private readonly router = inject(Router);
  private readonly known = new ReplaySubject<Session>(1);
  private readonly state = signal<Session | undefined>(undefined);

  /** Undefined until the server has answered. */
  readonly session = this.state.asReadonly();
  readonly person = computed(() => this.state()?.person ?? null);
  readonly demonstration = computed(() => this.state()?.demonstration ?? false);
  /** The session as soon as it is known; completes. */
  readonly ready: Observable<Session> = this.known.pipe(take(1));

  constructor() {
    inject(SignedOut)
      .happened.pipe(takeUntilDestroyed())
      .subscribe(() => this.expired());
    this.load().subscribe();
  }

  /** Whether the person's roles allow an action; what needs membership comes with `can` in the replies. */
  may(action: Action): boolean {
    return roleAllows(action, this.person()?.roles ?? []);
  }

  load(): Observable<Session> {
    return this.api.get<Session>('/session').pipe(tap((session) => this.take(session)));
  }

  signIn(credentials: SignIn): Observable<Session> {
    return this.api.post('/session', credentials).pipe(switchMap(() => this.load()));
  }

  signOut(): Observable<void> {
    return this.api.delete('/session').pipe(
      tap(() => forgetDrafts()),
      switchMap(() => this.load()),
      map(() => void this.router.navigateByUrl(paths.signIn)),
    );
  }

  private take(session: Session): void {
    this.csrf.value = session.csrfToken;
    this.csrf.personId = session.person?.id ?? '';
    this.state.set(session);
    this.known.next(session);
  }

  private expired(): void {
    if (this.person() === null) return;
    const back = this.router.url;
    this.load().subscribe(
      () => void this.router.navigate([paths.signIn], { queryParams: { back, ended: 1 } }),
    );
  }
}

function forgetDrafts(): void {
  Object.keys(localStorage)
    .filter((key) => key.startsWith(draftPrefix))
    .forEach((key) => localStorage.removeItem(key));
}
