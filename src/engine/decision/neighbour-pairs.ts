import type { Point } from "../investigation/hole-positions.js";

/** Two neighbouring piles (indices into the pile list) and their distance, m. */
export interface NeighbourPair {
  readonly first: number;
  readonly second: number;
  readonly distance: number;
}

/**
 * Neighbours of a plan: the Gabriel graph with the closed disc. Two piles are neighbours when the disc on the line between
 * them holds no other pile, its rim included; on a rectangular grid these are exactly the piles next to each other.
 *
 * @param points  places in plan, m, no two alike
 * @returns       pairs with first < second, in order; empty for fewer than two points
 * @source Gabriel and Sokal (1969), A new statistical approach to geographic variation analysis
 */
export function neighbourPairs(points: readonly Point[]): NeighbourPair[] {
  const pairs: NeighbourPair[] = [];
  for (let i = 0; i < points.length; i++) {
    for (let j = i + 1; j < points.length; j++) {
      const a = points[i];
      const b = points[j];
      const square = (a.x - b.x) ** 2 + (a.y - b.y) ** 2;
      if (!someoneBetween(points, i, j, square)) pairs.push({ first: i, second: j, distance: Math.sqrt(square) });
    }
  }
  return pairs;
}

function someoneBetween(points: readonly Point[], i: number, j: number, square: number): boolean {
  const a = points[i];
  const b = points[j];
  for (let k = 0; k < points.length; k++) {
    if (k === i || k === j) continue;
    const p = points[k];
    const toBoth = (p.x - a.x) ** 2 + (p.y - a.y) ** 2 + (p.x - b.x) ** 2 + (p.y - b.y) ** 2;
    // A point on the rim sees the two ends at a right angle: the squares add up to the diameter's. Rounding must not open the rim.
    if (toBoth <= square * (1 + 1e-9)) return true;
  }
  return false;
}
