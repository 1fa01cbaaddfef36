import { stackupProblems } from '@tollgate/contracts';
import { kindOf, withDuplicate, withKind, withMoved, withNew, without, withValue } from './layer-edits';
import { rowsOf, stackupOf } from './stackup-rows';
import { newCopper, newDielectric, startingStackups } from './starting-stackups';

const rows = rowsOf({ layers: [newCopper('L1', 'signal'), newDielectric('D'), newCopper('L2', 'plane')] });
const names = (stackup: typeof rows) => stackup.rows.map(({ layer }) => layer.name);

describe('the starting stackups', () => {
  it.each(startingStackups.map((start) => [start.title, start.stackup] as const))(
    '%s can be saved as they are, and name every material as assumed',
    (_title, stackup) => {
      expect(stackupProblems(stackup)).toEqual([]);
      for (const layer of stackup.layers)
        if (layer.kind !== 'copper') expect(layer.source).toContain('Assumed');
    },
  );
});

describe('a layer', () => {
  it('is added below the selected one, under a name of its own', () => {
    const { stackup, key } = withNew(withNew(rows, 'dielectric', 'layer-1').stackup, 'dielectric', 'layer-1');
    expect(names(stackup)).toEqual(['L1', 'Dielectric 2', 'Dielectric', 'D', 'L2']);
    expect(stackup.rows.find((row) => row.key === key)!.layer.name).toBe('Dielectric 2');
  });

  it('is duplicated under a name of its own, and keeps its key when it moves', () => {
    const { stackup, key } = withDuplicate(rows, 'layer-2');
    expect(names(stackup)).toEqual(['L1', 'D', 'D 2', 'L2']);
    const moved = withMoved(stackup, key, 1);
    expect(moved.rows.at(-1)!.key).toBe(key);
    expect(withMoved(moved, key, 1)).toBe(moved);
  });

  it('is removed', () => {
    expect(names(without(rows, 'layer-2'))).toEqual(['L1', 'L2']);
  });

  it('becomes another kind with its name, and its thickness where both have a Dk', () => {
    const mask = withKind(newDielectric('D', 33e-6), 'soldermask');
    expect(mask).toMatchObject({ kind: 'soldermask', name: 'D', thicknessM: 33e-6 });
    expect(kindOf(withKind(newCopper('L', 'signal'), 'plane'))).toBe('plane');
    expect(withKind(mask, 'signal')).toMatchObject({ kind: 'copper', role: 'signal', name: 'D' });
  });

  it('loses a field that is cleared', () => {
    const given = withValue(newDielectric('D'), 'dkTolerance', 0.1);
    expect(given).toHaveProperty('dkTolerance', 0.1);
    expect(withValue(given, 'dkTolerance', undefined)).not.toHaveProperty('dkTolerance');
  });

  it('survives the way to rows and back', () => {
    const { stackup } = startingStackups[1]!;
    expect(stackupOf(rowsOf(stackup))).toEqual(stackup);
  });
});
