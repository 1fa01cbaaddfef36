import { existsSync } from 'node:fs';
import { fileURLToPath } from 'node:url';

export interface WorkerFile {
  readonly filename: string;
  readonly execArgv?: string[];
  readonly env?: Record<string, string>;
}

/** Where a worker's code lies, seen from the module that starts it: bundled beside main, from source run through tsx. */
export function workerFile(from: string, name: string): WorkerFile {
  const bundled = fileURLToPath(new URL(`./${name}.mjs`, from));
  if (existsSync(bundled)) return { filename: bundled };
  // tsx finds the libraries' aliases in the base configuration only.
  const TSX_TSCONFIG_PATH = fileURLToPath(new URL('../../../tsconfig.base.json', import.meta.url));
  return {
    filename: fileURLToPath(new URL(`./${name}.ts`, from)),
    execArgv: ['--import', 'tsx'],
    env: { ...(process.env as Record<string, string>), TSX_TSCONFIG_PATH },
  };
}
