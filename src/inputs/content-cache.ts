import type { Cell } from "./cells.js";

/** Results by the content of the cells that they were made from; the least recently used one is forgotten first. */
export interface ContentCache<T> {
  find(cells: readonly Cell[]): T | undefined;
  keep(cells: readonly Cell[], value: T): void;
}

/**
 * A cache by content. Worksheets hand over a fresh array at each call and some change the old one, so nothing is told from the
 * array's identity: cells are compared one by one, which costs a microsecond or two for a site block.
 *
 * @param limit  results that are remembered
 * @returns      an empty cache
 */
export function contentCache<T>(limit: number): ContentCache<T> {
  const entries = new Map<number, { cells: readonly Cell[]; value: T }>();
  return {
    find(cells) {
      const key = digest(cells);
      const entry = entries.get(key);
      if (entry === undefined || !sameCells(entry.cells, cells)) return undefined;
      entries.delete(key);
      entries.set(key, entry); // a map keeps the order of insertion, so the first key is the least recently used
      return entry.value;
    },
    keep(cells, value) {
      const key = digest(cells);
      entries.delete(key);
      if (entries.size >= limit) entries.delete(entries.keys().next().value as number);
      entries.set(key, { cells: cells.slice(), value });
    },
  };
}

function sameCells(a: readonly Cell[], b: readonly Cell[]): boolean {
  if (a.length !== b.length) return false;
  for (let i = 0; i < a.length; i++) if (a[i] !== b[i]) return false;
  return true;
}

const bits = new DataView(new ArrayBuffer(8));

/** Cheap, and only a guess: of a text it sees the length and three letters; equality is decided by comparison. */
function digest(cells: readonly Cell[]): number {
  let hash = cells.length;
  for (const cell of cells) {
    let part: number;
    if (typeof cell === "number") {
      bits.setFloat64(0, cell);
      part = bits.getInt32(0) ^ Math.imul(bits.getInt32(4), 0x9e3779b1);
    } else if (typeof cell === "string") {
      const last = cell.length - 1;
      part = last < 0 ? 1 : Math.imul(cell.length, 0x85ebca6b) ^ (cell.charCodeAt(0) << 16) ^ (cell.charCodeAt(last) << 8) ^ cell.charCodeAt(last >> 1);
    } else part = cell === null ? 2 : cell ? 3 : 4;
    hash = Math.imul(hash ^ part, 0x01000193) ^ (hash >>> 15);
  }
  return hash;
}
