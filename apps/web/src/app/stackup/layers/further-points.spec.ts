import { readPoints, writePoints } from './further-points';

describe('further points of a material', () => {
  it('are read as they are written, and none is none', () => {
    const value = [
      { dk: 3.62, df: 0.0085, atHz: 1e10 },
      { dk: 3.6, df: 0.009, atHz: 2e10 },
    ];
    expect(writePoints(value)).toBe('3.62 0.0085 10 GHz, 3.6 0.009 20 GHz');
    expect(readPoints(writePoints(value))).toEqual({ ok: true, value });
    expect(readPoints('')).toEqual({ ok: true, value: undefined });
    expect(readPoints('3.6 0.01 5')).toEqual({ ok: true, value: [{ dk: 3.6, df: 0.01, atHz: 5e9 }] });
  });

  it.each(['3.6', '3.6 0.01', 'x 0.01 5 GHz', '3.6 0.01 5 mm', '3.6 0.01 5 GHz,'])('refuse %p', (text) => {
    expect(readPoints(text)).toMatchObject({ ok: false, message: expect.stringContaining('Dk, Df') });
  });
});
