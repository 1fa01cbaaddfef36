import { DatePipe } from '@angular/common';
import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import type { api } from '@tollgate/contracts';
import { interval, map } from 'rxjs';
import type * as z from 'zod';
import { ApiClient } from '../api/api-client';
import { readAgain } from '../api/read-again';
import { Cell } from '../table/cell';
import type { Column } from '../table/column';
import { DataTable } from '../table/data-table';

type Entry = z.output<typeof api.outboxEntry>;

const lookEveryMs = 10_000;

/** Mail on its way out: what waits, what was sent, and why something could not be. */
@Component({
  selector: 'tg-outbox',
  imports: [Cell, DataTable, DatePipe],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './outbox.html',
  styleUrl: './outbox.scss',
})
export class Outbox {
  private readonly api = inject(ApiClient);

  protected readonly entries = rxResource({
    stream: () => this.api.get<{ items: Entry[] }>('/outbox').pipe(map((list) => list.items)),
  });
  protected readonly columns = {
    to: { key: 'to', title: 'To', width: '24%', sortBy: (entry) => entry.to, text: (entry) => entry.to },
    subject: { key: 'subject', title: 'Subject', text: (entry) => entry.subject },
    state: { key: 'state', title: 'State', width: '30%', sortBy: (entry) => entry.state },
    created: { key: 'created', title: 'Written', width: '160px', sortBy: (entry) => entry.createdAt },
  } as const satisfies Record<string, Column<Entry>>;
  protected readonly columnList = Object.values(this.columns);
  protected readonly rowKey = (entry: Entry) => entry.id;
  protected readonly filterBy = (entry: Entry) => `${entry.to} ${entry.subject} ${entry.state}`;

  constructor() {
    readAgain(interval(lookEveryMs), this.entries);
  }

  protected attemptsWords(entry: Entry): string {
    return `${entry.attempts} ${entry.attempts === 1 ? 'attempt' : 'attempts'}`;
  }
}
