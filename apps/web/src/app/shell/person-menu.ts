import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { MatMenu, MatMenuItem, MatMenuTrigger } from '@angular/material/menu';
import { RouterLink } from '@angular/router';
import { roleTitles, type SignedInPerson } from '@tollgate/contracts';
import { Glyph } from '../marks/glyph';
import { paths } from '../paths';
import { SessionStore } from '../session/session-store';
import type { Place } from './place';

/** Who is signed in; behind it the account, signing out and, where the bar has no room for them, the places. */
@Component({
  selector: 'tg-person-menu',
  imports: [Glyph, MatMenu, MatMenuItem, MatMenuTrigger, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './person-menu.html',
  styleUrl: './person-menu.scss',
})
export class PersonMenu {
  private readonly session = inject(SessionStore);

  readonly person = input.required<SignedInPerson>();
  readonly places = input.required<readonly Place[]>();
  /** The bar shows the places itself, where it is wide enough. */
  readonly placesInBar = input.required<boolean>();

  protected readonly paths = paths;
  protected readonly rolesText = computed(() =>
    this.person()
      .roles.map((role) => roleTitles[role])
      .join(', '),
  );

  protected signOut(): void {
    this.session.signOut().subscribe();
  }
}
