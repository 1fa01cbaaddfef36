import { powerHigh, powerLow, productError } from './double-double';

declare const TextEncoder: new () => { encode(text: string): Uint8Array };

/** The four digits of 0 to 9999 as four bytes, the first digit lowest. */
const fourDigits = Uint32Array.from(
  { length: 10_000 },
  (_, k) =>
    0x30303030 +
    Math.floor(k / 1000) +
    ((Math.floor(k / 100) % 10) << 8) +
    ((Math.floor(k / 10) % 10) << 16) +
    (k % 10) * 2 ** 24,
);

const mostBytesOfANumber = 32;
/** Nearer than this to a limit the sum of two doubles is not trusted. */
const space = 32;
const minus = 45;
const point = 46;
const zero = 48;

/**
 * Text as bytes, with numbers in the form of the language's own `String(value)`: the fewest digits that read back as the same
 * double, the nearest of these where there are several.
 *
 * A double v is scaled to v 10^p, from 1e16 to 1e17, as a sum of two doubles. Half the gap to its neighbours, in the same scale, is
 * between 0.5 and 11.1: so the nearest multiple of 100 is taken where it lies within that half gap (zeros at its end fall away), else
 * the nearest of 10, else the nearest whole number, which always does. Powers of two, whose gaps differ, numbers beyond 1e-40 to 1e17,
 * and what lies too near a limit to be sure go through the language.
 */
export class ByteWriter {
  private bytes = new Uint8Array(1 << 16);
  private view = new DataView(this.bytes.buffer);
  private length = 0;
  private readonly double = new Float64Array(1);
  private readonly words = new Uint32Array(this.double.buffer);

  /** What was written since the last call; valid until something more is written. */
  take(): Uint8Array {
    const taken = this.bytes.subarray(0, this.length);
    this.length = 0;
    return taken;
  }

  /** How many bytes are waiting. */
  get waiting(): number {
    return this.length;
  }

  text(text: string): void {
    const encoded = new TextEncoder().encode(text);
    this.makeRoom(encoded.length);
    this.bytes.set(encoded, this.length);
    this.length += encoded.length;
  }

  lineEnd(): void {
    this.makeRoom(1);
    this.bytes[this.length++] = 10;
  }

  /** A space and a number. */
  spacedNumber(value: number): void {
    this.makeRoom(mostBytesOfANumber);
    this.bytes[this.length++] = space;
    this.number(value);
  }

  number(value: number): void {
    this.makeRoom(mostBytesOfANumber);
    const size = value < 0 ? -value : value;
    if (!(size >= 1e-40 && size < 1e17) || !this.digits(size, value < 0)) this.plain(String(value));
  }

  private makeRoom(more: number): void {
    if (this.length + more <= this.bytes.length) return;
    const larger = new Uint8Array(Math.max(this.length + more, this.bytes.length * 2));
    larger.set(this.bytes.subarray(0, this.length));
    this.bytes = larger;
    this.view = new DataView(larger.buffer);
  }

  private plain(text: string): void {
    for (let k = 0; k < text.length; k++) this.bytes[this.length++] = text.charCodeAt(k);
  }

  /** The shortest digits of a positive number; false, with nothing written, where they are not sure. */
  private digits(size: number, negative: boolean): boolean {
    const { words } = this;
    this.double[0] = size;
    const head = words[1]!;
    if (words[0] === 0 && (head & 0xfffff) === 0) return false;
    const binary = (head >>> 20) - 1023;
    // 10^decimal <= size < 10^(decimal + 1), after at most one step: 0.30103 is log10 2.
    let power = 16 - Math.floor(binary * 0.30102999566398);
    let high = size * powerHigh[power]!;
    if (high >= 1e17) high = size * powerHigh[--power]!;
    const scale = powerHigh[power]!;
    const low = productError(size, scale, high) + size * powerLow[power]!;
    // Half the gap: 2^(binary - 53), put together from its bits.
    words[0] = 0;
    words[1] = (binary + 970) << 20;
    const half = this.double[0] * scale;

    let front = Math.floor(high / 1e8);
    let back = high - front * 1e8 + low;
    if (back < 0) {
      front--;
      back += 1e8;
    } else if (back >= 1e8) {
      front++;
      back -= 1e8;
    }
    let tail = Math.floor(back / 100 + 0.5) * 100;
    let off = Math.abs(back - tail) - half;
    let count = 15;
    if (off >= -1e-6) {
      if (off <= 1e-6) return false;
      tail = Math.floor(back / 10 + 0.5) * 10;
      const distance = Math.abs(back - tail);
      off = distance - half;
      count = 16;
      if (off >= -1e-6) {
        if (off <= 1e-6) return false;
        tail = Math.floor(back + 0.5);
        if (Math.abs(back - tail) > 0.499999) return false;
        count = 17;
      } else if (distance > 4.999999) return false;
    }
    if (tail >= 1e8) {
      front++;
      tail -= 1e8;
    }
    if (front < 1e8 || front >= 1e9) return false;
    this.place(front, tail, count, 16 - power, negative);
    return true;
  }

  /** 9 digits of `front`, 8 of `tail`, of which the first `count` count, as d.ddd x 10^decimal. */
  private place(front: number, tail: number, count: number, decimal: number, negative: boolean): void {
    const { bytes, view } = this;
    let at = this.length;
    if (negative) bytes[at++] = minus;
    const small = decimal < 0 && decimal >= -6;
    if (small) {
      bytes[at++] = zero;
      bytes[at++] = point;
      for (let k = decimal; k < -1; k++) bytes[at++] = zero;
    } else at++;
    // Digits stand from `at`; where a point comes between, the first ones move back by one.
    const first = (front / 1e8) | 0;
    const rest = front - first * 1e8;
    const second = (rest / 1e4) | 0;
    const third = (tail / 1e4) | 0;
    bytes[at] = zero + first;
    view.setUint32(at + 1, fourDigits[second]!, true);
    view.setUint32(at + 5, fourDigits[rest - second * 1e4]!, true);
    view.setUint32(at + 9, fourDigits[third]!, true);
    view.setUint32(at + 13, fourDigits[tail - third * 1e4]!, true);
    let end = at + count;
    if (count === 15) while (bytes[end - 1] === zero) end--;
    this.length = small ? end : this.punctuate(at, end, decimal);
  }

  /** Puts the point or the exponent to digits that stand one place too far back; returns where the number ends. */
  private punctuate(from: number, to: number, decimal: number): number {
    const { bytes } = this;
    const whole = decimal < 0 ? 1 : decimal + 1;
    const digits = to - from;
    for (let k = 0; k < whole; k++) bytes[from - 1 + k] = k < digits ? bytes[from + k]! : zero;
    let end = from - 1 + whole;
    if (digits > whole) {
      bytes[end] = point;
      end = to;
    }
    if (decimal >= 0) return end;
    this.length = end;
    this.plain(`e${decimal}`);
    return this.length;
  }
}
