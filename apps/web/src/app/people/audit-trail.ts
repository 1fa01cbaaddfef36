import { DatePipe } from '@angular/common';
import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { RouterLink } from '@angular/router';
import type { AuditEvent, Person } from '@tollgate/contracts';
import { map } from 'rxjs';
import { ApiClient } from '../api/api-client';
import { Failure } from '../states/failure';
import { Cell } from '../table/cell';
import type { Column } from '../table/column';
import { DataTable } from '../table/data-table';
import { AuditFilter } from './audit-filter';

interface EventPage {
  readonly items: AuditEvent[];
  readonly nextBefore: number | null;
}

/** What was done, by whom and when, newest first; nothing in it can be changed. */
@Component({
  selector: 'tg-audit-trail',
  imports: [AuditFilter, Cell, DataTable, DatePipe, Failure, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './audit-trail.html',
  styleUrl: './audit-trail.scss',
})
export class AuditTrail {
  private readonly api = inject(ApiClient);

  /** Query parameters. */
  readonly before = input<string>();
  readonly what = input<string>();
  readonly who = input<string>();

  private readonly query = computed(() =>
    Object.fromEntries(
      Object.entries({ before: this.before(), what: this.what(), who: this.who() }).flatMap(([key, value]) =>
        value ? [[key, value]] : [],
      ),
    ),
  );
  private readonly page = rxResource({
    params: () => this.query(),
    stream: ({ params }) => this.api.get<EventPage>('/events', params),
  });
  protected readonly people = rxResource({
    stream: () => this.api.get<{ items: Person[] }>('/people').pipe(map((list) => list.items)),
  });
  protected readonly error = this.page.error;
  protected readonly rows = computed(() => (this.page.hasValue() ? this.page.value().items : undefined));
  protected readonly older = computed(() => (this.page.hasValue() ? this.page.value().nextBefore : null));
  protected readonly source = this.page;

  protected readonly columns = {
    seq: { key: 'seq', title: 'No.', width: '64px', text: (event) => String(event.seq) },
    at: { key: 'at', title: 'When', width: '170px' },
    who: { key: 'who', title: 'Who', width: '170px', text: (event) => event.who ?? 'the system' },
    detail: { key: 'detail', title: 'What was done', text: (event) => event.detail },
    what: { key: 'what', title: 'Kind', width: '210px', text: (event) => event.what },
    subject: { key: 'subject', title: 'On', width: '110px' },
  } as const satisfies Record<string, Column<AuditEvent>>;
  protected readonly columnList = Object.values(this.columns);
  protected readonly rowKey = (event: AuditEvent) => event.seq;
}
