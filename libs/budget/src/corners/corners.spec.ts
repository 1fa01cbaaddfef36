import type { CompleteChannel } from '@tollgate/contracts';
import { checkChannel, readChannel, toResponse, toView } from '../index';

const half = 0.19e-3;
const dielectric = (name: string, more = {}) => ({
  ...{
    kind: 'dielectric',
    name,
    thicknessM: half,
    dk: 3.7,
    df: 0.008,
    atHz: 1e9,
    dispersion: 'wideband-debye',
  },
  ...more,
});
const copper = (name: string, role: string, more = {}) => ({
  ...{ kind: 'copper', name, thicknessM: 17.5e-6, role, roughness: { model: 'none' } },
  ...more,
});

function channel(layers: object[], limitDb: number, more = {}): CompleteChannel {
  const read = readChannel({
    format: 'tollgate.channel/1',
    name: 'Corner',
    signaling: 'single-ended',
    referenceOhm: 50,
    grid: { startHz: 1e8, stopHz: 1.4e10, points: 100, spacing: 'linear' },
    stackup: { temperatureC: 20, layers },
    elements: [{ kind: 'trace', layer: 'S', widthM: 0.15e-3, lengthM: 0.1, ...more }],
    limits: [
      {
        ...{ id: 'il', title: 'Loss', quantity: 'insertion-loss', sense: 'max' },
        points: [
          [1e9, limitDb],
          [1.2e10, limitDb],
        ],
        interpolation: 'linear',
      },
    ],
  });
  if (!read.ok) throw new Error(JSON.stringify(read.problems));
  return read.channel;
}

function checked(of: CompleteChannel) {
  const result = checkChannel(of, new Map());
  if (!result.ok) throw new Error(JSON.stringify(result.problems));
  return result.check;
}

const firm = [
  copper('P1', 'plane'),
  dielectric('D1'),
  copper('S', 'signal'),
  dielectric('D2'),
  copper('P2', 'plane'),
];
const loose = [
  copper('P1', 'plane'),
  dielectric('D1', { dfTolerance: 0.002, thicknessToleranceM: 5e-6 }),
  copper('S', 'signal', { widthToleranceM: 10e-6 }),
  dielectric('D2', { dfTolerance: 0.0005, dkTolerance: 0.1 }),
  copper('P2', 'plane'),
];

describe('a channel whose stackup has no tolerances', () => {
  it('has a nominal verdict', () => {
    const [limit] = toResponse(checked(channel(firm, 3.5)), '').limits;
    expect(limit!.verdict).toBe('holds');
    expect(limit!.corner).toBeUndefined();
  });
});

describe('a channel whose stackup has tolerances', () => {
  const nominalDb = 3.5 - checked(channel(firm, 3.5)).limits[0]!.judgement.worstRefined!.marginDb!;

  it('is judged at its worst corner, which is what it would be were the board made so', () => {
    const { judgement } = checked(channel(loose, nominalDb + 0.1)).limits[0]!;
    const made = [
      copper('P1', 'plane'),
      dielectric('D1', { df: 0.01, thicknessM: half - 5e-6 }),
      copper('S', 'signal'),
      dielectric('D2', { df: 0.0085, dk: 3.8 }),
      copper('P2', 'plane'),
    ];
    const there = checked(channel(made, nominalDb + 0.1, { widthM: 0.14e-3 })).limits[0]!.judgement;
    expect(judgement.worstRefined!.marginDb).toBeCloseTo(0.1, 4);
    expect(judgement).toMatchObject({ verdict: 'exceeds', holds: false, corner: { name: 'most-loss' } });
    expect(judgement.corner!.marginDb!).toBeCloseTo(there.worstRefined!.marginDb!, 6);
    expect(judgement.corner!.frequencyHz).toBeCloseTo(there.worstRefined!.frequencyHz, -3);
  });

  it('names the tolerance that takes most of the margin', () => {
    expect(checked(channel(loose, 3.5)).limits[0]!.judgement.corner!.drivenBy).toBe('df of D1');
  });

  it('holds where its worst corner does, and tells that corner as its worst margin', () => {
    const check = checked(channel(loose, 6));
    expect(check.limits[0]!.judgement).toMatchObject({ verdict: 'holds', corner: { name: 'most-loss' } });
    expect(toView(check, '').worstMarginDb).toBe(check.limits[0]!.judgement.corner!.marginDb);
  });

  it('says the same, whatever a layer that nothing meets may do', () => {
    const above = [dielectric('D0', { dfTolerance: 0.01 }), ...loose];
    const [one, other] = [loose, above].map((layers) =>
      checked(channel([copper('L0', 'plane'), ...layers], 3.5)),
    );
    expect(one!.limits[0]!.judgement.corner!.marginDb).toBe(other!.limits[0]!.judgement.corner!.marginDb);
  });
});
