import { effect, inject, untracked } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import type { MatDialogRef } from '@angular/material/dialog';
import { ActivatedRoute, Router } from '@angular/router';

/** Opens a dialog, or says with undefined that what it shows has not been read yet. `of` is the part after the colon. */
export type Opener = (of: string) => MatDialogRef<object, unknown> | undefined;

/**
 * Dialogs that have an address: `?dialog=new-board`, `?dialog=edit-person:<id>`. Opening is a link to that address;
 * closing takes it away, and going back closes. Call it in a component's constructor.
 */
export function routedDialogs(openers: Readonly<Record<string, Opener>>): void {
  const router = inject(Router);
  const route = inject(ActivatedRoute);
  const query = toSignal(route.queryParamMap, { requireSync: true });
  let shown: { address: string; ref: MatDialogRef<object, unknown> } | undefined;

  effect(() => {
    const address = query().get('dialog') ?? '';
    if (shown && shown.address !== address) shown.ref.close();
    if (address === '' || shown?.address === address) return;
    const [name = '', of = ''] = address.split(':');
    const ref = openers[name]?.(of);
    if (!ref) return;
    const opened = { address, ref };
    shown = opened;
    ref.afterClosed().subscribe(() => {
      if (shown === opened) shown = undefined;
      // Who opened the dialog may go on to another page with its result: that is not to be cut short.
      queueMicrotask(() => {
        if (untracked(router.currentNavigation) || untracked(query).get('dialog') !== address) return;
        void router.navigate([], {
          relativeTo: route,
          queryParams: { dialog: null },
          queryParamsHandling: 'merge',
          replaceUrl: true,
        });
      });
    });
  });
}
