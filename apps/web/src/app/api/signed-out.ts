import { Injectable } from '@angular/core';
import { Subject } from 'rxjs';

/** Fires when the server no longer knows the session; the session store listens. */
@Injectable({ providedIn: 'root' })
export class SignedOut {
  readonly happened = new Subject<void>();
}
