import { buildElement, elementDelayS, elementStanding } from '../index';
import { pairOfModes } from '../legs';
import { buildVia, viaDelayS, viaFacts, viaNotchHz, viaStanding } from './index';
import { modelVia, type ViaModel } from './model';
import { scatterOf } from './scatter';
import { contextOf, copper, eightLayers, farthest, laminate, thinBoard, via } from './testing/boards';

const c0 = 299_792_458;
const decibels = (s: Float64Array, at: number): number => -20 * Math.log10(Math.hypot(s[at]!, s[at + 1]!));

/** Lossless, to set against closed forms. */
const lossless = (model: ViaModel): ViaModel => ({ ...model, conductivitySPerM: 1e30 });

describe('the notch of a stub', () => {
  // Formula C3: c0/(4 L sqrt(Dk)); the board's copper is 1 nm thin, the stub runs from L3 to the outer face of L5.
  it.each([
    [1.5e-3, 4, 24.983e9],
    [1.0e-3, 3.7, 38.964e9],
    [0.25e-3, 3.7, 155.85e9],
  ])('of %d m in Dk %d stands at %d Hz without pads', (stubM, dk, notchHz) => {
    const board = thinBoard(dk, [2e-4, 2e-4, stubM / 2, stubM / 2]);
    const found = viaNotchHz(via(), contextOf(board))!;
    expect(Math.abs(found / notchHz - 1)).toBeLessThan(5e-4);
    expect(viaFacts(via(), 'single-ended', board)).toMatchObject({ notchHz: found, validToHz: found / 2 });
  });

  it('is the least |S21| of the model itself, on any grid', () => {
    const fields = via({ padM: 0.45e-3 });
    const notchHz = viaNotchHz(fields, contextOf(eightLayers))!;
    const frequenciesHz = Float64Array.from({ length: 801 }, (_, k) => notchHz * (0.6 + k / 1000));
    const { s } = buildVia(fields, frequenciesHz, contextOf(eightLayers));
    const losses = frequenciesHz.map((_, k) => decibels(s, k * 8 + 4));
    expect(losses.indexOf(Math.max(...losses))).toBe(400);
  });

  it('comes lower with pads than the laminate alone would put it', () => {
    const bare = viaNotchHz(via(), contextOf(eightLayers))!;
    const padded = viaNotchHz(via({ padM: 0.45e-3 }), contextOf(eightLayers))!;
    expect(padded).toBeLessThan(0.9 * bare);
  });

  it('goes up as the barrel is drilled back, and counts half the copper of the signal layer', () => {
    const drilledBack = via({ backdrill: { bottomResidualM: 0.2e-3 } });
    const { stubs, notchHz } = viaFacts(drilledBack, 'single-ended', eightLayers);
    expect(stubs.aboveM).toBe(0);
    expect(stubs.belowM).toBeCloseTo(0.2e-3 + 9e-6, 12);
    expect(notchHz).toBeGreaterThan(3 * viaNotchHz(via(), contextOf(eightLayers))!);
  });

  it('is none where the via has no stub', () => {
    const through = via({ toLayer: 'L8' });
    expect(viaFacts(through, 'single-ended', eightLayers)).toMatchObject({
      notchHz: null,
      validToHz: null,
      stubs: { aboveM: 0, belowM: 0 },
    });
  });

  it('warns of what lies above half of it, and names the frequency', () => {
    const context = contextOf(thinBoard(4, [2e-4, 2e-4, 7.5e-4, 7.5e-4]));
    const [warning] = buildVia(via(), Float64Array.of(1e9, 13e9), context).warnings;
    expect(warning).toContain('12.49 GHz');
    expect(warning).toContain('out of range');
    expect(buildVia(via(), Float64Array.of(1e9, 12e9), context).warnings).toEqual([]);
  });

  it('is that of SDD21 for a pair', () => {
    const pair = via({ pitchM: 0.6e-3, padM: 0.45e-3 });
    const notchHz = viaNotchHz(pair, contextOf(eightLayers, 'differential'))!;
    const model = modelVia(pair, 'differential', eightLayers);
    const at = (frequencyHz: number): number => {
      const s = scatterOf(model, Float64Array.of(frequencyHz), 50);
      return Math.hypot(s[16]! - s[18]!, s[17]! - s[19]!);
    };
    expect(at(notchHz)).toBeLessThan(at(notchHz * 0.999));
    expect(at(notchHz)).toBeLessThan(at(notchHz * 1.001));
  });
});

describe('a via without stub', () => {
  const board = thinBoard(3.8, [1e-4, 1e-4, 1e-4, 1e-4]);
  const straight = via({ toLayer: 'L5' });

  it('is the coaxial line of formula C2', () => {
    const { sections } = viaFacts(straight, 'single-ended', board);
    // C2 rounds eta0/(2 pi) = 59.958 ohm to 60, so its 35.801 ohm stands 0.07 percent high.
    for (const { z0Ohm } of sections) expect(Math.abs(z0Ohm! / 35.801 - 1)).toBeLessThan(1e-3);
    for (const { z0Ohm } of sections) expect(z0Ohm).toBeCloseTo(35.801 * (59.9585 / 60), 3);
  });

  it('has the delay of its length', () => {
    const delayS = (4e-4 + 5e-9) * (Math.sqrt(3.8) / c0);
    expect(viaDelayS(straight, contextOf(board))).toBeCloseTo(delayS, 18);
    expect(elementDelayS(straight, contextOf(board))).toBeCloseTo(delayS, 18);
  });

  it('is nothing but the resistance of its wall at 0 Hz', () => {
    const { s } = buildVia(straight, Float64Array.of(0), contextOf(board));
    // Plating of 25 um on a drill of 0.25 mm, 1e9 S/m: R l = l/(sigma pi t (d - t)); S11 = r/(2 + r).
    const r = (4e-4 + 5e-9) / (1e9 * Math.PI * 25e-6 * 225e-6) / 50;
    expect(s[0]).toBeCloseTo(r / (2 + r), 12);
    expect(s[2]).toBeCloseTo(2 / (2 + r), 12);
    expect([s[1], s[3]]).toEqual([0, 0]);
  });

  it('tends to a through as it gets short', () => {
    const size = [1e-4, 1e-5, 1e-6].map((gapM) => {
      const { s } = buildVia(
        straight,
        Float64Array.of(2e10),
        contextOf(thinBoard(4, [gapM, gapM, gapM, gapM])),
      );
      return Math.max(Math.hypot(s[0]!, s[1]!), Math.hypot(1 - s[2]!, s[3]!));
    });
    expect(size[1]).toBeLessThan(0.11 * size[0]!);
    expect(size[2]).toBeLessThan(0.11 * size[1]!);
    expect(size[2]).toBeLessThan(4e-3);
  });

  it('becomes a series inductance as the antipad grows wide', () => {
    const wide = via({ toLayer: 'L5', antipadM: 0.5 });
    const model = lossless(modelVia(wide, 'single-ended', board));
    const s = scatterOf(model, Float64Array.of(1e9), 50);
    const reactance = 2 * Math.PI * 1e9 * 2e-7 * Math.log(0.5 / 0.25e-3) * (4e-4 + 5e-9);
    // S11 = j x/(2 + j x), with x = w L/R.
    const x = reactance / 50;
    expect(s[0]).toBeCloseTo((x * x) / (4 + x * x), 4);
    expect(s[1]! / ((2 * x) / (4 + x * x))).toBeCloseTo(1, 1);
  });

  it('is the same upward with its ends exchanged', () => {
    const down = buildVia(
      via({ fromLayer: 'L3', toLayer: 'L6' }),
      Float64Array.of(7e9),
      contextOf(eightLayers),
    ).s;
    const up = buildVia(
      via({ fromLayer: 'L6', toLayer: 'L3' }),
      Float64Array.of(7e9),
      contextOf(eightLayers),
    ).s;
    const turned = Float64Array.of(...up.slice(6, 8), ...up.slice(2, 6), ...up.slice(0, 2));
    expect(farthest(down, turned)).toBeLessThan(1e-14);
  });
});

describe('singular points', () => {
  /** Stub of one dielectric, quarter wave at 1/(4 T). */
  const board = thinBoard(4, [2e-4, 2e-4, 7.5e-4, 7.5e-4]);
  const model = lossless(modelVia(via(), 'single-ended', board));
  const quarterHz = c0 / (4 * 2 * (7.5e-4 * 2 + 2.5e-9));

  it('a quarter-wave stub shorts the node', () => {
    const s = scatterOf(model, Float64Array.of(quarterHz), 50);
    expect(decibels(s, 4)).toBeGreaterThan(200);
    expect(Math.hypot(s[0]!, s[1]!)).toBeCloseTo(1, 12);
    expect(s[6]).toBeCloseTo(-1, 12);
  });

  it('a half-wave stub is not there', () => {
    const without = lossless(modelVia(via({ backdrill: { bottomResidualM: 0 } }), 'single-ended', board));
    const at = Float64Array.of(2 * quarterHz);
    expect(farthest(scatterOf(model, at, 50), scatterOf(without, at, 50))).toBeLessThan(1e-4);
  });

  it('formula C3 well below the notch: 50 ohm, 46.438 degrees, 1.0599 dB', () => {
    const ratio = Math.exp((50 * 2) / 59.9584916);
    const stub = via({ fromLayer: 'L2', toLayer: 'L3', antipadM: 0.25e-3 * ratio, barrel: ['L2', 'L5'] });
    const short = thinBoard(4, [1e-4, 1e-9, 7.5e-4, 7.5e-4]);
    const s = scatterOf(lossless(modelVia(stub, 'single-ended', short)), Float64Array.of(12.890625e9), 50);
    expect(decibels(s, 4)).toBeCloseTo(1.0599, 3);
    expect(decibels(s, 0)).toBeCloseTo(6.6442, 3);
  });
});

describe('a pair', () => {
  it('with its legs far apart is two single vias', () => {
    const at = Float64Array.of(0, 1e8, 5e9, 1.2e10);
    const alone = buildVia(via({ padM: 0.45e-3 }), at, contextOf(eightLayers)).s;
    const pair = buildVia(via({ padM: 0.45e-3, pitchM: 2e-3 }), at, contextOf(eightLayers, 'differential')).s;
    expect(farthest(pair, pairOfModes(alone, alone, at.length))).toBeLessThan(1e-14);
  });

  it('with a return via beside each leg tends to two single ones as the pitch grows', () => {
    const at = Float64Array.of(5e9);
    const one = buildVia(via({ returnVias: [[0.7e-3, 0]] }), at, contextOf(eightLayers)).s;
    const apart = [5e-3, 50e-3].map((pitchM) => {
      const returnVias = [
        [-pitchM / 2 - 0.7e-3, 0],
        [pitchM / 2 + 0.7e-3, 0],
      ] as [number, number][];
      const { s } = buildVia(via({ pitchM, returnVias }), at, contextOf(eightLayers, 'differential'));
      return farthest(s, pairOfModes(one, one, 1));
    });
    // All returns are joined by the planes, so what the far leg takes falls as the logarithm of its distance only.
    expect(apart[0]).toBeLessThan(0.02);
    expect(apart[1]! / apart[0]!).toBeCloseTo(Math.log(5 / 0.5) / Math.log(50 / 0.5), 1);
  });

  it('has its odd mode below its even one where the legs see each other', () => {
    const { sections } = viaFacts(via({ pitchM: 0.6e-3 }), 'differential', eightLayers);
    for (const { evenZ0Ohm, oddZ0Ohm } of sections) expect(oddZ0Ohm).toBeLessThan(evenZ0Ohm!);
  });

  it('turns differential into common only where the return vias favour one leg', () => {
    const conversion = (returnVias: [number, number][]): number => {
      const fields = via({ pitchM: 1e-3, returnVias });
      const { s } = buildVia(fields, Float64Array.of(1e10), contextOf(eightLayers, 'differential'));
      // SCD21 = (S31 - S32 + S41 - S42)/2 (formula A6).
      const part = (k: number): number => (s[16 + k]! - s[18 + k]! + s[24 + k]! - s[26 + k]!) / 2;
      return Math.hypot(part(0), part(1));
    };
    const mirrored = conversion([
      [-1.1e-3, 0],
      [1.1e-3, 0],
    ]);
    expect(mirrored).toBeLessThan(1e-14);
    expect(conversion([[1.1e-3, 0]])).toBeGreaterThan(1e-3);
  });
});

describe('standing', () => {
  it('is estimated for a single via and for a pair with named return vias, assumed for a pair without', () => {
    const standing = (fields: Parameters<typeof via>[0]) =>
      elementStanding(via(fields), eightLayers).standing;
    expect(standing({})).toBe('estimated');
    expect(standing({ returnVias: [[1e-3, 0]] })).toBe('estimated');
    expect(standing({ pitchM: 1e-3 })).toBe('assumed');
    expect(standing({ pitchM: 1e-3, returnVias: [[1.2e-3, 0]] })).toBe('estimated');
  });

  it('says why, and is assumed where the via cannot be built', () => {
    expect(viaStanding(via(), 'single-ended', eightLayers).reason).toContain('antipads');
    expect(viaStanding(via({ toLayer: 'L9' }), 'single-ended', eightLayers)).toMatchObject({
      standing: 'assumed',
      reason: expect.stringContaining('L9') as string,
    });
  });
});

describe('sections', () => {
  it('cross each layer by its own thickness, inner copper of the signal layer by half', () => {
    const { sections, throughM, stubs } = viaFacts(via(), 'single-ended', eightLayers);
    const through = sections.filter(({ part }) => part === 'through');
    expect(through.map(({ layer }) => layer)).toEqual(['L1', 'P1', 'L2', 'C1', 'L3']);
    expect(through.map(({ lengthM }) => lengthM * 1e6)).toEqual(
      [45, 100, 18, 150, 9].map((um) => expect.closeTo(um, 6) as number),
    );
    expect(throughM).toBeCloseTo(322e-6, 12);
    expect(stubs.belowM).toBeCloseTo(
      9e-6 + (180 + 35 + 400 + 35 + 180 + 18 + 150 + 18 + 100 + 45) * 1e-6,
      12,
    );
  });

  it('of a plane lie in the dielectric of the side away from its foot', () => {
    const { sections } = viaFacts(via(), 'single-ended', eightLayers);
    const permittivity = (name: string) => sections.find(({ layer }) => layer === name)!.permittivity;
    expect(permittivity('L2')).toBe(3.6);
    expect(permittivity('L5')).toBe(3.8);
  });

  it('of an outer plane lie in the solder mask, or in air', () => {
    const layers = [copper('T', 'plane'), laminate('D', 2e-4, 4), copper('B', 'signal')];
    const ends = via({ fromLayer: 'T', toLayer: 'B' });
    const of = (board: typeof layers) =>
      viaFacts(ends, 'single-ended', { layers: board }).sections[0]!.permittivity;
    expect(of(layers)).toBe(1);
    expect(
      of([{ ...laminate('mask', 2e-5, 3.3), kind: 'soldermask' } as (typeof layers)[0], ...layers]),
    ).toBe(3.3);
  });

  it('are wider at a pad, by layer where sizes are given by layer', () => {
    const { sections } = viaFacts(via({ padM: { L1: 0.5e-3, L3: 0 } }), 'single-ended', eightLayers);
    expect(sections.filter(({ what }) => what === 'pad').map(({ layer }) => layer)).toEqual(['L1']);
  });

  it('of a blind via end in the middle of its last copper', () => {
    const blind = via({ toLayer: 'L2', barrel: ['L1', 'L2'], padM: { L1: 0.5e-3, L2: 0.5e-3 } });
    const { throughM, stubs, sections } = viaFacts(blind, 'single-ended', eightLayers);
    expect(throughM).toBeCloseTo(154e-6, 12);
    expect(stubs).toEqual({ aboveM: 0, belowM: 0 });
    expect(sections.map(({ layer }) => layer)).toEqual(['L1', 'P1', 'L2']);
  });

  it('of a via on two layers return on the clearances given', () => {
    const twoLayers = {
      layers: [copper('T', 'signal'), laminate('D', 1.5e-3, 4.2, 0.02), copper('B', 'signal')],
    };
    const { sections } = viaFacts(via({ fromLayer: 'T', toLayer: 'B' }), 'single-ended', twoLayers);
    expect(sections[1]!.z0Ohm).toBeCloseTo((59.9585 / Math.sqrt(4.2)) * Math.log(0.8 / 0.25), 2);
  });

  it('between planes stand against the named return vias: one is a two-wire line', () => {
    const near = via({ returnVias: [[1e-3, 0]] });
    const { sections } = viaFacts(near, 'single-ended', eightLayers);
    const between = sections.find(({ layer }) => layer === 'C1')!;
    expect(between.z0Ohm).toBeCloseTo(((2 * 59.9585) / Math.sqrt(3.8)) * Math.acosh(4), 2);
    expect(sections.find(({ layer }) => layer === 'L2')!.z0Ohm).toBeCloseTo(
      (59.9585 / Math.sqrt(3.6)) * Math.log(3.2),
      2,
    );
  });
});

it('a via stands in a channel of elements', () => {
  const at = Float64Array.of(1e9);
  const { s } = buildElement(via(), at, contextOf(eightLayers));
  expect(s).toEqual(buildVia(via(), at, contextOf(eightLayers)).s);
});
