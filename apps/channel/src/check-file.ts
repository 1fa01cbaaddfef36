import { createHash } from 'node:crypto';
import { readFileSync, writeFileSync } from 'node:fs';
import { basename, resolve } from 'node:path';
import { canonicalBytes, checkChannel, readChannel, toResponse, toView, type Check } from '@tollgate/budget';
import { bounds, type FieldProblem } from '@tollgate/contracts';
import { TouchstoneError, writeTouchstone } from '@tollgate/touchstone';
import type { Command } from './command';
import { readParts, systemReason } from './part-files';
import { Refused, refuse, spoken, type Refusal } from './refused';
import { verdictLines } from './verdict-lines';

export const exitCodes = { holds: 0, exceeds: 1, wrong: 2 } as const;

/** What a run came to: lines for standard output and standard error, and the exit code. */
export interface Outcome {
  readonly out: string;
  readonly errors: string;
  readonly exitCode: number;
}

/**
 * Checks the channel file that a command names and writes what it asks for.
 * @param folder where relative paths of the command begin
 * @throws Refused where the file, a part or an output cannot be used
 */
export function checkFile(command: Command, folder: string): Outcome {
  const path = resolve(folder, command.file);
  const read = readChannel(readDocument(command.file, path), { parts: 'file' });
  if (!read.ok) throw inFile(command.file, read.problems);
  const { channel } = read;
  const parts = readPartsOf(command.file, () => readParts(channel, path));
  const result = checkChannel(channel, parts);
  if (!result.ok) throw inFile(command.file, result.problems);
  const fingerprint = createHash('sha256').update(canonicalBytes(channel, parts)).digest('hex');
  const json = command.response ? JSON.stringify(toResponse(result.check, fingerprint)) : '';
  if (command.response && command.response !== '-')
    write('--response', resolve(folder, command.response), json);
  if (command.touchstone) writeNetwork(command.touchstone, folder, result.check, fingerprint);
  const view = toView(result.check, fingerprint);
  const unjudged = view.limits.flatMap((limit, i) => {
    if (limit.verdict !== 'not-judged') return [];
    const where = `${command.file}: limits[${i}] (${limit.title})`;
    return spoken({
      where,
      message: `Not judged: ${limit.reason}`,
      mend: mendOf(limit.missingHz.length > 0),
    });
  });
  const exitCode =
    view.verdict === 'exceeds' ? exitCodes.exceeds : unjudged.length ? exitCodes.wrong : exitCodes.holds;
  const out = command.response === '-' ? json : verdictLines(channel.name, view).join('\n');
  return { out: `${out}\n`, errors: unjudged.map((line) => `${line}\n`).join(''), exitCode };
}

function mendOf(missing: boolean): string {
  return missing
    ? "Widen the grid, or use parts measured over the limit's whole range."
    : 'Correct the limit or the channel so that they fit together.';
}

function readDocument(named: string, path: string): unknown {
  let text: string;
  try {
    text = readFileSync(path, 'utf8');
  } catch (error) {
    const reason = systemReason(error);
    if (!reason) throw error;
    return refuse(named, `The channel file cannot be read: ${reason}.`, 'Correct its name or its rights.');
  }
  if (text.length > bounds.documentBytes) {
    refuse(named, 'The channel file is larger than 2 MB.', 'Keep measured data in Touchstone parts.');
  }
  try {
    return JSON.parse(text.replace(/^\ufeff/, '')) as unknown;
  } catch (error) {
    if (!(error instanceof SyntaxError)) throw error;
    return refuse(
      named,
      `This is not JSON: ${error.message}.`,
      'A channel file is one JSON document in UTF-8.',
    );
  }
}

function readPartsOf<Result>(named: string, run: () => Result): Result {
  try {
    return run();
  } catch (error) {
    if (!(error instanceof Refused)) throw error;
    throw new Refused(error.refusals.map((refusal) => inNamed(named, refusal)));
  }
}

function inFile(named: string, problems: readonly FieldProblem[]): Refused {
  return new Refused(
    problems.map(({ path, message, mend }) => inNamed(named, { where: path, message, mend })),
  );
}

function inNamed(named: string, refusal: Refusal): Refusal {
  return { ...refusal, where: refusal.where ? `${named}: ${refusal.where}` : named };
}

function writeNetwork(named: string, folder: string, check: Check, fingerprint: string): void {
  const { network } = check;
  const ending = `.s${network.ports}p`;
  if (!named.toLowerCase().endsWith(ending)) {
    refuse('--touchstone', `${named} does not end in ${ending}.`, `The channel has ${network.ports} ports.`);
  }
  const references = Array.from({ length: network.ports }, (_, port) => network.referenceOhm[port * 2]);
  const version = references.every((ohm) => ohm === references[0]) ? '1.1' : '2.0';
  const comments = [`${check.channel.name}`, `fingerprint ${fingerprint}`];
  try {
    write('--touchstone', resolve(folder, named), writeTouchstone(network, { version, comments }));
  } catch (error) {
    if (!(error instanceof TouchstoneError)) throw error;
    refuse(`--touchstone ${basename(named)}`, error.reason, error.mend);
  }
}

function write(option: string, path: string, text: string): void {
  try {
    writeFileSync(path, text);
  } catch (error) {
    const reason = systemReason(error);
    if (!reason) throw error;
    refuse(option, `${path} cannot be written: ${reason}.`, 'Correct the path or the rights.');
  }
}
