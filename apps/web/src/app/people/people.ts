import { ChangeDetectionStrategy, Component } from '@angular/core';
import { RouterLink, RouterLinkActive, RouterOutlet } from '@angular/router';
import { Page } from '../shell/page';

/** The administrator's page: people, what was done, and mail that waits. */
@Component({
  selector: 'tg-people',
  imports: [Page, RouterLink, RouterLinkActive, RouterOutlet],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './people.html',
  styleUrl: './people.scss',
})
export class People {
  protected readonly tabs = [
    { name: 'People', link: '/people' },
    { name: 'Audit trail', link: '/people/audit' },
    { name: 'Waiting mail', link: '/people/outbox' },
  ];
}
