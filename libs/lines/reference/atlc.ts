import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { atlc } from '../../../test/support/needs';

/** What a pixel is made of: ground, the trace, the other trace of a pair, or a dielectric. */
export type Pixel = 'ground' | 'trace' | 'other' | number;

/**
 * Impedances of a picture by atlc's finite differences, which cuts everything to pixels: the error falls as their size to the power 4/3.
 * @param at what lies at a pixel, counted from the lower left corner
 * @returns Z0 of a trace in `single`; of a pair `even` and `odd`
 */
export function atlcImpedances(
  width: number,
  height: number,
  at: (x: number, y: number) => Pixel,
): Record<'single' | 'even' | 'odd', number> {
  const folder = mkdtempSync(join(tmpdir(), 'tollgate-atlc-'));
  try {
    const colours = new Map<number, number>();
    writeFileSync(
      join(folder, 'section.bmp'),
      bitmap(width, height, (x, y) => colourOf(at(x, y), colours)),
    );
    const dielectrics = [...colours].flatMap(([dk, colour]) => ['-d', `${colour.toString(16)}=${dk}`]);
    const run = spawnSync(atlc.path, ['-s', '-S', '-c', '1e-6', ...dielectrics, 'section.bmp'], {
      cwd: folder,
      encoding: 'utf8',
    });
    if (run.status !== 0) throw new Error(`atlc failed: ${run.stderr || String(run.error)}`);
    return {
      single: valueOf(run.stdout, 'Zo'),
      even: valueOf(run.stdout, 'Zeven'),
      odd: valueOf(run.stdout, 'Zodd'),
    };
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

function valueOf(text: string, name: string): number {
  return Number(new RegExp(`\\b${name}=\\s*([0-9.]+)`).exec(text)?.[1]);
}

const conductors = { trace: 0xff0000, ground: 0x00ff00, other: 0x0000ff } as const;

function colourOf(pixel: Pixel, colours: Map<number, number>): number {
  if (typeof pixel === 'string') return conductors[pixel];
  if (pixel === 1) return 0xffffff;
  const known = colours.get(pixel) ?? 0x808010 + colours.size;
  colours.set(pixel, known);
  return known;
}

/** A bitmap of 24 bits a pixel, bottom row first. */
function bitmap(width: number, height: number, colour: (x: number, y: number) => number): Buffer {
  const stride = Math.ceil((width * 3) / 4) * 4;
  const bytes = Buffer.alloc(54 + stride * height);
  bytes.write('BM');
  bytes.writeUInt32LE(bytes.length, 2);
  bytes.writeUInt32LE(54, 10);
  bytes.writeUInt32LE(40, 14);
  bytes.writeInt32LE(width, 18);
  bytes.writeInt32LE(height, 22);
  bytes.writeUInt16LE(1, 26);
  bytes.writeUInt16LE(24, 28);
  bytes.writeUInt32LE(stride * height, 34);
  for (let y = 0; y < height; y++) {
    for (let x = 0; x < width; x++) bytes.writeUIntLE(colour(x, y), 54 + y * stride + x * 3, 3);
  }
  return bytes;
}
