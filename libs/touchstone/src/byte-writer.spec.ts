import fc from 'fast-check';
import { ByteWriter } from './byte-writer';

const writer = new ByteWriter();

function written(value: number): string {
  writer.number(value);
  return new TextDecoder().decode(writer.take());
}

const bits = new DataView(new ArrayBuffer(8));

/** Any double at all, each pattern of bits as likely as the next. */
const anyDouble = fc.tuple(fc.integer(), fc.integer()).map(([high, low]) => {
  bits.setInt32(0, high);
  bits.setInt32(4, low);
  return bits.getFloat64(0);
});

describe('numbers as bytes', () => {
  it.each([
    ['numbers of a scattering matrix', fc.double({ min: -1, max: 1, noNaN: true })],
    [
      'numbers of a few digits',
      fc.tuple(fc.integer(), fc.integer({ min: -30, max: 10 })).map(([n, e]) => Number(`${n}e${e}`)),
    ],
    ['frequencies', fc.integer({ min: 0, max: 2 ** 53 }).map((n) => n / 8)],
    [
      'products of short numbers, which need many digits',
      fc.tuple(fc.integer(), fc.integer()).map(([a, b]) => a * 0.1 * b * 1e-9),
    ],
    ['any double', anyDouble],
  ])('are those of the language: %s', (_, numbers) => {
    fc.assert(
      fc.property(numbers, (value) => written(value) === String(value)),
      { numRuns: 20_000, seed: 5 },
    );
  });

  it('are those of the language at and beside powers of ten and of two, and at the ends of the range', () => {
    const step = (value: number, by: bigint) => {
      bits.setFloat64(0, value);
      bits.setBigInt64(0, bits.getBigInt64(0) + by);
      return bits.getFloat64(0);
    };
    const centres = [
      ...Array.from({ length: 70 }, (_unused, k) => Number(`1e${k - 45}`)),
      ...Array.from({ length: 200 }, (_unused, k) => 2 ** (k - 140)),
      ...[0, 5e-324, 2.2250738585072014e-308, 1.7976931348623157e308, 9007199254740993, 123456789012345680],
    ];
    for (const centre of centres) {
      for (const by of [-3n, -2n, -1n, 0n, 1n, 2n, 3n]) {
        const value = step(centre, by);
        expect(written(value)).toBe(String(value));
        expect(written(-value)).toBe(String(-value));
      }
    }
  });
});
