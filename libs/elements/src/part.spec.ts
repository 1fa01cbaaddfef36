import type { ElementOf } from '@tollgate/contracts';
import { renormalize, toPowerWaves, uniformReference, type Network } from '@tollgate/network';
import { readTouchstone, writeTouchstone } from '@tollgate/touchstone';
import { buildElement, elementCoverage, ElementError, type BuildContext } from './index';

const touchstone: ElementOf<'touchstone'> = {
  kind: 'touchstone',
  file: 'part',
  interpolation: 'polar',
  reversed: false,
  below: 'refuse',
  above: 'refuse',
};
const frequenciesHz = Float64Array.of(1e7, 2e7, 3e7, 4e7, 5e7);

function contextOf(
  network: Network | string,
  name: string,
  signaling: BuildContext['signaling'],
): BuildContext {
  const text = typeof network === 'string' ? network : writeTouchstone(network, { version: '1.1' });
  const file = readTouchstone(name, new TextEncoder().encode(text));
  return { signaling, jointOhm: 50, parts: new Map([['part', { sha256: name, file }]]) };
}

function refusalOf(run: () => unknown) {
  try {
    run();
  } catch (error) {
    if (error instanceof ElementError) return error.problem;
    throw error;
  }
  throw new Error('Nothing was refused.');
}

/** A part of n ports whose entry (row, column) is told at every frequency; reciprocal. */
function partOf(
  ports: number,
  entries: readonly (readonly [row: number, column: number, value: number])[],
): Network {
  const s = new Float64Array(frequenciesHz.length * ports * ports * 2);
  for (const point of frequenciesHz.keys()) {
    for (const [row, column, value] of entries) {
      s[((point * ports + row) * ports + column) * 2] = value;
      s[((point * ports + column) * ports + row) * 2] = value;
    }
  }
  return { ports, frequenciesHz, s, referenceOhm: uniformReference(ports, 50) };
}
const entryOf = (s: Float64Array, ports: number, row: number, column: number) =>
  s[(row * ports + column) * 2]!;

describe('picked ports', () => {
  const six = partOf(6, [
    [1, 4, 0.9],
    [2, 3, 0.8],
    [1, 1, 0.1],
    [0, 5, 0.7],
  ]);

  it("of a six-port stand where the pick says, the rest ended in the file's reference", () => {
    const context = contextOf(six, 'part.s6p', 'single-ended');
    const { s } = buildElement({ ...touchstone, ports: { near: 2, far: 5 } }, frequenciesHz, context);
    expect([0, 1].map((row) => entryOf(s, 2, row, 0))).toEqual([
      expect.closeTo(0.1, 9),
      expect.closeTo(0.9, 9),
    ]);
    const pair = contextOf(six, 'part.s6p', 'differential');
    const ports = { nearP: 2, nearN: 3, farP: 5, farN: 4 };
    const { s: four } = buildElement({ ...touchstone, ports }, frequenciesHz, pair);
    expect(entryOf(four, 4, 2, 0)).toBeCloseTo(0.9, 9);
    expect(entryOf(four, 4, 3, 1)).toBeCloseTo(0.8, 9);
  });

  it.each([
    ['a port that the file does not have', 'single-ended', { near: 1, far: 7 }, /The file has 6 ports/],
    ['a port named twice', 'single-ended', { near: 1, far: 1 }, /picked once/],
    [
      'four ports in a single-ended channel',
      'single-ended',
      { nearP: 1, nearN: 2, farP: 3, farN: 4 },
      /\{ near, far \}/,
    ],
  ] as const)('are refused: %s', (_, signaling, ports, message) => {
    const context = contextOf(six, 'part.s6p', signaling);
    const problem = refusalOf(() => elementCoverage({ ...touchstone, ports }, context));
    expect(problem).toMatchObject({ path: 'ports', message: expect.stringMatching(message) });
    expect(problem.mend).toMatch(/counted from 1/);
  });

  it.each([
    ['single-ended', /a single-ended channel needs 2/, /\{ near, far \}/],
    ['differential', /a differential channel needs 4 or 2/, /nearP/],
  ] as const)('are asked for where a file has other ports than a %s channel', (signaling, message, mend) => {
    const problem = refusalOf(() => elementCoverage(touchstone, contextOf(six, 'part.s6p', signaling)));
    expect(problem).toMatchObject({ path: 'ports', message: expect.stringMatching(message) });
    expect(problem.mend).toMatch(mend);
  });
});

describe('an order of ports that the data cannot tell', () => {
  const little = partOf(4, [
    [0, 2, 0.2],
    [1, 3, 0.2],
  ]);
  const context = contextOf(little, 'part.s4p', 'differential');
  const stated = { ...touchstone, portOrder: '1-3,2-4' } as const;

  it('is refused until a person confirms it', () => {
    const problem = refusalOf(() => elementCoverage(stated, context));
    expect(problem.path).toBe('portOrder');
    expect(problem.message).toMatch(/do not tell/);
    expect(problem.mend).toMatch(/portOrderConfirmed/);
    const { s } = buildElement({ ...stated, portOrderConfirmed: true }, frequenciesHz, context);
    expect(entryOf(s, 4, 2, 0)).toBeCloseTo(0.2, 9);
  });

  it('cannot be confirmed against data that speak for another', () => {
    const clear = partOf(4, [
      [0, 2, 0.9],
      [1, 3, 0.9],
    ]);
    const wrong = { ...touchstone, portOrder: '1-2,3-4', portOrderConfirmed: true } as const;
    const problem = refusalOf(() => elementCoverage(wrong, contextOf(clear, 'part.s4p', 'differential')));
    expect(problem.message).toMatch(/speak against "1-2,3-4"/);
    expect(problem.mend).toMatch(/"1-3,2-4"/);
  });
});

describe('a reversed part', () => {
  it('is entered at its far end', () => {
    const lopsided = partOf(2, [
      [0, 0, 0.1],
      [1, 1, 0.4],
      [1, 0, 0.8],
    ]);
    const context = contextOf(lopsided, 'part.s2p', 'single-ended');
    const { s } = buildElement({ ...touchstone, reversed: true }, frequenciesHz, context);
    expect([entryOf(s, 2, 0, 0), entryOf(s, 2, 1, 1)]).toEqual([
      expect.closeTo(0.4, 9),
      expect.closeTo(0.1, 9),
    ]);
  });
  it('of a pair keeps its legs', () => {
    const pair = partOf(4, [
      [0, 0, 0.1],
      [1, 1, 0.2],
      [2, 2, 0.3],
      [3, 3, 0.4],
      [0, 2, 0.8],
      [1, 3, 0.8],
    ]);
    const element = { ...touchstone, portOrder: '1-3,2-4', reversed: true } as const;
    const { s } = buildElement(element, frequenciesHz, contextOf(pair, 'part.s4p', 'differential'));
    const own = [0, 1, 2, 3].map((port) => entryOf(s, 4, port, port));
    expect(own).toEqual([0.3, 0.4, 0.1, 0.2].map((value) => expect.closeTo(value, 9)));
  });
});

describe('a file with complex references', () => {
  const rows = [1e7, 2e7, 3e7].map((f) => `${f} 0.2 0.1 0.6 -0.5 0.6 -0.5 0.1 0.05`);
  const file = ['# Hz S RI R (40+10j)', ...rows, ''].join('\n');
  const grid = Float64Array.of(1e7, 2e7, 3e7);

  it('is refused until it is said which waves its numbers mean', () => {
    const context = contextOf(file, 'part.s2p', 'single-ended');
    const problem = refusalOf(() => elementCoverage(touchstone, context));
    expect(problem.path).toBe('waves');
    expect(problem.mend).toMatch(/power or pseudo waves/);
  });
  it.each(['power', 'pseudo'] as const)('is renormalised from %s waves', (waves) => {
    const context = contextOf(file, 'part.s2p', 'single-ended');
    const { s } = buildElement({ ...touchstone, waves }, grid, context);
    const own = context.parts.get('part')!.file.network;
    const direct =
      waves === 'power' ? renormalize(own, 50) : toPowerWaves(own, 'pseudo', uniformReference(2, 50));
    s.forEach((value, k) => expect(value).toBeCloseTo(direct.s[k]!, 12));
    expect(s).toHaveLength(direct.s.length);
  });
});

describe('a request beyond the band of a part', () => {
  const context = contextOf(partOf(2, [[0, 1, 0.9]]), 'part.s2p', 'single-ended');
  const below = Float64Array.of(1e6, 2e7);
  const above = Float64Array.of(2e7, 6e7);

  it.each([
    ['below', below, /1000000 Hz is asked for/, /extension to 0 Hz/],
    ['above', above, /60000000 Hz is asked for/, /End the grid/],
  ] as const)(
    'is refused by the field %s, with the frequency and how to mend it',
    (path, wanted, message, mend) => {
      const problem = refusalOf(() => buildElement(touchstone, wanted, context));
      expect(problem.path).toBe(path);
      expect(problem.message).toMatch(message);
      expect(problem.mend).toMatch(mend);
    },
  );
  it('above it is refused by that field too where the part is carried on to 0 Hz', () => {
    const problem = refusalOf(() =>
      buildElement({ ...touchstone, below: 'to-dc' }, Float64Array.of(0, 6e7), context),
    );
    expect(problem.path).toBe('above');
  });
  it('below it is answered to 0 Hz where that is asked for, and said with the range', () => {
    const carried = { ...touchstone, below: 'to-dc' } as const;
    expect(elementCoverage(carried, context)[0]).toMatchObject({ fromHz: 0, toHz: 5e7 });
    const built = buildElement(carried, Float64Array.of(0, 5e6, 1e7), context);
    expect(built.s[4]).toBeCloseTo(0.9, 6);
    expect(built.s[5]).toBe(0);
    expect(built.part!.extendedHz).toEqual([0, 1e7]);
    expect(built.warnings.join()).toMatch(/Extended from 10000000 Hz/);
  });
  it('by a rounding is no request beyond it', () => {
    const wanted = Float64Array.of(1e7 * (1 - 1e-12), 5e7 * (1 + 1e-12));
    expect(buildElement(touchstone, wanted, context).s.every(Number.isFinite)).toBe(true);
  });
});
