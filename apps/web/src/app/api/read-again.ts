import type { ResourceRef } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { auditTime, type Observable } from 'rxjs';

const gatherMs = 500;

/** Reads resources again when something happens, at most twice a second; what shows stays until the new is there. */
export function readAgain(events: Observable<unknown>, ...resources: ResourceRef<unknown>[]): void {
  events.pipe(auditTime(gatherMs), takeUntilDestroyed()).subscribe(() => {
    resources.forEach((resource) => resource.reload());
  });
}
