import { channelResponse } from '@tollgate/contracts';
import { checkDocument } from '../reference/load';
import { toResponse } from './index';

const copper = (name: string, role: string) => ({
  ...{ kind: 'copper', name, role, thicknessM: 17.5e-6, roughness: { model: 'none' } },
});
const dielectric = (name: string) => ({
  ...{ kind: 'dielectric', name, thicknessM: 150e-6, dk: 3.6, df: 0.02, atHz: 1e9, dispersion: 'constant' },
});
const layers = [
  copper('P1', 'plane'),
  dielectric('D1'),
  copper('S', 'signal'),
  dielectric('D2'),
  copper('P2', 'plane'),
];

function respond(signaling: string, trace: object) {
  const check = checkDocument({
    ...{ format: 'tollgate.channel/1', name: 'Traces', signaling, referenceOhm: 50 },
    stackup: { temperatureC: 20, layers },
    grid: { frequenciesHz: [1e9, 1e10] },
    elements: [{ kind: 'trace', layer: 'S', lengthM: 0.1, ...trace }],
    limits: [],
  });
  return channelResponse.parse(JSON.parse(JSON.stringify(toResponse(check, ''))));
}

describe('the response of a channel with traces', () => {
  it('tells a single trace as finite elements have it (52.918 ohm, 12.850 and 34.540 dB/m at 10 GHz)', () => {
    const { lines, models } = respond('single-ended', { widthM: 125e-6 });
    const single = lines[0]!.modes.single!;
    expect(lines[0]!.element).toBe('T1');
    expect(single.z0Ohm).toBeCloseTo(52.918, 1);
    expect(single.effectivePermittivity).toBeCloseTo(3.6, 6);
    expect(single.conductorLossDbPerM[1]! / 12.8504).toBeCloseTo(1, 1);
    expect(single.dielectricLossDbPerM[1]! / 34.54).toBeCloseTo(1, 4);
    expect(models).toEqual([expect.objectContaining({ kind: 'trace', element: 'T1' })]);
  });

  it('tells a pair by its even and odd mode (64.221 and 51.945 ohm)', () => {
    const { modes } = respond('differential', { widthM: 100e-6, gapM: 150e-6 }).lines[0]!;
    expect(modes.even!.z0Ohm).toBeCloseTo(64.221, 1);
    expect(modes.odd!.z0Ohm).toBeCloseTo(51.945, 1);
    expect(modes.single).toBeUndefined();
  });
});
