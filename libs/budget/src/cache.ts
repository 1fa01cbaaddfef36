import type { BuiltElement } from '@tollgate/elements';

/** Built elements of earlier checks, so that an edit of one element builds only that one. Bounded; least recently used goes. */
export interface CheckCache {
  /** A short name for these frequencies, equal for equal frequencies. */
  gridKey(frequenciesHz: Float64Array): string;
  get(key: string): BuiltElement | undefined;
  set(key: string, built: BuiltElement): void;
}

/** However few the entries, their numbers together stay below this. */
const mostBytes = 192 * 1024 * 1024;
/** Grids told apart at one time. */
const mostGrids = 64;

/** @param maxEntries elements kept, each on one grid */
export function createCheckCache(maxEntries = 600): CheckCache {
  const entries = new Map<string, BuiltElement>();
  const grids: { key: string; frequenciesHz: Float64Array }[] = [];
  let bytes = 0;
  let named = 0;
  const drop = (key: string): void => {
    bytes -= entries.get(key)?.s.byteLength ?? 0;
    entries.delete(key);
  };
  return {
    gridKey(frequenciesHz) {
      const known = grids.find((grid) => sameNumbers(grid.frequenciesHz, frequenciesHz));
      if (known) return known.key;
      const key = `grid${named++}`;
      grids.push({ key, frequenciesHz: frequenciesHz.slice() });
      if (grids.length > mostGrids) grids.shift();
      return key;
    },
    get(key) {
      const built = entries.get(key);
      if (!built) return undefined;
      entries.delete(key);
      entries.set(key, built);
      return built;
    },
    set(key, built) {
      drop(key);
      entries.set(key, built);
      bytes += built.s.byteLength;
      for (const oldest of entries.keys()) {
        if (entries.size <= maxEntries && bytes <= mostBytes) break;
        drop(oldest);
      }
    },
  };
}

function sameNumbers(a: Float64Array, b: Float64Array): boolean {
  if (a.length !== b.length || a[a.length - 1] !== b[b.length - 1]) return false;
  for (let k = 0; k < a.length; k++) if (a[k] !== b[k]) return false;
  return true;
}
