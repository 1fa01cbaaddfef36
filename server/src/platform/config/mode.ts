import { readFile, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { ConfigError } from './config';

/**
 * A data directory stays what it was made as: known sign-ins of a demonstration must never answer outside one, and a real
 * directory must never show demonstration sign-ins.
 */
export async function holdMode(dataDirectory: string, demonstration: boolean): Promise<void> {
  const path = join(dataDirectory, 'mode');
  const wanted = demonstration ? 'demonstration' : 'real';
  const made = await readFile(path, 'utf8').catch((error: NodeJS.ErrnoException) => {
    if (error.code === 'ENOENT') return undefined;
    throw error;
  });
  if (made === undefined) return writeFile(path, `${wanted}\n`, { mode: 0o600 });
  if (made.trim() === wanted) return;
  throw new ConfigError(
    `The data directory ${dataDirectory} was made ${made.trim() === 'demonstration' ? 'for a demonstration' : 'for real work'}: set TOLLGATE_DEMO=${made.trim() === 'demonstration' ? '1' : '0'}, or name another with TOLLGATE_DATA.`,
  );
}
