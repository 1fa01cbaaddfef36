import type { QuantityField } from '@tollgate/contracts';

/** What the desk is asked: a trace, or a pair where there is a gap. */
export interface DeskQuestion {
  readonly layer: string;
  readonly widthM: number;
  readonly gapM: number | undefined;
  readonly frequencyHz: number;
}

export const startQuestion: DeskQuestion = {
  layer: '',
  widthM: 125e-6,
  gapM: undefined,
  frequencyHz: 10e9,
};

export const deskFields = {
  width: { dimension: 'length', label: 'Width', unit: 'um', above: 0, max: 0.1 },
  gap: { dimension: 'length', label: 'Gap', unit: 'um', above: 0, max: 0.1 },
  frequency: { dimension: 'frequency', label: 'Frequency', unit: 'GHz', above: 0, max: 1e13 },
  impedance: { dimension: 'resistance', label: 'Impedance', unit: 'ohm', min: 1, max: 1000 },
} as const satisfies Record<string, QuantityField>;
