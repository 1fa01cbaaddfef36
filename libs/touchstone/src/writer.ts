import type { Network } from '@tollgate/network';
import { checkNetwork } from '@tollgate/network';
import { ByteWriter } from './byte-writer';
import { entryOffsets } from './data-block';
import { modeReferences, parseModeOrder, portsToModes } from './mixed-mode-order';
import { unitPower } from './option-line';
import { sToParameter } from './parameters';
import type {
  FrequencyUnit,
  MatrixFormat,
  NoiseRow,
  NumberFormat,
  Parameter,
  TwoPortOrder,
} from './touchstone-file';
import { TouchstoneError } from './touchstone-file';

export interface WriteOptions {
  /** Version 1.1 takes one real reference for all ports; 2.0 one a port. */
  readonly version: '1.1' | '2.0';
  /** Default RI, which loses nothing. */
  readonly format?: NumberFormat;
  /** Default Hz. */
  readonly unit?: FrequencyUnit;
  /** Default S. */
  readonly parameter?: Parameter;
  /** Lines put at the head, each behind a comment mark. */
  readonly comments?: readonly string[];
  readonly noise?: readonly NoiseRow[];
  /** Version 2 only: default Full. Triangles are refused for what is not symmetric. */
  readonly matrixFormat?: MatrixFormat;
  /** Version 2 only: default 12_21. */
  readonly twoPortOrder?: TwoPortOrder;
  /** Version 2 only: writes mixed-mode data, such as `['D1,2', 'D3,4', 'C1,2', 'C3,4']`. */
  readonly mixedModeOrder?: readonly string[];
}

declare const TextDecoder: new () => { decode(bytes: Uint8Array): string };

const bytesAChunk = 1 << 16;
/** 20 log10 of zero as a number that every reader takes: 1e-300. */
const zeroDb = -6000;

/**
 * A network as Touchstone text. Numbers are written with the fewest digits that read back as the same double.
 * @throws TouchstoneError for what the version cannot hold
 */
export function writeTouchstone(network: Network, options: WriteOptions): string {
  let text = '';
  for (const bytes of writeTouchstoneChunks(network, options)) text += new TextDecoder().decode(bytes);
  return text;
}

/** The same in pieces of bytes (UTF-8), so that a large network needs no text of its size. Each is valid until the next is asked for. */
export function* writeTouchstoneChunks(network: Network, options: WriteOptions): Generator<Uint8Array> {
  checkNetwork(network);
  const { ports, frequenciesHz } = network;
  const version2 = options.version === '2.0';
  const referenceOhm = realReferences(network, version2);
  const entries = inWrittenForm(network, options, referenceOhm);
  const matrixFormat = (version2 && options.matrixFormat) || 'Full';
  if (matrixFormat !== 'Full') refuseAsymmetric(entries, ports);
  const order: TwoPortOrder = version2 ? (options.twoPortOrder ?? '12_21') : '21_12';
  const writer = new ByteWriter();
  writer.text(header(network, options, referenceOhm, { version2, matrixFormat, order }));
  const lines = linesOfPoint(entryOffsets(ports, matrixFormat, order), ports, version2);
  const shift = unitPower[options.unit ?? 'Hz'];
  const format = options.format ?? 'RI';
  for (let point = 0; point < frequenciesHz.length; point++) {
    if (shift === 0) writer.number(frequenciesHz[point]!);
    else writer.text(shiftDecimal(frequenciesHz[point]!, shift));
    for (const offsets of lines) writeLine(writer, entries, point * ports * ports * 2, offsets, format);
    if (writer.waiting >= bytesAChunk) yield writer.take();
  }
  writer.text(
    noiseText(options, shift, version2 ? 1 : referenceOhm[0]!, version2) + (version2 ? '[End]\n' : ''),
  );
  yield writer.take();
}

function refuse(reason: string, mend: string): never {
  throw new TouchstoneError('(output)', 0, reason, mend);
}

function realReferences(network: Network, version2: boolean): number[] {
  const { ports, referenceOhm } = network;
  if (referenceOhm.some((value, k) => k % 2 === 1 && value !== 0)) {
    refuse('Touchstone has no place for complex references.', 'Renormalise to real references first.');
  }
  const real = Array.from({ length: ports }, (_, port) => referenceOhm[port * 2]!);
  if (!version2 && real.some((z) => z !== real[0])) {
    refuse('Version 1 has one reference for all ports.', 'Renormalise to one, or write version 2.0.');
  }
  return real;
}

function inWrittenForm(network: Network, options: WriteOptions, referenceOhm: number[]): Float64Array {
  const { ports, frequenciesHz } = network;
  const parameter = options.parameter ?? 'S';
  const version2 = options.version === '2.0';
  if ((parameter === 'H' || parameter === 'G') && ports !== 2) {
    refuse(`${parameter} parameters are for 2 ports only.`, 'Write S parameters.');
  }
  if (!version2 && (options.mixedModeOrder || (options.matrixFormat ?? 'Full') !== 'Full')) {
    refuse('Version 1 has no mixed modes and no triangles.', 'Write version 2.0.');
  }
  if (options.noise?.length && ports !== 2) refuse('Noise data are for 2 ports only.', 'Leave them out.');
  if (parameter === 'S' && !options.mixedModeOrder) return network.s;
  const entries = network.s.slice();
  let modeOhm: number[] | null = referenceOhm;
  if (options.mixedModeOrder) {
    const modes = parseModeOrder(options.mixedModeOrder, ports);
    if ('reason' in modes) refuse(modes.reason, modes.mend);
    modeOhm = modeReferences(modes, referenceOhm);
    if (!modeOhm) refuse('The ports of a pair have different references.', 'Renormalise them to one.');
    portsToModes(entries, frequenciesHz.length, modes);
  }
  const job = { ports, points: frequenciesHz.length, referenceOhm: modeOhm };
  const failed = sToParameter(entries, parameter, job, !version2);
  if (failed >= 0) {
    refuse(`There are no ${parameter} parameters at ${frequenciesHz[failed]} Hz.`, 'Write S parameters.');
  }
  return entries;
}

function refuseAsymmetric(entries: Float64Array, ports: number): void {
  for (let entry = 0; entry < entries.length / 2; entry++) {
    const inPoint = entry % (ports * ports);
    const other = entry - inPoint + (inPoint % ports) * ports + Math.floor(inPoint / ports);
    if (entries[entry * 2] !== entries[other * 2] || entries[entry * 2 + 1] !== entries[other * 2 + 1]) {
      refuse('A triangle cannot hold a matrix that is not symmetric.', 'Write the full matrix.');
    }
  }
}

function header(
  network: Network,
  options: WriteOptions,
  referenceOhm: readonly number[],
  form: { version2: boolean; matrixFormat: MatrixFormat; order: TwoPortOrder },
): string {
  const { ports, frequenciesHz } = network;
  const lines = (options.comments ?? []).map((text) => `! ${text.replace(/[\r\n]+/g, ' ')}`);
  const option = `# ${options.unit ?? 'Hz'} ${options.parameter ?? 'S'} ${options.format ?? 'RI'} R ${referenceOhm[0]}`;
  if (!form.version2) return `${[...lines, option].join('\n')}\n`;
  lines.push('[Version] 2.0', option, `[Number of Ports] ${ports}`);
  if (ports === 2) lines.push(`[Two-Port Data Order] ${form.order}`);
  lines.push(`[Number of Frequencies] ${frequenciesHz.length}`);
  if (options.noise?.length) lines.push(`[Number of Noise Frequencies] ${options.noise.length}`);
  lines.push(`[Reference] ${referenceOhm.join(' ')}`, `[Matrix Format] ${form.matrixFormat}`);
  if (options.mixedModeOrder) lines.push(`[Mixed-Mode Order] ${options.mixedModeOrder.join(' ')}`);
  lines.push('[Network Data]');
  return `${lines.join('\n')}\n`;
}

/** Each row of a matrix of 3 or more ports on lines of its own, in version 1 of four pairs at most; else one line: where their entries begin within a point. */
function linesOfPoint(offsets: Int32Array, ports: number, version2: boolean): number[][] {
  const lines: number[][] = [];
  let row = -1;
  for (const offset of offsets) {
    const last = lines[lines.length - 1];
    const ownRow = Math.floor(offset / (ports * 2));
    const full = !version2 && ports > 2 && last?.length === 4;
    if (!last || full || (ports > 2 && ownRow !== row)) lines.push([offset]);
    else last.push(offset);
    row = ownRow;
  }
  return lines;
}

function writeLine(
  writer: ByteWriter,
  entries: Float64Array,
  base: number,
  offsets: readonly number[],
  format: NumberFormat,
): void {
  for (let k = 0; k < offsets.length; k++) {
    const re = entries[base + offsets[k]!]!;
    const im = entries[base + offsets[k]! + 1]!;
    if (format === 'RI') {
      writer.spacedNumber(re);
      writer.spacedNumber(im);
      continue;
    }
    const size = Math.hypot(re, im);
    if (format === 'MA') writer.spacedNumber(size);
    else writer.spacedNumber(size === 0 ? zeroDb : 20 * Math.log10(size));
    writer.spacedNumber((Math.atan2(im, re) * 180) / Math.PI);
  }
  writer.lineEnd();
}

function noiseText(options: WriteOptions, shift: number, referenceOhm: number, version2: boolean): string {
  if (!options.noise?.length) return '';
  const rows = options.noise.map(
    (row) =>
      `${shiftDecimal(row.frequencyHz, shift)} ${row.minimumNoiseFigureDb} ${row.optimumReflectionMagnitude} ` +
      `${row.optimumReflectionAngleDeg} ${row.noiseResistanceOhm / referenceOhm}\n`,
  );
  return `${version2 ? '[Noise Data]' : '! noise'}\n${rows.join('')}`;
}

/** value / 10^power in decimal digits, so that reading it back in that unit gives the same double. */
export function shiftDecimal(value: number, power: number): string {
  const text = String(value);
  if (power === 0 || value === 0) return text;
  const match = /^(\d+)(?:\.(\d+))?(?:e([+-]\d+))?$/.exec(text);
  if (!match) return text;
  const digits = match[1]! + (match[2] ?? '');
  const point = match[1]!.length + Number(match[3] ?? 0) - power;
  const padded = point <= 0 ? '0'.repeat(1 - point) + digits : digits.padEnd(point, '0');
  const at = Math.max(1, point);
  const whole = padded.slice(0, at).replace(/^0+(?=\d)/, '');
  const fraction = padded.slice(at).replace(/0+$/, '');
  return fraction ? `${whole}.${fraction}` : whole;
}
