import { createHash } from 'node:crypto';
import { readFileSync, realpathSync, statSync } from 'node:fs';
import { basename, dirname, isAbsolute, resolve, sep } from 'node:path';
import { partsNeeded, type Part } from '@tollgate/budget';
import { bounds, type CompleteChannel } from '@tollgate/contracts';
import { readTouchstone, TouchstoneError } from '@tollgate/touchstone';
import { Refused, type Refusal } from './refused';

/**
 * Reads the Touchstone parts a channel names, each once. A path is taken from the channel file's folder and, with every
 * link followed, must stay inside it.
 * @throws Refused naming every part that cannot be used
 */
export function readParts(channel: CompleteChannel, channelFile: string): Map<string, Part> {
  const folder = realpathSync(dirname(channelFile));
  const parts = new Map<string, Part>();
  const refusals: Refusal[] = [];
  for (const { key, path } of partsNeeded(channel)) {
    if (parts.has(key)) continue;
    const part = readPart(key, folder);
    if ('message' in part) refusals.push({ ...part, where: path });
    else parts.set(key, part);
  }
  if (refusals.length) throw new Refused(refusals);
  return parts;
}

function readPart(key: string, folder: string): Part | Omit<Refusal, 'where'> {
  const outside = {
    message: `"${key}" lies outside the channel file's folder.`,
    mend: 'Put the part into that folder, or a folder inside it, and name it by its path from there.',
  };
  const wanted = resolve(folder, key);
  if (isAbsolute(key) || key.includes('\0') || !isInside(wanted, folder)) return outside;
  try {
    const real = realpathSync(wanted);
    if (!isInside(real, folder)) return outside;
    const { size } = statSync(real);
    if (!statSync(real).isFile()) {
      return { message: `"${key}" is not a file.`, mend: 'Name a Touchstone file.' };
    }
    if (size > bounds.uploadBytes) {
      return { message: `"${key}" is larger than 64 MB.`, mend: 'Thin out its frequencies.' };
    }
    const bytes = readFileSync(real);
    const sha256 = createHash('sha256').update(bytes).digest('hex');
    return { sha256, file: readTouchstone(basename(key), bytes) };
  } catch (error) {
    if (error instanceof TouchstoneError) {
      const line = error.line > 0 ? `, line ${error.line}` : '';
      return { message: `${key}${line}: ${error.reason}`, mend: error.mend };
    }
    const unread = systemReason(error);
    if (unread)
      return { message: `"${key}" cannot be read: ${unread}.`, mend: 'Correct the path or the rights.' };
    throw error;
  }
}

function isInside(path: string, folder: string): boolean {
  return path.startsWith(folder.endsWith(sep) ? folder : folder + sep);
}

/** Why the system would not open a file, in words; undefined for any other error. */
export function systemReason(error: unknown): string | undefined {
  if (!(error instanceof Error) || !('code' in error)) return undefined;
  const words: Record<string, string> = {
    ENOENT: 'there is no such file or folder',
    EACCES: 'it is not permitted',
    EISDIR: 'it is a folder',
    ENOTDIR: 'a part of its path is not a folder',
    ELOOP: 'its links run in a circle',
    ENAMETOOLONG: 'its name is too long',
    ENOSPC: 'the disk is full',
  };
  const code = String(error.code);
  return words[code] ?? code;
}
