import type { ChannelElement, ElementOf } from '@tollgate/contracts';
import { buildElement } from './index';

const frequenciesHz = Float64Array.of(0, 1e8, 1e9, 1e10);
const build = (element: ChannelElement) =>
  buildElement(element, frequenciesHz, { signaling: 'single-ended', jointOhm: 50, parts: new Map() });
const opens: ElementOf<'tee'> = {
  kind: 'tee',
  near: { capacitanceF: 1e-9 },
  shunt: { capacitanceF: 1e-12 },
  far: { capacitanceF: 1e-9 },
};

describe('a wave trapped without loss inside an element', () => {
  it('is told, with the number of points: three capacitors in a tee at 0 Hz', () => {
    const { s, warnings } = build(opens);
    expect(s.every(Number.isFinite)).toBe(true);
    expect(warnings).toEqual([
      'Inside the tee a wave is trapped without loss at 1 point; it is taken as not there.',
    ]);
  });
  it('is told of a part inside a circuit, and of two parts of it', () => {
    const connector = {
      ...({ kind: 'connector', interpolation: 'polar', reversed: false } as const),
      ...({ below: 'refuse', above: 'refuse' } as const),
    };
    const series = { kind: 'series', capacitanceF: 1e-9 } as const;
    expect(build({ ...connector, circuit: [opens, series, series] }).warnings).toEqual([
      'circuit[0]: Inside the tee a wave is trapped without loss at 1 point; it is taken as not there.',
      'Inside the circuit a wave is trapped without loss at 2 points; it is taken as not there.',
    ]);
  });
  it('is not told where there is none', () => {
    expect(build({ ...opens, far: { resistanceOhm: 1 } }).warnings).toEqual([]);
  });
});

describe('a placeholder', () => {
  const placeholder: ChannelElement = { kind: 'budget-loss', lossDb: 2, atHz: 1e10, shape: 'linear' };
  it('says up to where its loss leaves no room for the return loss asked for', () => {
    const [words] = build({ ...placeholder, returnLossDb: 15 }).warnings;
    expect(words).toMatch(/no room for a return loss of 15 dB up to 0.1 GHz/);
  });
  it('says so of the whole band where it is', () => {
    expect(build({ ...placeholder, returnLossDb: 1 }).warnings.join()).toMatch(/in the whole band/);
  });
  it('returns no more than is left, and what was asked for where there is room', () => {
    const { s } = build({ ...placeholder, returnLossDb: 15 });
    const power = (at: number) => s[at]! ** 2 + s[at + 1]! ** 2;
    for (let point = 0; point < 4; point++)
      expect(power(point * 8) + power(point * 8 + 4)).toBeLessThan(1 + 1e-12);
    expect(10 * Math.log10(power(24))).toBeCloseTo(-15, 12);
    expect(power(8)).toBeCloseTo(1 - power(12), 12);
  });
  it('has nothing to say where it is matched', () => {
    expect(build(placeholder).warnings).toEqual([]);
  });
});
