import { spawnSync } from 'node:child_process';
import { existsSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { ngspice } from '../../../test/support/needs';

/**
 * S parameters of a circuit by ngspice's .sp analysis.
 * @param circuit elements, one a line; port k stands at node `port<k>`
 * @returns point-major, as everywhere
 */
export function scatterBySpice(
  circuit: readonly string[],
  ports: number,
  frequencies: { readonly fromHz: number; readonly toHz: number; readonly points: number },
  referenceOhm: number,
): Float64Array {
  const folder = mkdtempSync(join(tmpdir(), 'tollgate-ngspice-'));
  const numbers = Array.from({ length: ports }, (_, i) => i + 1);
  const names = numbers.flatMap((row) => numbers.map((column) => `S_${row}_${column}`));
  const { fromHz, toHz, points } = frequencies;
  try {
    writeFileSync(
      join(folder, 'via.cir'),
      [
        '* sections of a via',
        ...numbers.map((k) => `Vport${k} port${k} 0 dc 0 ac 1 portnum ${k} z0 ${referenceOhm}`),
        ...circuit,
        '.control',
        'set numdgt=15',
        `sp lin ${points} ${fromHz} ${toHz}`,
        `wrdata s.txt ${names.join(' ')}`,
        'quit',
        '.endc',
        '.end',
        '',
      ].join('\n'),
    );
    const run = spawnSync(ngspice.path, ['-b', 'via.cir'], { cwd: folder, encoding: 'utf8' });
    if (run.error) throw run.error;
    if (!existsSync(join(folder, 's.txt'))) throw new Error(`${run.stdout}\n${run.stderr}`);
    return tableOf(readFileSync(join(folder, 's.txt'), 'utf8'));
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

/** Each vector stands as frequency, real and imaginary part. */
function tableOf(text: string): Float64Array {
  const numbers = text.trim().split(/\s+/).map(Number);
  return Float64Array.from(numbers.filter((_, i) => i % 3 > 0));
}
