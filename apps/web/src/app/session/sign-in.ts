import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import { api } from '@tollgate/contracts';
import { FormFailure } from '../forms/form-failure';
import { formOf, requestOf } from '../forms/schema-validators';
import { Submission } from '../forms/submission';
import { TextField } from '../forms/text-field';
import { paths } from '../paths';
import { Doorway } from './doorway';
import { SessionStore } from './session-store';

/** Signing in, and back to where one was going. */
@Component({
  selector: 'tg-sign-in',
  imports: [Doorway, FormFailure, MatButton, ReactiveFormsModule, RouterLink, TextField],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './sign-in.html',
  styleUrl: './doorway-form.scss',
})
export class SignIn {
  private readonly router = inject(Router);
  protected readonly session = inject(SessionStore);

  /** Query parameter: the address one was going to. */
  readonly back = input<string>();
  /** Query parameter: the session came to its end while at work. */
  readonly ended = input<string>();

  protected readonly paths = paths;
  protected readonly form = formOf(api.signIn, { email: '', password: '' });
  protected readonly submission = new Submission(this.form);
  protected readonly lead = computed(() =>
    this.ended() === undefined
      ? 'The loss of your board’s channels, held against the masks they must meet.'
      : 'Your session has ended. Sign in to go on where you were.',
  );

  protected submit(): void {
    this.submission.send(
      () => this.session.signIn(requestOf(api.signIn, this.form)),
      () => void this.router.navigateByUrl(this.back() ?? paths.boards),
    );
  }
}
