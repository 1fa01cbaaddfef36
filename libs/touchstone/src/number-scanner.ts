import { mostPower, powerHigh, powerLow, productError } from './double-double';

/** Powers of ten that a double holds exactly; with a mantissa up to 2^53 one operation rounds correctly. */
const exactPowers = Float64Array.from({ length: 23 }, (_, k) => Number(`1e${k}`));

/** Digits up to here go to the first part of a mantissa, which stays below 2^53. */
const firstPart = 900719925474099;
const mostLowDigits = 7;

/** Why a token is no number. */
export type ScanFault = 'comma' | 'token';

/**
 * (first 10^lowDigits + low)/10^power, rounded to the nearest double: both sides are held as sums of two doubles, 106 bits. Where the
 * result lies too near the middle of two doubles to be sure, it gives -1.
 */
function quotient(first: number, low: number, lowDigits: number, power: number): number {
  const factor = exactPowers[lowDigits]!;
  let high = first * factor;
  let rest = productError(first, factor, high) + low;
  const sum = high + rest;
  rest -= sum - high;
  high = sum;
  const divisor = powerHigh[power]!;
  const q = high / divisor;
  const product = q * divisor;
  const remainder = high - product - productError(q, divisor, product) + rest - q * powerLow[power]!;
  const correction = remainder / divisor;
  const value = q + correction;
  const left = correction - (value - q);
  return value + left * 1.000001 === value ? value : -1;
}

/**
 * Reads the numbers of one line of bytes. Correctly rounded: up to 15 digits cost one multiplication or division, up to 22 a
 * double-double division, anything else goes through the language's own parser.
 */
export class NumberScanner {
  values = new Float64Array(256);
  count = 0;
  /** Set where `scan` returns -1. */
  fault: ScanFault = 'token';
  faultAt = 0;
  /** Set where a non-breaking space stood between numbers. */
  hardSpace = false;

  /**
   * @param end the byte at `end` must exist and be no part of a number (a line end)
   * @param shift power of ten for the first number (the frequency unit), applied before rounding
   * @returns where it stopped: `end`, or the comment mark; -1 at a token that is no number
   */
  scan(bytes: Uint8Array, start: number, end: number, shift: number): number {
    let k = start;
    let count = 0;
    while (k < end) {
      let c = bytes[k]!;
      if (c === 32 || c === 9 || c === 13 || c === 11 || c === 12) {
        k++;
        continue;
      }
      if (c === 33) break;
      if (c === 0xa0 || (c === 0xc2 && bytes[k + 1] === 0xa0)) {
        this.hardSpace = true;
        k += c === 0xa0 ? 1 : 2;
        continue;
      }
      const from = k;
      let negative = false;
      if (c === 45) {
        negative = true;
        c = bytes[++k]!;
      } else if (c === 43) c = bytes[++k]!;
      let mantissa = 0;
      let low = 0;
      let lowDigits = 0;
      let exponent = 0;
      let digits = 0;
      while (c >= 48 && c <= 57) {
        if (mantissa < firstPart) mantissa = mantissa * 10 + (c - 48);
        else {
          low = low * 10 + (c - 48);
          lowDigits++;
        }
        digits++;
        c = bytes[++k]!;
      }
      if (c === 46) {
        c = bytes[++k]!;
        while (c >= 48 && c <= 57) {
          if (mantissa < firstPart) mantissa = mantissa * 10 + (c - 48);
          else {
            low = low * 10 + (c - 48);
            lowDigits++;
          }
          exponent--;
          digits++;
          c = bytes[++k]!;
        }
      }
      if (digits === 0) {
        const size = this.infinity(bytes, from, end);
        if (size === 0) return this.fail(bytes, from, end);
        if (count === this.values.length) this.grow();
        this.values[count++] = negative ? -Infinity : Infinity;
        k = from + size;
        continue;
      }
      // e, E, d, D
      if ((c | 32) === 101 || (c | 32) === 100) {
        c = bytes[++k]!;
        let below = false;
        if (c === 45) {
          below = true;
          c = bytes[++k]!;
        } else if (c === 43) c = bytes[++k]!;
        if (!(c >= 48 && c <= 57)) return this.fail(bytes, from, end);
        let power = 0;
        while (c >= 48 && c <= 57) {
          if (power < 100000) power = power * 10 + (c - 48);
          c = bytes[++k]!;
        }
        exponent += below ? -power : power;
      }
      if (!(
        c === 32 ||
        c === 9 ||
        c === 10 ||
        c === 13 ||
        c === 33 ||
        k >= end ||
        c === 0xa0 ||
        c === 0xc2
      )) {
        return this.fail(bytes, from, end);
      }
      if (count === 0) exponent += shift;
      let value: number;
      if (lowDigits === 0 && exponent >= -22 && exponent <= 22) {
        value = exponent < 0 ? mantissa / exactPowers[-exponent]! : mantissa * exactPowers[exponent]!;
      } else {
        value =
          lowDigits <= mostLowDigits && exponent <= 0 && exponent >= -mostPower
            ? quotient(mantissa, low, lowDigits, -exponent)
            : -1;
        if (value < 0) value = this.slow(bytes, from, k, count === 0 ? shift : 0);
      }
      if (count === this.values.length) this.grow();
      this.values[count++] = negative && value > 0 ? -value : value;
    }
    this.count = count;
    return k;
  }

  private grow(): void {
    const larger = new Float64Array(this.values.length * 2);
    larger.set(this.values);
    this.values = larger;
  }

  /** The absolute value of a token with more digits or a wider exponent than the exact path takes. */
  private slow(bytes: Uint8Array, from: number, to: number, shift: number): number {
    let text = '';
    let power = '';
    let inPower = false;
    for (let k = from; k < to; k++) {
      const letter = String.fromCharCode(bytes[k]!);
      if (/[eEdD]/.test(letter)) inPower = true;
      else if (inPower) power += letter;
      else text += letter;
    }
    return Math.abs(Number(`${text}e${(power === '' ? 0 : Number(power)) + shift}`));
  }

  /** How many bytes an infinity takes from here (`-inf` in dB is a true zero), 0 where there is none. */
  private infinity(bytes: Uint8Array, from: number, end: number): number {
    let token = '';
    for (let k = from; k < end && bytes[k]! > 32 && bytes[k] !== 33 && k < from + 12; k++) {
      token += String.fromCharCode(bytes[k]!);
    }
    return /^[+-]?(inf|infinity|1\.#inf)$/i.test(token) ? token.length : 0;
  }

  private fail(bytes: Uint8Array, from: number, end: number): -1 {
    this.faultAt = from;
    this.fault = 'token';
    for (let k = from; k < end && bytes[k]! > 32 && bytes[k] !== 33; k++) {
      if (bytes[k] === 44 || bytes[k] === 59) this.fault = 'comma';
    }
    return -1;
  }
}
