import { complexDivide } from '@tollgate/network';

/** Sixteen complex numbers that a formula for small matrices works on, so that a loop over frequency allocates none. */
const register = new Float64Array(32);

export function loadAt(to: number, from: Float64Array, at: number): void {
  register[to * 2] = from[at]!;
  register[to * 2 + 1] = from[at + 1]!;
}

export function storeAt(from: number, to: Float64Array, at: number): void {
  to[at] = register[from * 2]!;
  to[at + 1] = register[from * 2 + 1]!;
}

/** to = a b. */
export function product(to: number, a: number, b: number): void {
  const re = real(a, b);
  register[to * 2 + 1] = imaginary(a, b);
  register[to * 2] = re;
}

/** to = 1 - a b. */
export function oneMinusProduct(to: number, a: number, b: number): void {
  const re = 1 - real(a, b);
  register[to * 2 + 1] = -imaginary(a, b);
  register[to * 2] = re;
}

/** to = a b + c d. */
export function sumOfProducts(to: number, a: number, b: number, c: number, d: number): void {
  const re = real(a, b) + real(c, d);
  register[to * 2 + 1] = imaginary(a, b) + imaginary(c, d);
  register[to * 2] = re;
}

/** to = a b - c d. */
export function difference(to: number, a: number, b: number, c: number, d: number): void {
  const re = real(a, b) - real(c, d);
  register[to * 2 + 1] = imaginary(a, b) - imaginary(c, d);
  register[to * 2] = re;
}

/** to = a/b. */
export function quotient(to: number, a: number, b: number): void {
  complexDivide(
    register,
    to * 2,
    register[a * 2]!,
    register[a * 2 + 1]!,
    register[b * 2]!,
    register[b * 2 + 1]!,
  );
}

export function shift(to: number, by: number): void {
  register[to * 2]! += by;
}

export function scale(to: number, by: number): void {
  register[to * 2]! *= by;
  register[to * 2 + 1]! *= by;
}

function real(a: number, b: number): number {
  return register[a * 2]! * register[b * 2]! - register[a * 2 + 1]! * register[b * 2 + 1]!;
}

function imaginary(a: number, b: number): number {
  return register[a * 2]! * register[b * 2 + 1]! + register[a * 2 + 1]! * register[b * 2]!;
}
