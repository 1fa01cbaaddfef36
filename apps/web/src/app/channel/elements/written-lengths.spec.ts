import { readByLayer, readOffsets, writeByLayer, writeOffsets } from './written-lengths';

describe('a length, one or by layer', () => {
  it.each([
    ['0.5 mm', 0.5e-3],
    ['20 mil', 0.508e-3],
    ['0.5', 0.5e-3],
    ['0', 0],
  ])('reads %p', (text, value) => {
    const read = readByLayer(text);
    expect(read.ok && read.value).toBeCloseTo(value, 12);
  });

  it('reads what it writes, layer by layer', () => {
    const value = { L1: 0.5e-3, 'Inner 2': 0, L8: 0.6e-3 };
    expect(writeByLayer(value)).toBe('L1 0.5 mm, Inner 2 0, L8 0.6 mm');
    expect(readByLayer(writeByLayer(value))).toEqual({ ok: true, value });
  });

  it.each(['wide', 'L1', '', 'L1 x mm', '-1 mm', 'L1 -1 mm'])(
    'refuses %p and says how to write it',
    (text) => {
      expect(readByLayer(text)).toMatchObject({ ok: false, message: expect.stringMatching(/length/) });
    },
  );
});

describe('places of return vias', () => {
  it('are read as they are written, and none is none', () => {
    const value: [number, number][] = [
      [0.9e-3, 0],
      [-0.9e-3, 0.25e-3],
    ];
    expect(writeOffsets(value)).toBe('0.9 0, -0.9 0.25');
    expect(readOffsets(writeOffsets(value))).toEqual({ ok: true, value });
    expect(readOffsets(' ')).toEqual({ ok: true, value: undefined });
  });

  it('are refused where a place lacks a coordinate', () => {
    expect(readOffsets('0.9, 1 2')).toMatchObject({ ok: false });
  });
});
