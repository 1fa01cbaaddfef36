import type { CompleteStackup } from '@tollgate/contracts';
import { differencesOf } from './differences';
import { newCopper, newDielectric, startingStackups } from './starting-stackups';

const [four] = startingStackups;

describe('the differences of two stackups', () => {
  it('are none where they are the same', () => {
    expect(
      differencesOf(four!.stackup, JSON.parse(JSON.stringify(four!.stackup)) as CompleteStackup),
    ).toEqual([]);
  });

  it('name the layer, the value, what it was and what it is', () => {
    const layers = four!.stackup.layers.map((layer) =>
      layer.name === 'Prepreg 1-2' ? { ...layer, thicknessM: 94e-6, dkTolerance: 0.05 } : layer,
    );
    expect(differencesOf(four!.stackup, { layers })).toEqual([
      'Prepreg 1-2, thickness: 120 um, now 94 um.',
      'Prepreg 1-2, Dk tolerance: none, now 0.05.',
    ]);
  });

  it('tell layers that came and went, and another order', () => {
    const before = { layers: [newCopper('A', 'signal'), newDielectric('D'), newCopper('B', 'plane')] };
    const after = { layers: [newCopper('B', 'plane'), newDielectric('E'), newCopper('A', 'signal')] };
    expect(differencesOf(before, after)).toEqual([
      'D is gone.',
      'E is new.',
      'The order of the layers is another.',
    ]);
  });

  it('say roughness face by face', () => {
    const before = { layers: [newCopper('A', 'signal')] };
    const after = {
      layers: [{ ...newCopper('A', 'signal'), roughness: { model: 'hammerstad' as const, rqM: 0.5e-6 } }],
    };
    expect(differencesOf(before, after)).toEqual([
      'A, roughness: foot cannonball Rz 4 um, top cannonball Rz 2 um, now hammerstad Rq 0.5 um.',
    ]);
  });
});
