import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { ChangeDetectionStrategy, Component, signal } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { TestBed } from '@angular/core/testing';
import { provideRouter, Router } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import { of, throwError, type Observable } from 'rxjs';
import { Cell } from './cell';
import type { Column } from './column';
import { DataTable } from './data-table';
import { DataTableHarness } from './data-table.harness';

interface Lane {
  readonly id: number;
  readonly name: string;
  readonly link: string;
  readonly marginDb: number | null;
}

const lanes: readonly Lane[] = [
  { id: 1, name: 'Lane 10', link: 'Uplink', marginDb: 1.5 },
  { id: 2, name: 'Lane 2', link: 'Clock', marginDb: null },
  { id: 3, name: 'Lane 1', link: 'Uplink', marginDb: -0.5 },
];
const loader = signal<Observable<readonly Lane[]>>(of(lanes));

@Component({
  imports: [Cell, DataTable],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tg-data-table
      caption="Lanes"
      emptyText="No lane yet"
      [columns]="columns"
      [source]="source"
      [rowKey]="rowKey"
      [filterBy]="filterBy"
      [groupBy]="grouped() ? groupBy : undefined"
    >
      <ng-template [tgCell]="margin" let-lane>{{ lane.marginDb ?? 'none' }}</ng-template>
    </tg-data-table>
  `,
})
class Lanes {
  readonly margin: Column<Lane> = { key: 'margin', title: 'Margin', sortBy: (lane) => lane.marginDb };
  readonly columns: readonly Column<Lane>[] = [
    { key: 'name', title: 'Name', text: (lane) => lane.name, sortBy: (lane) => lane.name },
    this.margin,
  ];
  readonly source = rxResource({ params: () => loader(), stream: ({ params }) => params });
  readonly grouped = signal(false);
  readonly rowKey = (lane: Lane) => lane.id;
  readonly filterBy = (lane: Lane) => `${lane.name} ${lane.link}`;
  readonly groupBy = (lane: Lane) => lane.link;
}

async function show(address = '/') {
  TestBed.configureTestingModule({ providers: [provideRouter([{ path: '**', component: Lanes }])] });
  const router = await RouterTestingHarness.create();
  const page = await router.navigateByUrl(address, Lanes);
  const environment = TestbedHarnessEnvironment.loader(router.fixture);
  return { page, table: await environment.getHarness(DataTableHarness) };
}

const names = async (table: DataTableHarness) => (await table.rows()).map(([name]) => name);

describe('the data table', () => {
  beforeEach(() => loader.set(of(lanes)));

  it('shows the rows as loaded, with text and templates as cells', async () => {
    const { table } = await show();
    expect(await table.rows()).toEqual([
      ['Lane 10', '1.5'],
      ['Lane 2', 'none'],
      ['Lane 1', '-0.5'],
    ]);
  });

  it('sorts names by their numbers, one way and the other', async () => {
    const { table } = await show();
    await table.sortBy('Name');
    expect(await names(table)).toEqual(['Lane 1', 'Lane 2', 'Lane 10']);
    expect(await table.sorted()).toEqual(['Name ascending']);
    await table.sortBy('Name');
    expect(await names(table)).toEqual(['Lane 10', 'Lane 2', 'Lane 1']);
  });

  it('puts what has no value last in both directions', async () => {
    const { table } = await show('/?sort=margin');
    expect(await names(table)).toEqual(['Lane 1', 'Lane 10', 'Lane 2']);
    await table.sortBy('Margin');
    expect(await names(table)).toEqual(['Lane 10', 'Lane 1', 'Lane 2']);
  });

  it('keeps sort and filter in the address', async () => {
    const { table } = await show();
    await table.sortBy('Margin');
    await table.filter('uplink');
    expect(await names(table)).toEqual(['Lane 1', 'Lane 10']);
    expect(TestBed.inject(Router).url).toBe('/?sort=margin&filter=uplink');
  });

  it('says that no row matches, and keeps the filter to undo it', async () => {
    const { table } = await show('/?filter=nowhere');
    expect(await table.state()).toContain('No row matches');
    await table.filter('lane 2');
    expect(await names(table)).toEqual(['Lane 2']);
  });

  it('groups rows under the heads in the order they were loaded', async () => {
    const { page, table } = await show();
    page.grouped.set(true);
    expect(await table.groups()).toEqual(['Uplink', 'Clock']);
    expect(await names(table)).toEqual(['Lane 10', 'Lane 1', 'Lane 2']);
  });

  it('says what would be there while nothing is', async () => {
    loader.set(of([]));
    const { table } = await show();
    expect(await table.state()).toContain('No lane yet');
  });

  it('says why the rows could not be read', async () => {
    loader.set(throwError(() => new Error('The lanes are out of reach.')));
    const { table } = await show();
    expect(await table.state()).toContain('The lanes are out of reach.');
  });
});
