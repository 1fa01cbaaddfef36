import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { roleTitles } from '@tollgate/contracts';
import { SessionStore } from '../session/session-store';
import { Page } from '../shell/page';
import { PasswordForm } from './password-form';
import { ThemeSwitch } from './theme-switch';

/** One's own account: who one is here, the password, and how this browser shows the product. */
@Component({
  selector: 'tg-account',
  imports: [Page, PasswordForm, ThemeSwitch],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './account.html',
  styleUrl: './account.scss',
})
export class Account {
  protected readonly person = inject(SessionStore).person;
  protected readonly rolesText = computed(() =>
    (this.person()?.roles ?? []).map((role) => roleTitles[role]).join(', '),
  );
}
