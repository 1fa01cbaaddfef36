import type { DataBlock } from './data-block';
import type { ImpedanceComments } from './impedance-comments';
import { NumberScanner } from './number-scanner';
import { decodeText } from './text';
import type { NoiseRow } from './touchstone-file';

/** What a data section needs to know of its file. */
export interface DataRules {
  readonly version2: boolean;
  /** Values of the first column of a pair are dB. */
  readonly decibels: boolean;
  /** Power of ten of the frequency unit. */
  readonly shift: number;
  /** Where the number of ports comes from, in words. */
  readonly portsFrom: string;
  readonly refuse: (line: number, reason: string, mend: string) => never;
  readonly warn: (line: number, text: string) => void;
}

/** The numbers of a file: network points first, then noise rows. Every line is checked before it is taken. */
export class DataSection {
  readonly noise: NoiseRow[] = [];
  private readonly scanner = new NumberScanner();
  private noiseBegun = false;
  private pointLine = 0;
  private warnedLayout = false;
  private warnedSpace = false;

  constructor(
    readonly block: DataBlock,
    readonly impedances: ImpedanceComments,
    private readonly rules: DataRules,
  ) {}

  beginNoise(): void {
    this.noiseBegun = true;
  }

  /** One line of numbers; the byte at `end` exists and is a line end. */
  take(bytes: Uint8Array, start: number, end: number, line: number): void {
    const { block, scanner } = this;
    const shift = block.midPoint ? 0 : this.rules.shift;
    if (scanner.scan(bytes, start, end, shift) < 0) this.refuseToken(bytes, end, line);
    this.impedances.close();
    if (scanner.hardSpace && !this.warnedSpace) {
      this.warnedSpace = true;
      this.rules.warn(line, 'Non-breaking spaces stand between numbers; they are read as spaces.');
    }
    if (scanner.count === 0) return;
    if (this.noiseBegun) this.takeNoise(line);
    else this.takeRow(block, line);
  }

  /** Refuses a point that is not complete where `line` ends it. */
  endPoint(line: number): void {
    if (this.block.midPoint) this.refuseCut(this.block, line);
  }

  private refuseToken(bytes: Uint8Array, end: number, line: number): never {
    const at = this.scanner.faultAt;
    const token = decodeText(bytes, at, end, 200).split(/[\s!]/)[0]!.slice(0, 40);
    if (this.scanner.fault === 'comma') {
      this.rules.refuse(
        line,
        `"${token}" holds a comma or semicolon.`,
        'Write decimal points, and spaces between numbers.',
      );
    }
    this.rules.refuse(
      line,
      `"${token}" is no number.`,
      'Correct it; only numbers and ! comments may stand here.',
    );
  }

  private takeRow(block: DataBlock, line: number): void {
    const { values, count } = this.scanner;
    let from = 0;
    if (block.midPoint) {
      if (count % 2 === 1) this.refuseCut(block, line);
    } else {
      if (count % 2 === 0) this.refuseNoFrequency(block, line, count);
      const frequencyHz = values[0]!;
      if (this.isNoise(block, frequencyHz, count)) {
        this.noiseBegun = true;
        this.takeNoise(line);
        return;
      }
      this.checkFrequency(block, frequencyHz, line);
      this.pointLine = line;
      block.begin(frequencyHz);
      from = 1;
    }
    if (count - from > block.missingValues) this.refuseTooMany(block, line, count);
    this.checkFinite(values, from, count, line);
    this.checkLayout(block, line, count - from);
    block.add(values, from, count - from);
  }

  /** Noise of version 1 begins where the frequency does not rise any more (Touchstone 1.1, "noise parameter data"). */
  private isNoise(block: DataBlock, frequencyHz: number, count: number): boolean {
    return (
      !this.rules.version2 &&
      block.ports === 2 &&
      count === 5 &&
      block.points > 0 &&
      frequencyHz <= block.lastHz
    );
  }

  private checkFrequency(block: DataBlock, frequencyHz: number, line: number): void {
    if (!Number.isFinite(frequencyHz) || frequencyHz < 0) {
      this.rules.refuse(
        line,
        `The frequency ${frequencyHz} Hz is not a finite number from 0 up.`,
        'Correct it.',
      );
    }
    if (block.points > 0 && frequencyHz <= block.lastHz) {
      const what = frequencyHz === block.lastHz ? 'stands twice' : `follows ${block.lastHz} Hz`;
      this.rules.refuse(
        line,
        `The frequency ${frequencyHz} Hz ${what}.`,
        'Sort the points upwards, each frequency once.',
      );
    }
  }

  private checkFinite(values: Float64Array, from: number, count: number, line: number): void {
    const { decibels } = this.rules;
    for (let k = from; k < count; k++) {
      const value = values[k]!;
      if (Number.isFinite(value)) continue;
      if (decibels && (k - from) % 2 === 0 && value === -Infinity) continue;
      this.rules.refuse(line, `Value ${k + 1} of the line is ${value}.`, 'Give finite numbers only.');
    }
    if (!decibels) return;
    for (let k = from; k < count; k += 2) {
      if (values[k]! > 2000)
        this.rules.refuse(line, `Value ${k + 1} of the line is ${values[k]} dB.`, 'Correct it.');
    }
  }

  /** Version 1 writes each row of a matrix on lines of its own, four pairs at most: other layouts are read, and named once. */
  private checkLayout(block: DataBlock, line: number, count: number): void {
    if (this.warnedLayout || block.ports < 3 || this.rules.version2) return;
    if (count > 8) {
      this.warnedLayout = true;
      this.rules.warn(
        line,
        `${count / 2} pairs on one line, where version 1 has four at most; read in order.`,
      );
    }
  }

  private refuseTooMany(block: DataBlock, line: number, count: number): never {
    const since = this.pointLine === line ? '' : ` (begun on line ${this.pointLine})`;
    this.rules.refuse(
      line,
      `The point${since} has more than the ${block.valuesAPoint} numbers of ${block.ports} ports: ${count} on this line where ${block.missingValues} are missing.`,
      `Check that the file has ${block.ports} ports, as its ${this.rules.portsFrom} says.`,
    );
  }

  private refuseNoFrequency(block: DataBlock, line: number, count: number): never {
    this.rules.refuse(
      line,
      `A point must begin with a frequency and pairs; this line has ${count} numbers${
        block.points > 0 ? `, behind a point that was complete with ${block.valuesAPoint}` : ''
      }.`,
      `Check that no value is missing, and that the file has ${block.ports} ports as it says.`,
    );
  }

  private refuseCut(block: DataBlock, line: number): never {
    this.rules.refuse(
      line,
      `The point begun on line ${this.pointLine} has ${block.valuesSoFar} of its ${block.valuesAPoint} numbers when it ends.`,
      `A row is missing or cut, or the file has not ${block.ports} ports. Export it again.`,
    );
  }

  private takeNoise(line: number): void {
    const { values, count } = this.scanner;
    if (count !== 5) {
      this.rules.refuse(
        line,
        `A noise row has 5 numbers; this line has ${count}.`,
        'Give frequency, dB, magnitude, angle, resistance.',
      );
    }
    this.checkFinite(values, 1, 5, line);
    // The scanner has shifted the frequency: noise rows begin where no point is open.
    const frequencyHz = values[0]!;
    const last = this.noise[this.noise.length - 1];
    if (!(frequencyHz >= 0) || (last && frequencyHz <= last.frequencyHz)) {
      this.rules.refuse(
        line,
        `The noise frequency ${frequencyHz} Hz does not rise.`,
        'Sort the noise rows upwards.',
      );
    }
    this.noise.push({
      frequencyHz,
      minimumNoiseFigureDb: values[1]!,
      optimumReflectionMagnitude: values[2]!,
      optimumReflectionAngleDeg: values[3]!,
      noiseResistanceOhm: values[4]!,
    });
  }
}
