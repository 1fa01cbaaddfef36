import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { api, type Person } from '@tollgate/contracts';
import { ApiClient } from '../api/api-client';
import { FormFailure } from '../forms/form-failure';
import { formOf } from '../forms/schema-validators';
import { Submission } from '../forms/submission';
import { TextField } from '../forms/text-field';
import { RolesField } from './roles-field';

/** Left out for an invitation. */
export interface PersonDialogData {
  readonly person?: Person;
}

/** A person's name, mail address and roles, invited or changed; gives the person as stored. */
@Component({
  selector: 'tg-person-dialog',
  imports: [FormFailure, MatButton, MatDialogModule, ReactiveFormsModule, RolesField, TextField],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './person-dialog.html',
  styleUrl: '../forms/form-layout.scss',
})
export class PersonDialog {
  private readonly api = inject(ApiClient);
  private readonly ref = inject<MatDialogRef<PersonDialog, Person>>(MatDialogRef);
  protected readonly person = inject<PersonDialogData>(MAT_DIALOG_DATA).person;

  protected readonly form = formOf(api.personCreate, {
    name: this.person?.name ?? '',
    email: this.person?.email ?? '',
    roles: this.person?.roles ?? [],
  });
  protected readonly submission = new Submission(this.form);

  dirty(): boolean {
    return this.form.dirty;
  }

  protected submit(): void {
    this.submission.send(
      () => this.request(),
      (saved) => this.ref.close(saved),
    );
  }

  private request() {
    const { name, email, roles } = this.form.getRawValue();
    return this.person
      ? this.api.patch<Person>(`/people/${this.person.id}`, { name, roles })
      : this.api.post<Person>('/people', { name, email, roles });
  }
}
