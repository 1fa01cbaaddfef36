import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { api } from '@tollgate/contracts';
import { ApiClient } from '../api/api-client';
import { FormFailure } from '../forms/form-failure';
import { formOf, requestOf } from '../forms/schema-validators';
import { Submission } from '../forms/submission';
import { TextField } from '../forms/text-field';
import { paths } from '../paths';
import { Doorway } from './doorway';
import { SessionStore } from './session-store';

/** Asks for a link to set a new password; the answer is the same whether the address is known or not. */
@Component({
  selector: 'tg-forgot',
  imports: [Doorway, FormFailure, MatButton, ReactiveFormsModule, RouterLink, TextField],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './forgot.html',
  styleUrl: './doorway-form.scss',
})
export class Forgot {
  private readonly api = inject(ApiClient);
  protected readonly session = inject(SessionStore);

  protected readonly paths = paths;
  protected readonly form = formOf(api.resetRequest, { email: '' });
  protected readonly submission = new Submission(this.form);
  protected readonly askedFor = signal('');

  protected submit(): void {
    const request = () => this.api.post('/password-resets', requestOf(api.resetRequest, this.form));
    this.submission.send(request, () => this.askedFor.set(this.form.controls.email.value));
  }
}
