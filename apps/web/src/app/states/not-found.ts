import { ChangeDetectionStrategy, Component } from '@angular/core';
import { RouterLink } from '@angular/router';
import { paths } from '../paths';

/** An address that leads nowhere, or to what one may not see: the two are not told apart. */
@Component({
  selector: 'tg-not-found',
  imports: [RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <h1>There is nothing at this address</h1>
    <p>
      The page does not exist, or it belongs to a board you are not a member of. A member with the role of a
      layout engineer or a project manager can add you.
    </p>
    <p><a [routerLink]="paths.boards">Go to the boards</a></p>
  `,
  styles: `
    :host {
      display: block;
      max-width: 62ch;
      margin: 0 auto;
      padding: var(--tg-space-7) var(--tg-gutter);
    }
    p {
      margin-top: var(--tg-space-3);
    }
  `,
})
export class NotFound {
  protected readonly paths = paths;
}
