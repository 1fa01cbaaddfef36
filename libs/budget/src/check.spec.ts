import {
  canonicalBytes,
  CheckAbandoned,
  checkChannel,
  createCheckCache,
  readChannel,
  toResponse,
  toView,
  type Check,
  type CheckCache,
  type Part,
} from '@tollgate/budget';
import { readTouchstone } from '@tollgate/touchstone';

const line = { kind: 'line', z0Ohm: 50, lengthM: 0.1, effectivePermittivity: 4, lossSqrtDbPerM: 5 };
const loss = { id: 'loss', title: 'Loss', quantity: 'insertion-loss', sense: 'max' };
const grid = { startHz: 1e9, stopHz: 1e10, points: 19 };

function channelOf(more: object): object {
  return {
    format: 'tollgate.channel/1',
    name: 'Test',
    signaling: 'single-ended',
    elements: [line],
    grid,
    ...more,
  };
}

function check(document: object, parts: Record<string, Part> = {}, cache?: CheckCache): Check {
  const result = attempt(document, parts, cache);
  if (!result.ok) throw new Error(JSON.stringify(result.problems));
  return result.check;
}

function attempt(document: object, parts: Record<string, Part> = {}, cache?: CheckCache) {
  const read = readChannel(document);
  if (!read.ok) throw new Error(JSON.stringify(read.problems));
  return checkChannel(read.channel, new Map(Object.entries(parts)), { cache });
}

/** A matched part with 0.5 dB loss, from and to in GHz. */
function part(name: string, fromGhz: number, toGhz: number): Part {
  const through = 10 ** (-0.5 / 20);
  const rows = Array.from({ length: 41 }, (_, k) => {
    const f = fromGhz + ((toGhz - fromGhz) * k) / 40;
    return `${f} 0 0 ${through} 0 ${through} 0 0 0`;
  });
  const bytes = new TextEncoder().encode(['# GHz S RI R 50', ...rows].join('\n'));
  return { sha256: name.padEnd(64, '0'), file: readTouchstone(name, bytes) };
}

describe('a limit the channel cannot answer for', () => {
  const document = channelOf({
    elements: [line, { kind: 'touchstone', file: 'a.s2p' }],
    limits: [{ ...loss, segments: [{ fromHz: 1e9, toHz: 1e10, formula: '20' }] }],
  });

  it('is not judged, names the range that is missing, and keeps curves over what is covered', () => {
    const view = toView(check(document, { 'a.s2p': part('a.s2p', 0.5, 6) }), '');
    expect(view.verdict).toBe('not-judged');
    expect(view.limits[0]!.missingHz).toEqual([[6e9, 1e10]]);
    expect(view.limits[0]!.reason).toContain('6 GHz to 10 GHz');
    expect(view.frequenciesHz.at(-1)).toBe(6e9);
    expect(view.curves.insertionLossDb.length).toBe(view.frequenciesHz.length);
    expect(view.limits[0]!.worstRefined!.marginDb).toBeCloseTo(20 - 0.5 - 0.5 * Math.sqrt(6), 3);
    expect(view.worstMarginDb).toBeNull();
  });

  it('refuses parts without a common band, naming both', () => {
    const elements = [
      { kind: 'touchstone', file: 'a.s2p' },
      { kind: 'touchstone', file: 'b.s2p' },
    ];
    const parts = { 'a.s2p': part('a.s2p', 1, 2), 'b.s2p': part('b.s2p', 3, 4) };
    const result = attempt(channelOf({ elements }), parts);
    expect(!result.ok && result.problems[0]!.path).toBe('elements');
    expect(!result.ok && result.problems[0]!.message).toMatch(/a\.s2p.*2 GHz.*b\.s2p.*3 GHz/);
  });

  it('refuses a part that is not at hand, by its path', () => {
    const result = attempt(document);
    expect(!result.ok && result.problems.map(({ path }) => path)).toEqual(['elements[1].file']);
  });
});

describe('the verdict', () => {
  const at = (db: number, quantity = 'insertion-loss') => ({
    title: `${db}`,
    quantity,
    sense: 'max',
    atHz: 5e9,
    db,
  });
  const verdictOf = (limits: object[], more: object = {}) =>
    toView(check(channelOf({ limits, ...more })), '').verdict;

  it('exceeds where one limit does, whatever the others', () => {
    expect(verdictOf([at(9), at(0.5)])).toBe('exceeds');
    expect(verdictOf([at(9), at(0.5), { ...at(9), from: 'A' }], { from: 'B' })).toBe('exceeds');
  });

  it('is not judged without a limit or where one could not be', () => {
    expect(verdictOf([])).toBe('not-judged');
    expect(verdictOf([at(9), { ...at(9), from: 'A' }], { from: 'B' })).toBe('not-judged');
  });

  it('holds where all do, and names the least margin', () => {
    const view = toView(check(channelOf({ limits: [at(9), at(3)] })), '');
    expect(view.verdict).toBe('holds');
    expect(view.worstMarginDb).toBeCloseTo(3 - 0.5 * Math.sqrt(5), 6);
    expect(view.worstLimitId).toBe(view.limits[1]!.id);
  });
});

describe('the cascade', () => {
  it('is the same whether both legs are computed or one', () => {
    const legs = [
      { ...line, z0Ohm: 43 },
      { kind: 'shunt', capacitanceF: 2e-13 },
      { ...line, z0Ohm: 61, lengthM: 0.02 },
    ];
    const neutral = { kind: 'pair-shunt', capacitanceF: 0, mutualCapacitanceF: 0 };
    const one = check(
      channelOf({ signaling: 'differential', referenceOhm: [45, 45, [55, 3], [55, 3]], elements: legs }),
    );
    const both = check(
      channelOf({
        signaling: 'differential',
        referenceOhm: [45, 45, [55, 3], [55, 3]],
        elements: [...legs, neutral],
      }),
    );
    const worst = one.network.s.reduce((w, value, k) => Math.max(w, Math.abs(value - both.network.s[k]!)), 0);
    expect(worst).toBeLessThan(1e-12);
    expect(toResponse(one, '').mixedModeReferenceOhm).toEqual([
      [90, 0],
      [110, 6],
      [22.5, 0],
      [27.5, 1.5],
    ]);
  });

  it('comes out alike with a cache that knows all but one element', () => {
    const cache = createCheckCache();
    const limits = [{ ...loss, atHz: 5e9, db: 3 }];
    const before = channelOf({ elements: [line, { ...line, z0Ohm: 60 }], limits });
    const after = channelOf({ elements: [line, { ...line, z0Ohm: 40 }], limits });
    check(before, {}, cache);
    expect(toResponse(check(after, {}, cache), '')).toEqual(toResponse(check(after), ''));
  });

  it('shows no transmission as null', () => {
    const elements = [line, { kind: 'series', capacitanceF: 1e-12 }];
    const view = toView(check(channelOf({ elements, grid: { frequenciesHz: [0, 1e9] } })), '');
    expect(view.curves.insertionLossDb[0]).toBeNull();
    expect(view.curves.insertionLossDb[1]).toBeGreaterThan(0);
  });
});

describe('the grid', () => {
  const gridOf = (more: object) => toView(check(channelOf({ grid: undefined, ...more })), '').frequenciesHz;

  it('runs from the lowest start of the limits to the highest end and Nyquist, in steps of 10 MHz at most', () => {
    const short = [{ ...line, lengthM: 0.001 }];
    const limits = [{ ...loss, segments: [{ fromHz: 5e7, toHz: 1e9, formula: '9' }] }];
    const frequencies = gridOf({ elements: short, limits, symbolRateBd: 4e9 });
    expect([frequencies[0], frequencies.at(-1), frequencies.length]).toEqual([5e7, 2e9, 196]);
  });

  it('takes a step of a sixteenth of the turn over the delay where that is smaller', () => {
    const frequencies = gridOf({ elements: [{ ...line, lengthM: 3 }], symbolRateBd: 4e9 });
    const delayS = (3 * 2) / 299792458;
    expect(frequencies[1]! - frequencies[0]!).toBeLessThanOrEqual(1 / (16 * delayS));
    expect(frequencies[1]! - frequencies[0]!).toBeGreaterThan(0.99 / (16 * delayS));
  });

  it('runs from 10 MHz to 20 GHz without limits and symbol rate', () => {
    const frequencies = gridOf({ elements: [{ ...line, lengthM: 0.01 }] });
    expect([frequencies[0], frequencies.at(-1), frequencies.length]).toEqual([1e7, 2e10, 2000]);
  });

  it('warns where a given grid is coarser', () => {
    expect(check(channelOf({})).warnings.map(({ path }) => path)).toContain('grid');
    const fine = { startHz: 1e9, stopHz: 2e9, points: 201 };
    expect(check(channelOf({ grid: fine })).warnings.map(({ path }) => path)).not.toContain('grid');
  });
});

describe('the canonical bytes', () => {
  const text = (document: object, parts: Record<string, { sha256: string }> = {}): string => {
    const read = readChannel(document);
    if (!read.ok) throw new Error(JSON.stringify(read.problems));
    return new TextDecoder().decode(canonicalBytes(read.channel, new Map(Object.entries(parts))));
  };

  it('do not change with names, labels, notes, places on the plan, or the way a length is written', () => {
    const decorated = {
      ...line,
      lengthM: '100 mm',
      label: 'To the connector',
      notes: 'Kept short',
      plan: { xM: 0.01, yM: 0.02 },
    };
    expect(text(channelOf({ name: 'Other', notes: 'x', elements: [decorated] }))).toBe(text(channelOf({})));
  });

  it('change with a value, an id, and the bytes of a part, but not with where the part lies', () => {
    expect(text(channelOf({ elements: [{ ...line, z0Ohm: 51 }] }))).not.toBe(text(channelOf({})));
    expect(text(channelOf({ elements: [{ ...line, id: 'A' }] }))).not.toBe(text(channelOf({})));
    const id = '7d9a2a1e-6f53-4a83-9d42-1f0c1a8f9e11';
    const file = channelOf({ elements: [{ kind: 'touchstone', file: 'a.s2p' }] });
    const fileId = channelOf({ elements: [{ kind: 'touchstone', fileId: id }] });
    expect(text(file, { 'a.s2p': { sha256: 'aa' } })).toBe(text(fileId, { [id]: { sha256: 'aa' } }));
    expect(text(file, { 'a.s2p': { sha256: 'bb' } })).not.toBe(text(fileId, { [id]: { sha256: 'aa' } }));
  });
});

describe('a check that is no longer wanted', () => {
  it('ends before the next element, and is whole again when asked anew', () => {
    const read = readChannel(channelOf({ elements: [line, line, line] }));
    if (!read.ok) throw new Error(JSON.stringify(read.problems));
    let asked = 0;
    const abandoned = () => ++asked > 2;
    expect(() => checkChannel(read.channel, new Map(), { abandoned })).toThrow(CheckAbandoned);
    expect(asked).toBe(3);
    expect(checkChannel(read.channel, new Map()).ok).toBe(true);
  });
});
