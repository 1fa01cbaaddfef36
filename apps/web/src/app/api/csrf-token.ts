import { Injectable } from '@angular/core';

/** The token of the session as it was last read; apart from the session store, which itself makes requests. */
@Injectable({ providedIn: 'root' })
export class CsrfToken {
  value = '';
  /** Whose session it is; empty for strangers. */
  personId = '';
}
