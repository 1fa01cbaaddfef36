import { ChangeDetectionStrategy, Component, inject, input } from '@angular/core';
import { ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { Router } from '@angular/router';
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

/** The first person of a new installation, by the one-time link on the server's console. */
@Component({
  selector: 'tg-first-administrator',
  imports: [Doorway, FormFailure, MatButton, ReactiveFormsModule, TextField],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './first-administrator.html',
  styleUrl: './doorway-form.scss',
})
export class FirstAdministrator {
  private readonly api = inject(ApiClient);
  private readonly router = inject(Router);
  private readonly session = inject(SessionStore);
  private readonly toasts = inject(Toasts);

  /** From the address: the secret of the link. */
  readonly token = input.required<string>();

  protected readonly form = formOf(api.administratorClaim, { name: '', email: '', password: '' });
  protected readonly submission = new Submission(this.form);
  protected readonly hint = `At least ${bounds.passwordCharacters.min} characters.`;

  protected submit(): void {
    const body = () => ({ token: this.token(), ...this.form.getRawValue() });
    this.submission.send(
      () => this.api.post('/first-administrator', body()).pipe(switchMap(() => this.session.load())),
      () => {
        this.toasts.done('You are the first administrator. Sign in, and invite your team.');
        void this.router.navigateByUrl(paths.signIn);
      },
    );
  }
}
