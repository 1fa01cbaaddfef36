import { createHash, randomBytes, scrypt, timingSafeEqual } from 'node:crypto';
import { promisify } from 'node:util';

const derive = promisify<
  string | Buffer,
  Buffer,
  number,
  { N: number; r: number; p: number; maxmem: number },
  Buffer
>(scrypt);

/** Hash of a password: `scrypt$logN$salt$hash`, base64url. */
export async function hashPassword(password: string, logN: number): Promise<string> {
  const salt = randomBytes(16);
  const hash = await stretch(password, salt, logN);
  return `scrypt$${logN}$${salt.toString('base64url')}$${hash.toString('base64url')}`;
}

/**
 * Whether a password belongs to a stored hash. Without a stored hash (an unknown account, an invitation not taken up) the
 * same work is done and the answer is no.
 */
export async function passwordMatches(
  password: string,
  stored: string | null | undefined,
  logN: number,
): Promise<boolean> {
  const [, storedLogN, salt, hash] = (stored ?? '').split('$');
  if (!salt || !hash) {
    await stretch(password, randomBytes(16), logN);
    return false;
  }
  const expected = Buffer.from(hash, 'base64url');
  return timingSafeEqual(
    expected,
    await stretch(password, Buffer.from(salt, 'base64url'), Number(storedLogN)),
  );
}

function stretch(password: string, salt: Buffer, logN: number): Promise<Buffer> {
  const N = 2 ** logN;
  return derive(password.normalize('NFKC'), salt, 32, { N, r: 8, p: 1, maxmem: 256 * N * 8 });
}

/** A secret for a link, and the hash that is stored in its place. */
export function newToken(): { token: string; hash: string } {
  const token = randomBytes(32).toString('base64url');
  return { token, hash: tokenHash(token) };
}

export function tokenHash(token: string): string {
  return createHash('sha256').update(token).digest('hex');
}
