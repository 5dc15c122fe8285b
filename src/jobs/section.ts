import { groundSlice, holePositions, pileLengthTable, type Problem } from "../engine/index.js";

/** A vertical section of one realised ground, with what stands in it. */
export interface Section {
  /** the section runs along x at this y, m */
  readonly y: number;
  readonly from: number;
  readonly to: number;
  readonly depth: number;
  readonly columns: number;
  readonly rows: number;
  /** Young's modulus, kPa, rows x columns from the top */
  readonly modulus: Float64Array;
  /** piles whose middle lies on the section, with the length that half of all outcomes stay below, m */
  readonly piles: readonly { readonly x: number; readonly length: number }[];
  /** all holes of the count, seen from the front; off: how far before or behind the section, m */
  readonly holes: readonly { readonly x: number; readonly off: number; readonly depth: number }[];
  readonly diameter: number;
}

const COLUMNS = 144;
const ROWS = 108;
/** Piles this near to a row belong to it, m: coordinates are typed by hand. */
const ROW = 0.05;

/**
 * Makes the section through the row of piles that holds most of them.
 *
 * @param problem  the site
 * @param count    number of holes
 * @param index    number of the realised ground, whole, from 0
 * @throws {DomainError} count or index are none
 */
export function sectionOf(problem: Problem, count: number, index: number): Section {
  const { building, piles, investigation } = problem;
  const y = longestRow(building.piles);
  const holes = holePositions(problem, count);
  const lengths = pileLengthTable(problem, count, [50]);
  const inRow = building.piles.filter((pile) => Math.abs(pile.y - y) <= ROW);
  const half = building.footprint.length / 2;
  const xs = building.piles.map((pile) => pile.x as number);
  const centre = (Math.min(...xs) + Math.max(...xs)) / 2;
  const ends = [centre - half, centre + half, ...xs, ...holes.map((hole) => hole.x as number)];
  const margin = Math.max(1, (Math.max(...ends) - Math.min(...ends)) * 0.04);
  const from = Math.min(...ends) - margin;
  const to = Math.max(...ends) + margin;
  const placed = inRow.map((pile) => {
    const group = lengths.groups.find(({ load }) => Math.abs(load - pile.load) < 1e-6 * Math.max(1, pile.load));
    return { x: pile.x as number, length: group?.lengths[0] ?? lengths.meanLength[0]! };
  });
  const deepest = Math.max(count > 0 ? investigation.holeDepth : 0, ...placed.map(({ length }) => length), piles.shortest);
  const depth = Math.ceil(deepest * 1.12);
  const grid = { x: middles(from, to, COLUMNS), depths: middles(0, depth, ROWS) };
  return {
    y, from, to, depth, columns: COLUMNS, rows: ROWS,
    modulus: groundSlice(problem, index, grid),
    piles: placed,
    holes: holes.map((hole) => ({ x: hole.x, off: Math.abs(hole.y - y), depth: investigation.holeDepth })),
    diameter: piles.diameter,
  };
}

/** The y with most piles; of several, the one nearest to their middle. */
function longestRow(piles: Problem["building"]["piles"]): number {
  const middle = piles.reduce((sum, pile) => sum + pile.y, 0) / piles.length;
  const size = (y: number): number => piles.filter((pile) => Math.abs(pile.y - y) <= ROW).length;
  return piles.map((pile) => pile.y as number).reduce((best, y) => {
    const more = size(y) - size(best);
    return more > 0 || (more === 0 && Math.abs(y - middle) < Math.abs(best - middle)) ? y : best;
  });
}

function middles(from: number, to: number, parts: number): Float64Array {
  return Float64Array.from({ length: parts }, (_, k) => from + ((k + 0.5) * (to - from)) / parts);
}
