import { newCopper, newDielectric, startingStackups } from '../document/starting-stackups';
import { drawnStack, spread } from './stack-scale';

describe('the stackup in scale', () => {
  it('draws every layer at its share of the height', () => {
    const { layers, heightPx } = drawnStack([
      newCopper('L1', 'signal'),
      newDielectric('D', 136e-6),
      newCopper('L2', 'plane'),
    ]);
    expect(layers[0]!.heightPx / heightPx).toBeCloseTo(0.1, 9);
    expect(layers[2]!.yPx + layers[2]!.heightPx).toBeCloseTo(heightPx, 9);
  });

  it('keeps the words of neighbours apart and inside', () => {
    const { layers, heightPx } = drawnStack(startingStackups[1]!.stackup.layers);
    const places = layers.map(({ labelPx }) => labelPx);
    places.slice(1).forEach((place, i) => expect(place - places[i]!).toBeGreaterThanOrEqual(18 - 1e-9));
    expect(places[0]).toBeGreaterThanOrEqual(9 - 1e-9);
    expect(places.at(-1)).toBeLessThanOrEqual(heightPx - 9 + 1e-9);
  });

  it('leaves words where there is room', () => {
    expect(spread([20, 60, 140], 18, 200)).toEqual([20, 60, 140]);
    expect(spread([100, 101, 102], 18, 200)).toEqual([100, 118, 136]);
    expect(spread([195, 196], 18, 200)).toEqual([173, 191]);
  });
});
