import { inject, Injectable } from '@angular/core';
import { map, type Observable } from 'rxjs';
import { Dialogs } from '../../dialogs/dialogs';
import { ConflictDialog, type ConflictDialogData } from './conflict-dialog';
import type { Conflict, Side } from './merge';

/** Asks the person, field by field, whose value stays. */
@Injectable({ providedIn: 'root' })
export class Conflicts {
  private readonly dialogs = inject(Dialogs);

  settle(conflicts: readonly Conflict[], who: string): Observable<ReadonlyMap<string, Side>> {
    return this.dialogs
      .open<ConflictDialog, ConflictDialogData, ReadonlyMap<string, Side>>(
        ConflictDialog,
        { conflicts, who },
        '680px',
      )
      .afterClosed()
      .pipe(map((choices) => choices ?? new Map<string, Side>()));
  }
}
