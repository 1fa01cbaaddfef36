import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import {
  signalings,
  type Channel,
  type Revision,
  type StackupVersion,
  type StackupVersions,
} from '@tollgate/contracts';
import { of, switchMap, type Observable } from 'rxjs';
import * as z from 'zod';
import { ApiClient } from '../api/api-client';
import { ChoiceField } from '../forms/choice-field';
import { FormFailure } from '../forms/form-failure';
import { formOf, requestOf } from '../forms/schema-validators';
import { Submission } from '../forms/submission';
import { TextField } from '../forms/text-field';
import { startDocument } from './channel-templates';

export interface ChannelDialogData {
  readonly revision: Pick<Revision, 'id' | 'links'>;
}

const schema = z.strictObject({
  name: z.string().trim().min(1, 'Name must not be empty.').max(200, 'Name must be at most 200 characters.'),
  signaling: z.enum(signalings),
  linkId: z.string(),
});

/** A new channel: its name, how it signals, and the link it belongs to; gives the channel as stored. */
@Component({
  selector: 'tg-channel-dialog',
  imports: [ChoiceField, FormFailure, MatButton, MatDialogModule, ReactiveFormsModule, TextField],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './channel-dialog.html',
  styleUrl: '../forms/form-layout.scss',
})
export class ChannelDialog {
  private readonly api = inject(ApiClient);
  private readonly ref = inject<MatDialogRef<ChannelDialog, Channel>>(MatDialogRef);
  private readonly revision = inject<ChannelDialogData>(MAT_DIALOG_DATA).revision;

  protected readonly form = formOf(schema, { name: '', signaling: 'differential', linkId: '' });
  protected readonly submission = new Submission(this.form);
  protected readonly signalingChoices = [
    { value: 'differential', title: 'Differential pair' },
    { value: 'single-ended', title: 'Single-ended' },
  ];
  protected readonly linkChoices = this.revision.links
    .filter((link) => !link.archived)
    .map(({ id, name }) => ({ value: id, title: name }));

  dirty(): boolean {
    return this.form.dirty;
  }

  protected submit(): void {
    this.submission.send(
      () => {
        const { name, signaling, linkId } = requestOf(schema, this.form);
        return this.newestStackup().pipe(
          switchMap((newest) =>
            this.api.post<Channel>(`/revisions/${this.revision.id}/channels`, {
              document: startDocument(name, signaling, newest),
              linkId: linkId || null,
            }),
          ),
        );
      },
      (made) => this.ref.close(made),
    );
  }

  private newestStackup(): Observable<StackupVersion | undefined> {
    return this.api
      .get<StackupVersions>(`/revisions/${this.revision.id}/stackups`)
      .pipe(
        switchMap(({ items: [newest] }) =>
          newest ? this.api.get<StackupVersion>(`/stackups/${newest.id}`) : of(undefined),
        ),
      );
  }
}
