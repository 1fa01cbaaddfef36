import type { DataBlock } from './data-block';
import type { ImpedanceComments } from './impedance-comments';
import type { Keywords } from './keywords';
import { modeReferences, modesToPorts, parseModeOrder } from './mixed-mode-order';
import { parseImpedance } from './option-line';
import { parameterToS } from './parameters';
import type { FileWarning, NoiseRow, OptionLine, TouchstoneFile } from './touchstone-file';

/** What the reader has gathered when the last line is in. */
export interface Gathered {
  readonly fileName: string;
  readonly lastLine: number;
  readonly keywords: Keywords;
  readonly option: OptionLine;
  readonly block: DataBlock;
  readonly impedances: ImpedanceComments | undefined;
  readonly noise: readonly NoiseRow[];
  readonly comments: readonly string[];
  readonly commentCount: number;
  readonly warnings: readonly FileWarning[];
  readonly refuse: (line: number, reason: string, mend: string) => never;
  readonly warn: (line: number, text: string) => void;
}

/** References of the ports, as pairs, from [Reference] or else the option line. */
export function portReferences(
  option: OptionLine,
  keywords: Keywords,
  ports: number,
  refuse: (reason: string, mend: string) => never,
): Float64Array {
  const said = keywords.reference;
  const list = said
    ? said.map((token) => parseImpedance(token) ?? refuse(`[Reference] holds "${token}".`, 'Write ohms.'))
    : option.referenceOhm;
  if (list.length !== ports && (said || list.length !== 1)) {
    refuse(
      `${said ? '[Reference]' : 'The option line'} gives ${list.length} references for ${ports} ports.`,
      said ? 'Give one a port.' : 'Give one, or one a port.',
    );
  }
  const pairs = new Float64Array(ports * 2);
  for (let port = 0; port < ports; port++) {
    const [re, im] = list[list.length === 1 ? 0 : port]!;
    if (!(re > 0)) refuse(`The reference of port ${port + 1} is ${re} ohm.`, 'Give a positive value.');
    pairs.set([re, im], port * 2);
  }
  return pairs;
}

function checkCounts(g: Gathered): void {
  const { frequencies, noiseFrequencies } = g.keywords;
  if (frequencies !== undefined && frequencies !== g.block.points) {
    g.refuse(
      g.lastLine,
      `[Number of Frequencies] is ${frequencies}, but the file holds ${g.block.points} points.`,
      'The file may be cut: export it again, or correct the number.',
    );
  }
  if (noiseFrequencies === undefined || noiseFrequencies === g.noise.length) return;
  if (g.noise.length > 0) {
    g.refuse(
      g.lastLine,
      `[Number of Noise Frequencies] is ${noiseFrequencies}, but the file holds ${g.noise.length} noise rows.`,
      'The file may be cut: export it again, or correct the number.',
    );
  }
  g.warn(0, `The file announces ${noiseFrequencies} noise frequencies and holds no noise data.`);
}

function toSingleEndedS(
  g: Gathered,
  entries: Float64Array,
  referenceOhm: Float64Array,
): string[] | undefined {
  const { option, block, keywords } = g;
  const { ports, points } = block;
  const tokens = keywords.modeOrder;
  const real = Array.from({ length: ports }, (_, port) => referenceOhm[port * 2]!);
  const modes = tokens ? parseModeOrder(tokens, ports) : undefined;
  if (modes && 'reason' in modes) return g.refuse(0, modes.reason, modes.mend);
  const modeOhm = modes ? modeReferences(modes, real) : real;
  if (!modeOhm) {
    return g.refuse(
      0,
      'The two ports of a pair in [Mixed-Mode Order] have different references.',
      'Give both ports of a pair one reference.',
    );
  }
  if (option.parameter !== 'S' || modes) {
    if (referenceOhm.some((value, k) => k % 2 === 1 && value !== 0)) {
      g.refuse(
        0,
        `${modes ? 'Mixed-mode data' : `${option.parameter} parameters`} with a complex reference.`,
        'Export single-ended S parameters, or use a real reference.',
      );
    }
    const normalised = (keywords.version ?? '1.0') === '1.0';
    const failed = parameterToS(
      entries,
      option.parameter,
      { ports, points, referenceOhm: modeOhm },
      normalised,
    );
    if (failed >= 0) {
      g.refuse(0, `The ${option.parameter} matrix of point ${failed + 1} has no S.`, 'Export S parameters.');
    }
  }
  if (modes) modesToPorts(entries, points, modes);
  return tokens;
}

function perPointReferences(g: Gathered, referenceOhm: Float64Array): Float64Array | undefined {
  const found = g.impedances;
  if (!found || (found.points === 0 && found.unfit === 0)) return undefined;
  if (found.points !== g.block.points || found.unfit > 0) {
    g.warn(
      0,
      `Port impedances stand in comments of ${found.points} of ${g.block.points} points only; the reference of the option line is taken.`,
    );
    return undefined;
  }
  if (found.coupled > 0) {
    g.warn(0, 'The port impedances in the comments are full matrices; their diagonals are taken.');
  }
  const pairs = Float64Array.from(found.pairs);
  const size = g.block.ports * 2;
  if (pairs.every((value, k) => value === referenceOhm[k % size])) return undefined;
  const bad = pairs.findIndex((value, k) => k % 2 === 0 && !(value > 0));
  if (bad >= 0) {
    g.warn(
      0,
      `A port impedance in the comments is ${pairs[bad]} ohm; the reference of the option line is taken.`,
    );
    return undefined;
  }
  g.warn(
    0,
    'Port impedances in comments differ from the reference of the option line; they are what the data refer to.',
  );
  return pairs;
}

function warnAboutNumbers(g: Gathered): void {
  const { block, option } = g;
  if (option.format !== 'RI' && block.points >= 20 && block.largestAngle > 3 && block.largestAngle < 6.3) {
    g.warn(
      0,
      `No angle exceeds ${block.largestAngle.toFixed(3)}: they may be radians where degrees are required.`,
    );
  }
  if (block.zeros > 0) g.warn(0, `${block.zeros} values of minus infinity dB are taken as zero.`);
}

function noiseInOhm(g: Gathered, referenceOhm: Float64Array): NoiseRow[] {
  // Version 1 normalises the noise resistance to the reference, version 2 does not.
  const scale = (g.keywords.version ?? '1.0') === '1.0' ? referenceOhm[0]! : 1;
  return g.noise.map((row) => ({ ...row, noiseResistanceOhm: row.noiseResistanceOhm * scale }));
}

/** Turns what was gathered into the file: counts checked, S of single-ended ports, references. */
export function finishFile(g: Gathered): TouchstoneFile {
  checkCounts(g);
  const { block, option, keywords } = g;
  const referenceOhm = portReferences(option, keywords, block.ports, (reason, mend) =>
    g.refuse(0, reason, mend),
  );
  const { frequenciesHz, entries } = block.take();
  const mixedModeOrder = toSingleEndedS(g, entries, referenceOhm);
  const perPointReferenceOhm = perPointReferences(g, referenceOhm);
  warnAboutNumbers(g);
  const nominal = perPointReferenceOhm ? perPointReferenceOhm.slice(0, block.ports * 2) : referenceOhm;
  const complex = (perPointReferenceOhm ?? nominal).some((value, k) => k % 2 === 1 && value !== 0);
  return {
    fileName: g.fileName,
    version: keywords.version ?? '1.0',
    network: { ports: block.ports, frequenciesHz, s: entries, referenceOhm: nominal },
    option,
    matrixFormat: keywords.matrixFormat ?? 'Full',
    twoPortOrder: keywords.twoPortOrder ?? '21_12',
    mixedModeOrder,
    perPointReferenceOhm,
    complexReference: complex,
    noise: noiseInOhm(g, referenceOhm),
    comments: g.comments,
    commentCount: g.commentCount,
    warnings: g.warnings,
  };
}
