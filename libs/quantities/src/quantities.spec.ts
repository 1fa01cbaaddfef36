import { dimensions, formatDb, formatQuantity, parseQuantity, unitsOf, type Dimension } from './index';

function value(text: string, dimension: Dimension): number {
  const parsed = parseQuantity(text, dimension);
  if (!parsed.ok) throw new Error(parsed.message);
  return parsed.value;
}

function message(text: string, dimension: Dimension): string {
  const parsed = parseQuantity(text, dimension);
  return parsed.ok ? '' : parsed.message;
}

describe('reading a quantity', () => {
  it.each([
    ['12 mil', 'length', 304.8e-6],
    ['3.5 in', 'length', 88.9e-3],
    ['0.1mm', 'length', 1e-4],
    ['35 µm', 'length', 35e-6],
    ['0.2 dB', 'loss', 0.2],
    ['25.78125 GBd', 'symbolRate', 25.78125e9],
    ['12.890625 ghz', 'frequency', 12.890625e9],
    ['50 Ω', 'resistance', 50],
    ['1 Mohm', 'resistance', 1e6],
    ['1 mohm', 'resistance', 1e-3],
    ['100 nF', 'capacitance', 1e-7],
    ['4.5 dB/in', 'lossPerLength', 4.5 / 25.4e-3],
    ['58 MS/m', 'conductivity', 58e6],
    ['-3 dB', 'loss', -3],
    ['2.5e-3 m', 'length', 2.5e-3],
    ['40 °C', 'temperature', 40],
    ['2 %', 'ratio', 0.02],
  ] as const)('takes "%s" as %s', (text, dimension, expected) => {
    expect(value(text, dimension)).toBeCloseTo(expected, 12 - Math.floor(Math.log10(Math.abs(expected))));
  });

  it('takes a number without a unit in SI, or in the unit of the field', () => {
    expect(value('0.01', 'length')).toBe(0.01);
    expect(parseQuantity('12', 'length', 'mm')).toEqual({ ok: true, value: 0.012, unit: 'mm' });
  });

  it('gives exactly the number of the decimal notation', () => {
    expect(value('0.3 mm', 'length')).toBe(0.0003);
    expect(value('1.1 pF', 'capacitance')).toBe(1.1e-12);
  });

  it('keeps apart units that differ only by case', () => {
    expect(message('1 MF', 'capacitance')).toContain('not a unit of capacitance');
    expect(value('5 MOHM', 'resistance')).toBe(5e6);
    expect(value('5 NF', 'capacitance')).toBe(5e-9);
  });

  it('says what is wrong and what would be right', () => {
    expect(message('12 furlong', 'length')).toBe(
      '"furlong" is not a unit of length; use mm, um, mil, in, cm, m or nm.',
    );
    expect(message('1,5 mm', 'length')).toBe('Write the decimal mark as a point, not a comma.');
    expect(message('', 'frequency')).toBe('Give a frequency, such as "1 GHz".');
    expect(message('wide', 'length')).toContain('is not a length');
    expect(message('1e999 m', 'length')).toBe('The number is too large.');
  });
});

describe('writing a quantity', () => {
  it('chooses a readable unit', () => {
    expect(formatQuantity(0.0127, 'length')).toBe('12.7 mm');
    expect(formatQuantity(25.78125e9, 'symbolRate', { digits: 8 })).toBe('25.78125 GBd');
    expect(formatQuantity(2.2e-13, 'capacitance')).toBe('220 fF');
    expect(formatQuantity(0, 'length')).toBe('0 mm');
    expect(formatQuantity(304.8e-6, 'length', { unit: 'mil' })).toBe('12 mil');
  });

  it('reads back to the same value in every unit', () => {
    for (const dimension of Object.keys(dimensions) as Dimension[]) {
      for (const unit of unitsOf(dimension)) {
        const text = formatQuantity(1.2345, dimension, { unit, digits: 15 });
        expect(value(text, dimension)).toBeCloseTo(1.2345, 9);
      }
    }
  });

  it('gives decibels two decimals and a real minus', () => {
    expect(formatDb(1.8449)).toBe('1.84 dB');
    expect(formatDb(-0.5, false)).toBe('\u22120.50');
    expect(formatDb(-0.001)).toBe('0.00 dB');
    expect(formatDb(null)).toBe('no transmission');
  });
});
