import { NgTemplateOutlet } from '@angular/common';
import {
  ChangeDetectionStrategy,
  Component,
  computed,
  contentChildren,
  inject,
  input,
  type ResourceRef,
  type TemplateRef,
} from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { ActivatedRoute, Router } from '@angular/router';
import { Glyph } from '../marks/glyph';
import { Empty } from '../states/empty';
import { Failure } from '../states/failure';
import { Loading } from '../states/loading';
import { Cell } from './cell';
import { ordered, readOrder, writeOrder, type Column } from './column';

interface Group<Row> {
  readonly title: string;
  readonly rows: readonly Row[];
}

/**
 * The one table: columns and a resource that loads the rows; sort and filter live in the address (`sort`, `filter`, with
 * `name` in front where a page has several tables). On a narrow screen each row becomes a block of labelled lines.
 */
@Component({
  selector: 'tg-data-table',
  imports: [Empty, Failure, Glyph, Loading, NgTemplateOutlet],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './data-table.html',
  styleUrl: './data-table.scss',
})
export class DataTable<Row extends object> {
  private readonly router = inject(Router);
  private readonly route = inject(ActivatedRoute);
  private readonly query = toSignal(this.route.queryParamMap, { requireSync: true });
  private readonly cells = contentChildren<Cell<Row>>(Cell);

  readonly caption = input.required<string>();
  readonly columns = input.required<readonly Column<Row>[]>();
  /** What loads the rows; the table shows that it waits, and what went wrong. */
  readonly source = input<ResourceRef<readonly Row[] | undefined>>();
  /** Rows that are there already, in place of a source. */
  readonly rows = input<readonly Row[]>();
  readonly rowKey = input.required<(row: Row) => string | number>();
  /** Prefix of this table's parameters in the address. */
  readonly name = input('');
  /** What the filter's text is looked for in; left out, there is no filter. */
  readonly filterBy = input<(row: Row) => string>();
  /** Title of the group a row belongs to; groups come in the order of their first row as loaded. */
  readonly groupBy = input<(row: Row) => string>();
  /** Said where there are no rows at all. */
  readonly emptyText = input('Nothing here yet');
  /** Order while the address names none. */
  readonly defaultSort = input('');

  protected readonly filterText = computed(() => this.query().get(this.parameter('filter')) ?? '');
  protected readonly order = computed(() =>
    readOrder(this.query().get(this.parameter('sort')) ?? this.defaultSort()),
  );
  private readonly loaded = computed(() => {
    const source = this.source();
    return this.rows() ?? (source?.hasValue() ? source.value() : undefined);
  });
  protected readonly waiting = computed(() => this.loaded() === undefined);
  protected readonly all = computed(() => this.loaded() ?? []);
  private readonly shown = computed(() => {
    const words = this.filterText().toLocaleLowerCase().split(/\s+/).filter(Boolean);
    const textOf = this.filterBy();
    const rows = textOf
      ? this.all().filter((row) => {
          const text = textOf(row).toLocaleLowerCase();
          return words.every((word) => text.includes(word));
        })
      : this.all();
    return ordered(rows, this.columns(), this.order());
  });
  protected readonly groups = computed<readonly Group<Row>[]>(() => {
    const titleOf = this.groupBy();
    if (!titleOf) return [{ title: '', rows: this.shown() }];
    const titles = [...new Set(this.all().map(titleOf))];
    return titles
      .map((title) => ({ title, rows: this.shown().filter((row) => titleOf(row) === title) }))
      .filter((group) => group.rows.length > 0);
  });
  protected readonly count = computed(() => this.shown().length);
  private readonly templates = computed(
    () => new Map(this.cells().map((cell) => [cell.tgCell().key, cell.template])),
  );

  protected templateOf(column: Column<Row>): TemplateRef<{ $implicit: Row }> | null {
    return this.templates().get(column.key) ?? null;
  }

  protected ariaSort(column: Column<Row>): 'ascending' | 'descending' | null {
    const order = this.order();
    if (order?.key !== column.key) return null;
    return order.descending ? 'descending' : 'ascending';
  }

  protected sort(column: Column<Row>): void {
    const order = this.order();
    const descending = order?.key === column.key && !order.descending;
    this.put('sort', writeOrder({ key: column.key, descending }));
  }

  protected filter(event: Event): void {
    this.put('filter', (event.target as HTMLInputElement).value || null);
  }

  private put(parameter: string, value: string | null): void {
    void this.router.navigate([], {
      relativeTo: this.route,
      queryParams: { [this.parameter(parameter)]: value },
      queryParamsHandling: 'merge',
      replaceUrl: true,
    });
  }

  private parameter(parameter: string): string {
    return this.name() === '' ? parameter : `${this.name()}-${parameter}`;
  }
}
