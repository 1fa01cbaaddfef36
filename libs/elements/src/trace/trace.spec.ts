import { parseChannelFile, type ElementOf, type Stackup } from '@tollgate/contracts';
import { buildElement, elementProblems, elementStanding, elementTollDb } from '../index';
import type { BuildContext } from '../types';
import { sectionOf } from './section';

const dielectric = (name: string, thicknessM: number, dk = 3.7) => ({
  kind: 'dielectric',
  name,
  thicknessM,
  dk,
  df: 0.008,
  atHz: 1e9,
  dispersion: 'constant',
});
const copper = (name: string, role: string, more = {}) => ({
  kind: 'copper',
  name,
  thicknessM: 17.5e-6,
  role,
  roughness: { model: 'none' },
  ...more,
});

/** Reads layers and elements as a channel file does, so that defaults are in place. */
function read(layers: object[], trace: object, signaling = 'single-ended') {
  const parsed = parseChannelFile({
    format: 'tollgate.channel/1',
    name: 'Trace',
    signaling,
    referenceOhm: 50,
    stackup: { temperatureC: 20, layers },
    elements: [{ kind: 'trace', layer: 'S', widthM: 0.15e-3, lengthM: 0.1, ...trace }],
    limits: [],
  });
  if (!parsed.ok) throw new Error(JSON.stringify(parsed.problems));
  const element = parsed.channel.elements[0] as ElementOf<'trace'>;
  const { stackup } = parsed.channel;
  const context: BuildContext = {
    signaling: parsed.channel.signaling,
    jointOhm: 50,
    stackup,
    parts: new Map(),
  };
  return { element, stackup: stackup as Stackup, context };
}

const half = (0.4e-3 - 17.5e-6) / 2;
const strip = [
  copper('P1', 'plane'),
  dielectric('D1', half),
  copper('S', 'signal'),
  dielectric('D2', half),
  copper('P2', 'plane'),
];
const outer = [copper('S', 'signal'), dielectric('D1', 0.1e-3), copper('P1', 'plane')];

const lossDb = (s: Float64Array, entry: number) => -20 * Math.log10(Math.hypot(s[entry]!, s[entry + 1]!));

describe('a trace', () => {
  it('of 100 mm strip line loses what formulas B8 and B9 say (3.0507 dB in 50 ohm, RL 23.80 dB)', () => {
    const { element, context } = read(strip, {});
    const built = buildElement(element, Float64Array.of(12.890625e9), context);
    expect(Math.abs(lossDb(built.s, 2) - 3.0507)).toBeLessThan(0.03);
    expect(Math.abs(lossDb(built.s, 0) - 23.8)).toBeLessThan(1.5);
    expect(built.line?.single?.z0Ohm).toBeCloseTo(54.54, 0);
    const perInch = built.line!.single!.conductorLossDbPerM[0]! * 0.0254;
    expect(Math.abs(perInch - 0.31)).toBeLessThan(0.31 * 0.04);
    expect(built.line!.single!.dielectricLossDbPerM[0]! * 0.0254).toBeCloseTo(0.4586, 3);
  });

  it('at 0 Hz is its copper alone', () => {
    const { element, context } = read(strip, {});
    const { s } = buildElement(element, Float64Array.of(0), context);
    const ohm = 0.1 / (5.8e7 * 0.15e-3 * 17.5e-6);
    expect(s[2]).toBeCloseTo(100 / (100 + ohm), 9);
    expect(s[0]).toBeCloseTo(ohm / (100 + ohm), 9);
    expect(s[3]).toBeCloseTo(0, 12);
  });

  it('has the same toll whole and in four pieces', () => {
    const frequencies = Float64Array.of(0, 1e9, 1.3e10);
    const whole = read(strip, { lengthM: 0.1 });
    const piece = read(strip, { lengthM: 0.025 });
    const one = elementTollDb(whole.element, frequencies, whole.context)!;
    const quarter = elementTollDb(piece.element, frequencies, piece.context)!;
    expect(one[2]).toBeGreaterThan(2.5);
    one.forEach((toll, k) => expect(4 * quarter[k]!).toBeCloseTo(toll, 12));
  });

  it('under its plane is the same as over it, its foot turned with it', () => {
    const below = sectionOf(read(outer, {}).stackup, read(outer, {}).element);
    const turned = [...outer].reverse().map((layer) => ({ ...layer }));
    (turned[2] as Record<string, unknown>).foilSide = 'up';
    const other = read(turned, {});
    const above = sectionOf(other.stackup, other.element);
    expect({ ...above, turned: false, planes: below.planes }).toEqual(below);
    expect(above.turned).toBe(true);
    expect(above.planes).toEqual({ above: 'P1', below: null });
  });

  it('takes a signal layer on the way to its plane as the dielectric around it', () => {
    const layers = [
      copper('S', 'signal'),
      dielectric('D1', 0.1e-3),
      copper('X', 'signal'),
      dielectric('D2', 0.2e-3, 4.2),
      copper('P1', 'plane'),
    ];
    const { element, stackup } = read(layers, {});
    const { sheets, traceAtM } = sectionOf(stackup, element);
    expect(sheets.map(({ layer, thicknessM }) => [layer, thicknessM])).toEqual([
      ['D2', 0.2e-3],
      ['D1', 17.5e-6],
      ['D1', 0.1e-3],
    ]);
    expect(traceAtM).toBeCloseTo(0.3175e-3, 12);
  });

  it('returns on the planes it names', () => {
    const { element, stackup } = read(strip, { planes: { above: null, below: 'P2' } });
    const section = sectionOf(stackup, element);
    expect(section.planes).toEqual({ above: null, below: 'P2' });
    expect(section.planeAbove).toBe(false);
  });

  it('meets no plane of the far side of the one it returns on', () => {
    const layers = [...strip, dielectric('D3', 1e-3), copper('P3', 'plane')];
    const { element, stackup } = read(layers, {});
    expect(sectionOf(stackup, element).planes).toEqual({ above: 'P1', below: 'P2' });
  });
});

describe('a pair of traces', () => {
  const pair = { gapM: 0.15e-3 };

  it('of two lengths is coupled over the shorter, and converts', () => {
    const frequencies = Float64Array.of(5e9);
    const even = read(strip, pair, 'differential');
    const skewed = read(strip, { ...pair, lengthNM: 0.105 }, 'differential');
    const a = buildElement(even.element, frequencies, even.context).s;
    const b = buildElement(skewed.element, frequencies, skewed.context).s;
    const conversion = (s: Float64Array) =>
      Math.hypot(
        s[2 * 8]! - s[2 * 8 + 2]! + s[3 * 8]! - s[3 * 8 + 2]!,
        s[2 * 8 + 1]! - s[2 * 8 + 3]! + s[3 * 8 + 1]! - s[3 * 8 + 3]!,
      ) / 2;
    expect(conversion(a)).toBeLessThan(1e-14);
    // 5 mm of n alone: sin(theta/2) of formulas A6, lessened by the loss of the line.
    const theta = (2 * Math.PI * 5e9 * 5e-3 * Math.sqrt(3.7)) / 299792458;
    const loss = 10 ** (-lossDb(a, 2 * 8) / 20);
    expect(conversion(b)).toBeGreaterThan(0.8 * Math.sin(theta / 2) * loss);
    expect(conversion(b)).toBeLessThan(1.2 * Math.sin(theta / 2));
  });

  it('along a path takes each leg from the bends', () => {
    const path = [
      [0, 0],
      [0.05, 0],
      [0.05, 0.05],
    ];
    const { element, context } = read(strip, { ...pair, lengthM: undefined, path }, 'differential');
    const { s } = buildElement(element, Float64Array.of(1e9), context);
    expect(s.every(Number.isFinite)).toBe(true);
    expect(elementTollDb(element, Float64Array.of(1e9), context)).toBeUndefined();
  });
});

describe('a trace is refused', () => {
  const problemsOf = (layers: object[], trace: object, signaling = 'single-ended') => {
    const { element, stackup, context } = read(layers, trace, signaling);
    return elementProblems(element, context.signaling, stackup);
  };

  it.each([
    ['on a layer that is not there', strip, { layer: 'L9' }, 'layer', 'it has P1, S, P2'],
    ['on a plane', strip, { layer: 'P1' }, 'layer', 'P1 is a plane'],
    [
      'without a plane, saying what was looked for',
      [copper('T', 'signal'), dielectric('D1', 1e-4), copper('S', 'signal')],
      {},
      'layer',
      'above it T (signal), below it no copper',
    ],
    [
      'with both planes put off',
      strip,
      { planes: { above: null, below: null } },
      'layer',
      'as the trace says',
    ],
    [
      'with a plane on the wrong side',
      strip,
      { planes: { above: 'P2', below: null } },
      'planes.above',
      'does not lie above',
    ],
    [
      'with a plane that is not there',
      strip,
      { planes: { above: null, below: 'Q' } },
      'planes.below',
      'no copper layer Q',
    ],
    ['straight on its plane', [copper('S', 'signal'), copper('P1', 'plane')], {}, 'layer', 'no dielectric'],
    [
      'etched away',
      [
        copper('S', 'signal', { etchAngleDeg: 20, thicknessM: 35e-6 }),
        dielectric('D1', 1e-4),
        copper('P1', 'plane'),
      ],
      { widthM: 0.1e-3 },
      'widthM',
      'has no top left',
    ],
    ['with a gap in a single-ended channel', strip, { gapM: 1e-4 }, 'gapM', 'belongs to a pair'],
  ] as const)('%s', (_, layers, trace, path, words) => {
    const [problem] = problemsOf(layers as unknown as object[], trace);
    expect(problem).toMatchObject({
      path,
      message: expect.stringContaining(words),
      mend: expect.stringMatching(/\w/),
    });
  });

  it('as a pair without a gap', () => {
    expect(problemsOf(strip, {}, 'differential')[0]).toMatchObject({ path: 'gapM' });
  });

  it('where the bends eat up a leg', () => {
    const path = Array.from({ length: 12 }, (_, k) => [
      1e-4 * Math.cos((k * Math.PI) / 6),
      1e-4 * Math.sin((k * Math.PI) / 6),
    ]);
    const trace = { lengthM: undefined, path, gapM: 0.4e-3 };
    expect(problemsOf(strip, trace, 'differential')[0]).toMatchObject({ path: 'path' });
  });
});

describe('the standing of a trace', () => {
  it('is assumed where the roughness of its copper is missing', () => {
    const layers = strip.map(({ ...layer }: Record<string, unknown>) => {
      delete layer['roughness'];
      return layer;
    });
    const { element, stackup } = read(layers, {});
    expect(elementStanding(element, stackup)).toMatchObject({ standing: 'assumed' });
  });
});

describe('a dielectric of several points', () => {
  const several = (furtherPoints: object[]) =>
    strip.map((layer) =>
      layer.kind === 'dielectric' ? { ...layer, dispersion: 'wideband-debye', furtherPoints } : layer,
    );

  it('is fitted through them', () => {
    const f = Float64Array.of(2e10);
    const points = [{ dk: 3.62, df: 0.0085, atHz: 1e10 }];
    const [one, two] = [several([]), several(points)].map((layers) => {
      const { element, context } = read(layers, {});
      return buildElement(element, f, context).line!.single!.dielectricLossDbPerM[0]!;
    });
    expect(two! / one!).toBeGreaterThan(1.02);
    expect(two! / one!).toBeLessThan(1.15);
  });

  it('is refused where no causal model goes through them', () => {
    const { element, stackup } = read(several([{ dk: 4.5, df: 0.008, atHz: 1e10 }]), {});
    expect(elementProblems(element, 'single-ended', stackup)[0]).toMatchObject({
      path: 'layer',
      message: expect.stringContaining('Debye'),
    });
  });
});
