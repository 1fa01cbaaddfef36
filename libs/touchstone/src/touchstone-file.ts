import type { Network } from '@tollgate/network';

/** Why a Touchstone file was refused: where, what is wrong, and how to mend it. */
export class TouchstoneError extends Error {
  constructor(
    readonly fileName: string,
    /** Line number from 1; 0 where no single line is at fault. */
    readonly line: number,
    readonly reason: string,
    readonly mend: string,
  ) {
    super(`${fileName}${line > 0 ? `, line ${line}` : ''}: ${reason} ${mend}`);
    this.name = 'TouchstoneError';
  }
}

export type FrequencyUnit = 'Hz' | 'kHz' | 'MHz' | 'GHz';
export type Parameter = 'S' | 'Y' | 'Z' | 'H' | 'G';
export type NumberFormat = 'MA' | 'DB' | 'RI';
export type MatrixFormat = 'Full' | 'Lower' | 'Upper';
export type TwoPortOrder = '12_21' | '21_12';

/** What the option line says, defaults filled in (GHz S MA R 50). */
export interface OptionLine {
  readonly unit: FrequencyUnit;
  readonly parameter: Parameter;
  readonly format: NumberFormat;
  /** One pair (real, imaginary), or a pair a port where the line carries several. */
  readonly referenceOhm: readonly (readonly [number, number])[];
  /** Whether the line itself names a reference. */
  readonly referenceStated: boolean;
}

export interface NoiseRow {
  readonly frequencyHz: number;
  readonly minimumNoiseFigureDb: number;
  readonly optimumReflectionMagnitude: number;
  readonly optimumReflectionAngleDeg: number;
  /** Effective noise resistance in ohm, no longer normalised. */
  readonly noiseResistanceOhm: number;
}

export interface FileWarning {
  /** Line number from 1; 0 for the file as a whole. */
  readonly line: number;
  readonly text: string;
}

/** A file that was read whole. */
export interface TouchstoneFile {
  readonly fileName: string;
  readonly version: '1.0' | '2.0' | '2.1';
  /** S of the single-ended ports in the file's own order, whatever parameter, format or modes the file holds. */
  readonly network: Network;
  readonly option: OptionLine;
  readonly matrixFormat: MatrixFormat;
  readonly twoPortOrder: TwoPortOrder;
  /** The tokens of [Mixed-Mode Order]; absent for single-ended data. */
  readonly mixedModeOrder?: readonly string[];
  /** Port impedances that a field solver wrote as comments, ports pairs a point; where present they are the references. */
  readonly perPointReferenceOhm?: Float64Array;
  /** True where a reference has an imaginary part, so that the wave definition must be known. */
  readonly complexReference: boolean;
  readonly noise: readonly NoiseRow[];
  /** The first comments, without their marks. */
  readonly comments: readonly string[];
  readonly commentCount: number;
  readonly warnings: readonly FileWarning[];
}
