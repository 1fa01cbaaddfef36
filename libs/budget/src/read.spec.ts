import { partsNeeded, readChannel } from '@tollgate/budget';

const line = { kind: 'line', z0Ohm: 50, lengthM: 0.1, effectivePermittivity: 3.6 };
const channel = { format: 'tollgate.channel/1', name: 'Test', signaling: 'single-ended', elements: [line] };
const mask = { title: 'Loss', quantity: 'insertion-loss', sense: 'max' };

function pathsOf(document: unknown, parts: 'file' | 'fileId' | 'any' = 'any'): string[] {
  const read = readChannel(document, { parts });
  return read.ok ? [] : read.problems.map(({ path }) => path);
}

describe('reading a channel', () => {
  it('accepts a channel of one line and gives it an id', () => {
    const read = readChannel(channel);
    expect(read.ok && read.channel.elements[0]!.id).toBeTruthy();
  });

  it.each([null, undefined, 7, 'text', [], {}, { format: 'tollgate.channel/1' }, { elements: [null] }])(
    'refuses %p with problems and does not throw',
    (document) => {
      const read = readChannel(document);
      expect(read.ok).toBe(false);
      expect(!read.ok && read.problems.length).toBeGreaterThan(0);
    },
  );

  it('names an unknown field of an element by its path', () => {
    expect(pathsOf({ ...channel, elements: [line, { ...line, lengthMm: 3 }] })).toEqual([
      'elements[1].lengthMm',
    ]);
  });

  it('names a formula with an unknown function by its path', () => {
    const segments = [{ fromHz: 1e9, toHz: 2e9, formula: '1 + sin(f)' }];
    expect(pathsOf({ ...channel, limits: [{ ...mask, segments }] })).toEqual([
      'limits[0].segments[0].formula',
    ]);
  });

  it('refuses a limit of pairs in a single-ended channel', () => {
    const limit = { ...mask, quantity: 'pair-skew', atHz: 1e9, db: 1 };
    expect(pathsOf({ ...channel, limits: [limit] })).toEqual(['limits[0].quantity']);
  });

  it('refuses different references on p and n of one end', () => {
    const differential = { ...channel, signaling: 'differential' };
    expect(pathsOf({ ...differential, referenceOhm: [50, 45, 50, 50] })).toEqual(['referenceOhm[1]']);
    expect(pathsOf({ ...differential, referenceOhm: [50, 50, [50, 1], 50] })).toEqual(['referenceOhm[3]']);
    expect(pathsOf({ ...differential, referenceOhm: [50, 50, 42, 42] })).toEqual([]);
  });

  it('refuses a coupled pair in a single-ended channel', () => {
    const pair = { kind: 'pair-series', inductanceH: 1e-9, mutualInductanceH: 1e-10 };
    expect(pathsOf({ ...channel, elements: [line, pair] })[0]).toMatch(/^elements\[1\]/);
  });

  it('takes a path only where files are at hand, and an identifier only where a server is', () => {
    const file = { kind: 'touchstone', file: 'a.s2p' };
    const fileId = { kind: 'touchstone', fileId: '7d9a2a1e-6f53-4a83-9d42-1f0c1a8f9e11' };
    expect(pathsOf({ ...channel, elements: [file] }, 'file')).toEqual([]);
    expect(pathsOf({ ...channel, elements: [file] }, 'fileId')).toEqual(['elements[0].file']);
    expect(pathsOf({ ...channel, elements: [line, fileId] }, 'file')).toEqual(['elements[1].fileId']);
    expect(pathsOf({ ...channel, elements: [fileId] }, 'fileId')).toEqual([]);
  });

  it('lists the parts that a channel needs, with where they are named', () => {
    const read = readChannel({ ...channel, elements: [line, { kind: 'touchstone', file: 'parts/a.s2p' }] });
    expect(read.ok && partsNeeded(read.channel)).toEqual([{ key: 'parts/a.s2p', path: 'elements[1].file' }]);
  });
});
