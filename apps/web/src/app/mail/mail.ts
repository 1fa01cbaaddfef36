import { DatePipe } from '@angular/common';
import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import type { CaughtMail } from '@tollgate/contracts';
import { interval, map } from 'rxjs';
import { ApiClient } from '../api/api-client';
import { readAgain } from '../api/read-again';
import { paths } from '../paths';
import { SessionStore } from '../session/session-store';
import { Page } from '../shell/page';
import { Empty } from '../states/empty';
import { Failure } from '../states/failure';
import { Loading } from '../states/loading';
import { MailText } from './mail-text';

const lookEveryMs = 3000;

/** The demonstration's mail box: everything the server has sent to anybody, since nothing leaves this machine. */
@Component({
  selector: 'tg-mail',
  imports: [DatePipe, Empty, Failure, Loading, MailText, MatButton, Page, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './mail.html',
  styleUrl: './mail.scss',
})
export class Mail {
  private readonly api = inject(ApiClient);

  protected readonly person = inject(SessionStore).person;
  protected readonly paths = paths;

  /** Query parameter: the mail that is read; left out, the newest. */
  readonly read = input<string>();

  protected readonly source = rxResource({
    stream: () =>
      this.api.get<{ items: CaughtMail[] }>('/demo/mail').pipe(map((list) => newestFirst(list.items))),
  });
  protected readonly mails = computed(() => (this.source.hasValue() ? this.source.value() : undefined));
  protected readonly open = computed(() => {
    const mails = this.mails();
    return mails?.find((mail) => mail.id === this.read()) ?? mails?.[0];
  });

  constructor() {
    readAgain(interval(lookEveryMs), this.source);
  }
}

function newestFirst(mails: readonly CaughtMail[]): readonly CaughtMail[] {
  return [...mails].sort((a, b) => b.receivedAt.localeCompare(a.receivedAt));
}
