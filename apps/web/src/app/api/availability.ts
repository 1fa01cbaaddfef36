import { HttpClient } from '@angular/common/http';
import { inject, Injectable, Injector, signal } from '@angular/core';
import { catchError, exhaustMap, filter, map, of, Subject, take, timer, type Observable } from 'rxjs';

const retryEveryMs = 3000;

/** Whether the server answers. Once lost, its health is asked for every few seconds until it is back. */
@Injectable({ providedIn: 'root' })
export class Availability {
  private readonly injector = inject(Injector);
  private readonly awaySignal = signal(false);
  private readonly returned = new Subject<void>();

  /** The server, or the database behind it, is away; the shell says so. */
  readonly away = this.awaySignal.asReadonly();

  /** Says that a request found nobody; the result fires once the server is back, and completes. */
  lost(): Observable<void> {
    if (!this.awaySignal()) this.watch();
    return this.returned.pipe(take(1));
  }

  private watch(): void {
    this.awaySignal.set(true);
    timer(retryEveryMs, retryEveryMs)
      .pipe(
        exhaustMap(() => this.healthy()),
        filter(Boolean),
        take(1),
      )
      .subscribe(() => {
        this.awaySignal.set(false);
        this.returned.next();
      });
  }

  private healthy(): Observable<boolean> {
    // HttpClient is asked for late: its interceptors need this service.
    return this.injector
      .get(HttpClient)
      .get<{ status: string }>('/api/health')
      .pipe(
        map((health) => health.status === 'ok'),
        catchError(() => of(false)),
      );
  }
}
