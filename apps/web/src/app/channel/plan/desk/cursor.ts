import { Injectable, signal } from '@angular/core';
import type { Point } from '@tollgate/geometry';

/** Where the pointer is on the plan; undefined while it is elsewhere. */
@Injectable()
export class Cursor {
  private readonly at = signal<Point | undefined>(undefined);
  readonly place = this.at.asReadonly();

  show(place: Point | undefined): void {
    this.at.set(place);
  }
}
