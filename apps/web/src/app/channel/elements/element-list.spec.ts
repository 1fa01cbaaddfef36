import { provideHttpClient } from '@angular/common/http';
import { provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { parseChannelFile, type Channel } from '@tollgate/contracts';
import { ChannelStore } from '../document/channel-store';
import { CheckRunner } from '../document/check-runner';
import { ElementList } from './element-list';
import { ElementListHarness } from './element-list.harness';
import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';

function channel(change: boolean): Channel {
  const line = { kind: 'line', z0Ohm: 50, lengthM: 0.02, effectivePermittivity: 3.6 };
  const parsed = parseChannelFile({
    format: 'tollgate.channel/1',
    name: 'Lane 0',
    signaling: 'single-ended',
    elements: [{ ...line, label: 'escape' }, { kind: 'series', resistanceOhm: 2 }, line],
  });
  if (!parsed.ok) throw new Error(parsed.problems[0]?.message);
  const can = { change, uploadFiles: change };
  return {
    ...{ id: 'c1', version: 1, can, checkProblems: [], check: null },
    document: parsed.channel,
  } as unknown as Channel;
}

async function open(change = true) {
  TestBed.configureTestingModule({
    providers: [provideHttpClient(), provideHttpClientTesting(), ChannelStore, CheckRunner],
  });
  const store = TestBed.inject(ChannelStore);
  store.open(channel(change));
  const fixture = TestBed.createComponent(ElementList);
  const list = await TestbedHarnessEnvironment.harnessForFixture(fixture, ElementListHarness);
  return { store, list };
}

describe('the list of elements', () => {
  it('names each with its values, near to far', async () => {
    const { list } = await open();
    expect(await list.ids()).toEqual(['L1', 'S1', 'L2']);
    expect(await list.textOf('L1')).toContain('escape');
    expect(await list.textOf('S1')).toContain('2 ohm');
  });

  it('selects by a press and walks by the arrows', async () => {
    const { store, list } = await open();
    await list.press('S1');
    expect(store.selectedId()).toBe('S1');
    await list.key('S1', 'ArrowDown');
    expect(store.selectedId()).toBe('L2');
  });

  it('moves an element by Alt and an arrow; undo brings it back', async () => {
    const { store, list } = await open();
    await list.key('L1', 'ArrowDown', true);
    expect(await list.ids()).toEqual(['S1', 'L1', 'L2']);
    store.undo();
    expect(await list.ids()).toEqual(['L1', 'S1', 'L2']);
  });

  it('duplicates and removes the selected element', async () => {
    const { list } = await open();
    await list.tool('Duplicate L1');
    expect(await list.ids()).toEqual(['L1', 'L3', 'S1', 'L2']);
    await list.tool('Remove L3');
    expect(await list.ids()).toEqual(['L1', 'S1', 'L2']);
  });

  it('offers nothing that changes to who may only read', async () => {
    const { list } = await open(false);
    expect(await list.tools()).toEqual([]);
    await list.key('L1', 'ArrowDown', true);
    expect(await list.ids()).toEqual(['L1', 'S1', 'L2']);
  });
});
