type Change = Record<string, unknown>;

const dielectric = (name: string, thicknessM: string) => ({
  kind: 'dielectric',
  name,
  thicknessM,
  dk: 3.6,
  df: 0.004,
  atHz: '10 GHz',
  dispersion: 'wideband-debye',
});
const copper = (name: string, role: string, foilSide = 'down') => ({
  kind: 'copper',
  name,
  thicknessM: '17.5 um',
  role,
  foilSide,
  roughness: { model: 'hammerstad', rqM: '0.4 um' },
});

/** Four layers as a person types them: signals on L1 and L3, planes on L2 and L4. `changes` are by the layer's name. */
export function stackupLayers(changes: Record<string, Change> = {}): Change[] {
  const layers = [
    copper('L1', 'signal'),
    dielectric('D1', '100 um'),
    copper('L2', 'plane'),
    dielectric('D2', '8 mil'),
    copper('L3', 'signal', 'up'),
    dielectric('D3', '8 mil'),
    copper('L4', 'plane', 'up'),
  ];
  return layers.map((layer) => ({ ...layer, ...changes[layer.name] }));
}
