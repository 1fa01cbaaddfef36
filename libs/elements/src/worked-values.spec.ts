import type { ChannelElement } from '@tollgate/contracts';
import { cascade2Into, renormalize, uniformReference, type Network } from '@tollgate/network';
import { buildElement } from './index';

const c0 = 299_792_458;
const line = (z0Ohm: number, lengthM: number, effectivePermittivity = 1) => ({
  ...({ kind: 'line', z0Ohm, lengthM, effectivePermittivity } as const),
  ...{ lossSqrtDbPerM: 0, lossLinearDbPerM: 0 },
});

function networkOf(element: ChannelElement, frequencyHz: number): Network {
  const frequenciesHz = Float64Array.of(frequencyHz);
  const { s } = buildElement(element, frequenciesHz, {
    ...({ signaling: 'single-ended', jointOhm: 50, parts: new Map() } as const),
  });
  return { ports: 2, frequenciesHz, s, referenceOhm: uniformReference(2, 50) };
}
const dB = (s: Float64Array, at: number) => -20 * Math.log10(Math.hypot(s[at]!, s[at + 1]!));
const insertionLossDb = (element: ChannelElement, f: number) => dB(networkOf(element, f).s, 4);
const returnLossDb = (element: ChannelElement, f: number) => dB(networkOf(element, f).s, 0);

/** A value printed to so many digits, and half a unit of the last. */
const printed = (value: number, text: string) => {
  const digits = text.split('.')[1]?.length ?? 0;
  expect(Math.abs(value - Number(text))).toBeLessThanOrEqual(0.51 * 10 ** -digits);
};

describe('small circuits (Pozar, Microwave Engineering, Table 4.1; formula A5)', () => {
  const quarterHz = c0 / 4;
  it('a quarter-wave line of 60 ohm in 50 has 14.8787 dB of return loss and 0.14357 dB of insertion loss', () => {
    printed(returnLossDb(line(60, 1), quarterHz), '14.8787');
    printed(insertionLossDb(line(60, 1), quarterHz), '0.14357');
  });
  it('25 ohm in series lose 1.9382 dB', () => {
    printed(insertionLossDb({ kind: 'series', resistanceOhm: 25 }, 1e9), '1.9382');
  });
  it('a quarter-wave line of 70.7107 ohm matches 50 to 100 ohm', () => {
    const { s } = renormalize(networkOf(line(70.7107, 1), quarterHz), Float64Array.of(50, 0, 100, 0));
    expect(Math.hypot(s[4]!, s[5]!)).toBeCloseTo(1, 10);
    expect(Math.hypot(s[0]!, s[1]!)).toBeLessThan(1e-6);
  });
  it('nothing between 50 and 75 ohm is the step: S11 = 0.2, S21 = 0.979796, with no reflection added to it', () => {
    const { s } = renormalize(networkOf(line(50, 0), 1e9), Float64Array.of(50, 0, 75, 0));
    printed(s[0]!, '0.2');
    printed(s[4]!, '0.979796');
  });
  it.each([
    [45, '25.5751', '0.01205'],
    [55, '26.4444', '0.00986'],
  ])('an end of %d ohm at 50 has a return loss of %s dB and loses %s dB', (ohm, returned, lost) => {
    const { s } = renormalize(networkOf(line(50, 0), 1e9), Float64Array.of(50, 0, ohm, 0));
    printed(dB(s, 0), returned);
    printed(dB(s, 4), lost);
  });
  it('an attenuator of 10 dB has the chain matrix 1.739253, 71.151247; 0.0284605, 1.739253', () => {
    const { s } = networkOf({ kind: 'attenuator', attenuationDb: 10, z0Ohm: 50 }, 1e9);
    const [s11, s21] = [s[0]!, s[4]!];
    printed((1 - s11 * s11 + s21 * s21) / (2 * s21), '1.739253');
    printed((50 * ((1 + s11) ** 2 - s21 * s21)) / (2 * s21), '71.151247');
    printed(((1 - s11) ** 2 - s21 * s21) / (2 * s21 * 50), '0.0284605');
  });
});

describe('a stub (formula C3)', () => {
  const stub = (lengthM: number, dk: number): ChannelElement => ({
    ...line(50, lengthM, dk),
    kind: 'stub',
    end: 'open',
  });
  it.each([
    [1.5e-3, 4, 24.983e9],
    [1e-3, 3.7, 38.964e9],
    [0.25e-3, 3.7, 155.85e9],
  ])('of %d m in Dk %d lets nothing through at c0/(4 L sqrt Dk) = %d Hz', (lengthM, dk, notchHz) => {
    const exactHz = c0 / (4 * lengthM * Math.sqrt(dk));
    expect(Math.abs(exactHz / notchHz - 1)).toBeLessThan(3.3e-5);
    expect(insertionLossDb(stub(lengthM, dk), exactHz)).toBeGreaterThan(250);
    expect(insertionLossDb(stub(lengthM, dk), exactHz / 2)).toBeLessThan(2);
  });
  it('of 1.5 mm, 50 ohm and Dk 4 loses 1.0599 dB at 12.890625 GHz and returns 6.6442 dB down', () => {
    printed(insertionLossDb(stub(1.5e-3, 4), 12.890625e9), '1.0599');
    printed(returnLossDb(stub(1.5e-3, 4), 12.890625e9), '6.6442');
  });
});

describe('discrete parts (formula C4)', () => {
  const coupling: ChannelElement = {
    kind: 'capacitor',
    capacitanceF: 100e-9,
    seriesInductanceH: 0.3e-9,
    seriesResistanceOhm: 0.01,
    padCapacitanceF: 0,
  };
  it('100 nF with 0.3 nH and 10 mohm are the resistance alone at 29.058 MHz', () => {
    const resonanceHz = 1 / (2 * Math.PI * Math.sqrt(100e-9 * 0.3e-9));
    printed(resonanceHz / 1e6, '29.058');
    const { s } = networkOf(coupling, resonanceHz);
    expect(s[0]).toBeCloseTo(0.01 / (100 + 0.01), 12);
    expect(s[1]).toBeCloseTo(0, 10);
  });
  it('and have 9.4245 ohm and lose 0.03926 dB at 5 GHz', () => {
    const { s } = networkOf(coupling, 5e9);
    // Z of a series branch: 2 R S11/S21.
    printed((100 * Math.hypot(s[0]!, s[1]!)) / Math.hypot(s[4]!, s[5]!), '9.4245');
    printed(dB(s, 4), '0.03926');
  });
  it('0.5 nH in series lose 0.6595 dB at 12.890625 GHz', () => {
    printed(insertionLossDb({ kind: 'series', inductanceH: 0.5e-9 }, 12.890625e9), '0.6595');
  });
  it('100 nF in twice 50 ohm pass half the power at 15.92 kHz', () => {
    const cornerHz = 1 / (2 * Math.PI * 100e-9 * 100);
    printed(cornerHz / 1e3, '15.92');
    expect(insertionLossDb({ kind: 'series', capacitanceF: 100e-9 }, cornerHz)).toBeCloseTo(
      10 * Math.log10(2),
      12,
    );
  });
  it.each([
    [0.2e-12, 5e9, '16.1835', '0.1059'],
    [0.2e-12, 10e9, '10.4658', '0.4088'],
    [0.2e-12, 12.890625e9, '8.5111', '0.6595'],
    [0.5e-12, 5e9, '8.7417', '0.6229'],
  ])('%d F to ground at %d Hz return %s dB and lose %s dB', (capacitanceF, f, returned, lost) => {
    printed(returnLossDb({ kind: 'shunt', capacitanceF }, f), returned);
    printed(insertionLossDb({ kind: 'shunt', capacitanceF }, f), lost);
  });
});

describe('the package model of IEEE Std 802.3 Annex 93A (equations 93A-8 to 93A-14)', () => {
  /** gamma of the line at 12.890625 GHz in 1/mm: nepers as loss, radians as delay. */
  const f = 12.890625e9;
  const [neper, radian] = [0.008101, 0.500558];
  it.each([
    [12, -0.03736, 0.05322, 0.884],
    [30, -0.10909, 0.07305, 2.2273],
  ])('its line of %d mm and 78.2 ohm in 2 x 50: S11 = %d + j%d, %d dB', (mm, re, im, lostDb) => {
    // In 100 ohm, the two conductors together, a line of 78.2 ohm is one of 39.1 ohm in 50.
    const lengthM = mm / 1e3;
    const dBPerM = (neper * 1e3 * 20) / Math.LN10;
    const element: ChannelElement = {
      ...line(39.1, lengthM, ((radian * 1e3 * c0) / (2 * Math.PI * f)) ** 2),
      lossLinearDbPerM: dBPerM / (f / 1e9),
    };
    const { s } = networkOf(element, f);
    expect(Math.hypot(s[0]! - re, s[1]! - im)).toBeLessThan(3e-5);
    expect(Math.abs(dB(s, 4) - lostDb)).toBeLessThan(2e-4);
  });
  it('its capacitance to ground: S11 = -jwC R0/(2 + jwC R0)', () => {
    const y = 2 * Math.PI * f * 0.25e-12 * 50;
    const { s } = networkOf({ kind: 'shunt', capacitanceF: 0.25e-12 }, f);
    expect(s[0]).toBeCloseTo((-y * y) / (4 + y * y), 12);
    expect(s[1]).toBeCloseTo((-2 * y) / (4 + y * y), 12);
  });
});

describe('two elements joined (formula A5)', () => {
  it('of equal impedance are one of the sum of their lengths', () => {
    const [a, b, both] = [0.3, 0.5, 0.8].map((lengthM) => networkOf(line(72, lengthM, 3), 1.1e9).s);
    cascade2Into(a!, a!, b!, 1);
    a!.forEach((value, k) => expect(value).toBeCloseTo(both![k]!, 12));
  });
});
