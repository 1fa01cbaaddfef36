import { quantity, type QuantityField } from '../quantity';

/** Below this an impedance is a short and not a line: reflections in it would be 0/0 at 0 Hz. */
const leastOhm = 1e-6;

/** The quantities elements share; a bound is written here once for schema, form and JSON Schema. */
type Extra = Partial<QuantityField>;

export const length = (label = 'Length', extra: Extra = {}) =>
  quantity({ dimension: 'length', label, unit: 'mm', min: 0, max: 1_000, ...extra });

export const impedance = (label = 'Characteristic impedance') =>
  quantity({ dimension: 'resistance', label, unit: 'ohm', min: leastOhm, max: 1e6 });

export const resistance = (label = 'Resistance') =>
  quantity({ dimension: 'resistance', label, unit: 'ohm', min: 0, max: 1e15 });

export const inductance = (label = 'Inductance') =>
  quantity({ dimension: 'inductance', label, unit: 'nH', min: 0, max: 1e6 });

export const capacitance = (label = 'Capacitance') =>
  quantity({ dimension: 'capacitance', label, unit: 'pF', min: 0, max: 1e6 });

/** A capacitance that carries the current: zero would be an open circuit that no signal crosses. */
export const seriesCapacitance = (label = 'Capacitance') =>
  quantity({ dimension: 'capacitance', label, unit: 'nF', above: 0, max: 1e6 });

export const permittivity = (label = 'Effective permittivity') =>
  quantity({ dimension: 'ratio', label, unit: '', min: 1, max: 1e4 });

export const lossPerLength = (label: string, hint: string) =>
  quantity({ dimension: 'lossPerLength', label, unit: 'dB/m', min: 0, max: 1e9, hint });

export const lossDb = (label: string) =>
  quantity({ dimension: 'loss', label, unit: 'dB', min: 0, max: 1000 });

export const frequency = (label: string, extra: Extra = {}) =>
  quantity({ dimension: 'frequency', label, unit: 'GHz', min: 0, max: 1e13, ...extra });
