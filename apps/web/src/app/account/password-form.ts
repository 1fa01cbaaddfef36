import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { api, bounds } from '@tollgate/contracts';
import { switchMap } from 'rxjs';
import { ApiClient } from '../api/api-client';
import { FormFailure } from '../forms/form-failure';
import { formOf, requestOf } from '../forms/schema-validators';
import { Submission } from '../forms/submission';
import { TextField } from '../forms/text-field';
import { SessionStore } from '../session/session-store';
import { Toasts } from '../states/toasts';

/** Change of one's own password. */
@Component({
  selector: 'tg-password-form',
  imports: [FormFailure, MatButton, ReactiveFormsModule, TextField],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './password-form.html',
  styleUrl: '../forms/form-layout.scss',
})
export class PasswordForm {
  private readonly api = inject(ApiClient);
  private readonly session = inject(SessionStore);
  private readonly toasts = inject(Toasts);

  protected readonly form = formOf(api.passwordChange, { currentPassword: '', newPassword: '' });
  protected readonly submission = new Submission(this.form);
  protected readonly hint = `At least ${bounds.passwordCharacters.min} characters. Your other sessions end.`;

  protected submit(): void {
    const change = () => this.api.put('/account/password', requestOf(api.passwordChange, this.form));
    this.submission.send(
      () => change().pipe(switchMap(() => this.session.load())),
      () => {
        this.form.reset();
        this.toasts.done('Your password is changed.');
      },
    );
  }
}
