import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { RouterLink } from '@angular/router';

export interface Step {
  readonly name: string;
  /** Left out for the page one is at. */
  readonly link?: string;
}

/** Where one is: "Heron line card / revision C / Lane 3". */
@Component({
  selector: 'tg-trail',
  imports: [RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <nav aria-label="Trail">
      <ol>
        @for (step of steps(); track $index) {
          <li>
            @if (step.link) {
              <a [routerLink]="step.link">{{ step.name }}</a>
            } @else {
              <span aria-current="page">{{ step.name }}</span>
            }
          </li>
        }
      </ol>
    </nav>
  `,
  styles: `
    :host {
      display: block;
      min-width: 0;
    }
    ol {
      display: flex;
      flex-wrap: wrap;
      margin: 0;
      padding: 0;
      list-style: none;
    }
    li {
      min-width: 0;
      overflow-wrap: anywhere;
    }
    li + li::before {
      content: '/';
      margin: 0 0.55em;
      color: var(--tg-slate);
    }
    a {
      color: var(--tg-slate);
      text-decoration: none;
    }
    a:hover {
      color: var(--tg-copper);
      text-decoration: underline;
    }
    [aria-current] {
      font-weight: 600;
    }
  `,
})
export class Trail {
  readonly steps = input.required<readonly Step[]>();
}
