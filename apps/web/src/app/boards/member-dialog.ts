import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { api, roleTitles, type DirectoryEntry } from '@tollgate/contracts';
import { map } from 'rxjs';
import * as z from 'zod';
import { ApiClient } from '../api/api-client';
import { ChoiceField, type Choice } from '../forms/choice-field';
import { FormFailure } from '../forms/form-failure';
import { formOf } from '../forms/schema-validators';
import { Submission } from '../forms/submission';
import { Failure } from '../states/failure';
import { Loading } from '../states/loading';

export interface MemberDialogData {
  readonly boardId: string;
  readonly memberIds: readonly string[];
}

const membership = z.strictObject({ personId: api.id });

/** Adds someone of the directory to a board; gives true once that is done. */
@Component({
  selector: 'tg-member-dialog',
  imports: [ChoiceField, Failure, FormFailure, Loading, MatButton, MatDialogModule, ReactiveFormsModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './member-dialog.html',
  styleUrl: '../forms/form-layout.scss',
})
export class MemberDialog {
  private readonly api = inject(ApiClient);
  private readonly ref = inject<MatDialogRef<MemberDialog, boolean>>(MatDialogRef);
  private readonly data = inject<MemberDialogData>(MAT_DIALOG_DATA);

  protected readonly directory = rxResource({
    stream: () =>
      this.api.get<{ items: DirectoryEntry[] }>('/people/directory').pipe(map((list) => list.items)),
  });
  protected readonly choices = computed<readonly Choice[]>(() =>
    (this.directory.hasValue() ? this.directory.value() : [])
      .filter((person) => !this.data.memberIds.includes(person.id))
      .map((person) => ({
        value: person.id,
        title: `${person.name} (${person.roles.map((role) => roleTitles[role]).join(', ')})`,
      })),
  );
  protected readonly form = formOf(membership, { personId: '' });
  protected readonly submission = new Submission(this.form);

  protected submit(): void {
    const personId = () => this.form.controls.personId.value;
    this.submission.send(
      () => this.api.put(`/boards/${this.data.boardId}/members/${personId()}`, {}),
      () => this.ref.close(true),
    );
  }
}
