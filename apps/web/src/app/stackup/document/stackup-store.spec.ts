import { TestBed } from '@angular/core/testing';
import type { StackupVersion, StackupVersions } from '@tollgate/contracts';
import { withLayer, withValue } from './layer-edits';
import { StackupDrafts } from './stackup-drafts';
import { StackupStore } from './stackup-store';
import { startingStackups } from './starting-stackups';

const document = startingStackups[0]!.stackup;

function version(number: number, change: Partial<StackupVersion> = {}): StackupVersion {
  return {
    id: `version-${number}`,
    number,
    kind: 'design',
    why: '',
    layers: 9,
    copperLayers: 4,
    thicknessM: 1e-3,
    createdAt: '2026-06-01T08:00:00.000Z',
    createdBy: 'Mira',
    revisionId: 'r',
    document,
    cautions: [],
    ...change,
  };
}

function open(mayChange = true, base: StackupVersion | null = version(1)): StackupStore {
  const versions: StackupVersions = {
    items: [],
    drafts: { total: 0, following: 0, behind: 0 },
    can: { change: mayChange, use: mayChange },
  };
  const store = TestBed.inject(StackupStore);
  store.versions.set(versions);
  store.open('r', base ?? undefined);
  return store;
}

const thicken = (store: StackupStore, thicknessM: number) =>
  store.edit((rows) => withLayer(rows, 'layer-3', (layer) => withValue(layer, 'thicknessM', thicknessM)));
const third = (store: StackupStore) => store.stackup()!.layers[2]!.thicknessM;

beforeEach(() => {
  localStorage.clear();
  TestBed.configureTestingModule({ providers: [StackupStore] });
});

describe('the stackup that is edited', () => {
  it('is dirty with an edit, and clean again when it is undone', () => {
    const store = open();
    thicken(store, 94e-6);
    expect([store.dirty(), third(store)]).toEqual([true, 94e-6]);
    store.undo();
    expect([store.dirty(), store.canRedo(), third(store)]).toEqual([false, true, 120e-6]);
    store.redo();
    expect(third(store)).toBe(94e-6);
  });

  it('keeps edits in the browser until they are a version, and brings them back', () => {
    thicken(open(), 94e-6);
    expect(TestBed.inject(StackupDrafts).find('r')?.number).toBe(1);
    const again = open();
    expect(third(again)).toBe(94e-6);
    expect(again.recoveredAt()).not.toBe('');
    again.settle(version(2, { document: again.stackup()! }));
    expect(again.dirty()).toBe(false);
    expect(TestBed.inject(StackupDrafts).find('r')).toBeUndefined();
  });

  it('takes no edits where the person may not change it', () => {
    const store = open(false);
    thicken(store, 94e-6);
    expect(third(store)).toBe(120e-6);
  });

  it('says what keeps it from being saved, at its place', () => {
    const store = open();
    store.edit((rows) => withLayer(rows, 'layer-3', (layer) => withValue(layer, 'df', 0)));
    expect(store.problemAt('layers[2].df')).toContain('causal');
  });

  it('begins from nothing with what is put', () => {
    const store = open(true, null);
    expect(store.stackup()).toBeUndefined();
    store.put(document);
    expect([store.stackup(), store.dirty()]).toEqual([document, true]);
  });
});
