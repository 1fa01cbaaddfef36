import { computed, type Signal } from '@angular/core';
import { toObservable, toSignal } from '@angular/core/rxjs-interop';
import type { AbstractControl } from '@angular/forms';
import { switchMap } from 'rxjs';
import { messageOf } from './server-errors';

/** A control's error sentence as a signal: follows its value, its touch and what the server says of it. */
export function controlMessage(control: Signal<AbstractControl>): Signal<string> {
  const event = toSignal(toObservable(control).pipe(switchMap((each) => each.events)));
  return computed(() => {
    event();
    return messageOf(control());
  });
}
