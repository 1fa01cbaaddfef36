import type { ComponentType } from '@angular/cdk/portal';
import { inject, Injectable } from '@angular/core';
import { MatDialog, type MatDialogRef } from '@angular/material/dialog';
import { filter } from 'rxjs';

/** What a dialog's component may say about itself. */
interface Draft {
  /** Something typed would be lost: Escape is ignored then. */
  readonly dirty?: () => boolean;
}

/** Opens dialogs with typed data and result. They close by themselves only on success; Escape and Cancel give undefined. */
@Injectable({ providedIn: 'root' })
export class Dialogs {
  private readonly dialog = inject(MatDialog);

  open<Content extends object, Data, Result>(
    component: ComponentType<Content>,
    data: Data,
    width = '520px',
  ): MatDialogRef<Content, Result> {
    const ref = this.dialog.open<Content, Data, Result>(component, {
      data,
      width,
      maxWidth: 'calc(100vw - 24px)',
      disableClose: true,
      autoFocus: 'first-tabbable',
      restoreFocus: true,
    });
    ref
      .keydownEvents()
      .pipe(filter((event) => event.key === 'Escape' && !(ref.componentInstance as Draft).dirty?.()))
      .subscribe(() => ref.close());
    return ref;
  }
}
