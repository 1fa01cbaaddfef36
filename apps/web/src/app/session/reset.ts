import { ChangeDetectionStrategy, Component, inject, input } from '@angular/core';
import { ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import { api, bounds } from '@tollgate/contracts';
import { switchMap } from 'rxjs';
import { ApiClient } from '../api/api-client';
import { FormFailure } from '../forms/form-failure';
import { formOf } from '../forms/schema-validators';
import { Submission } from '../forms/submission';
import { TextField } from '../forms/text-field';
import { paths } from '../paths';
import { Toasts } from '../states/toasts';
import { Doorway } from './doorway';
import { SessionStore } from './session-store';

/** Sets a password by a mailed link: after a reset, and for who has been invited. */
@Component({
  selector: 'tg-reset',
  imports: [Doorway, FormFailure, MatButton, ReactiveFormsModule, RouterLink, TextField],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './reset.html',
  styleUrl: './doorway-form.scss',
})
export class Reset {
  private readonly api = inject(ApiClient);
  private readonly router = inject(Router);
  private readonly session = inject(SessionStore);
  private readonly toasts = inject(Toasts);

  /** From the address: the secret of the link. */
  readonly token = input.required<string>();

  protected readonly paths = paths;
  protected readonly form = formOf(api.resetCompletion, { newPassword: '' });
  protected readonly submission = new Submission(this.form);
  protected readonly hint = `At least ${bounds.passwordCharacters.min} characters; a few words together make a good one.`;

  protected submit(): void {
    const body = () => ({ token: this.token(), ...this.form.getRawValue() });
    this.submission.send(
      () => this.api.post('/password-resets/complete', body()).pipe(switchMap(() => this.session.load())),
      () => {
        this.toasts.done('Your new password is set. Sign in with it.');
        void this.router.navigateByUrl(paths.signIn);
      },
    );
  }
}
