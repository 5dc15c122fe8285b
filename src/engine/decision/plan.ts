import { hypotenuse } from "../numerics/hypotenuse.js";
import type { PilePoint } from "./problem.js";
import { neighbourPairs, type NeighbourPair } from "./neighbour-pairs.js";

/** Neighbours whose ground is brought into a pile's second-order term, at most. */
const neighboursKept = 4;

/** A pile plan sorted out once: equal loads, equal distances, neighbours. */
export interface Plan {
  readonly piles: readonly PilePoint[];
  /** distinct loads, kN, heaviest first, and each pile's place among them */
  readonly loads: Float64Array;
  readonly loadOf: Int32Array;
  /** distinct distances between piles, m, 0 first; class of each ordered pair, piles x piles */
  readonly distances: Float64Array;
  readonly distanceOf: Int32Array;
  readonly pairs: readonly NeighbourPair[];
  /** each pile followed by up to four neighbours, nearest first */
  readonly nearby: readonly (readonly number[])[];
}

/** Sorts out a pile plan. */
export function sortedPlan(piles: readonly PilePoint[]): Plan {
  const n = piles.length;
  const loads = Float64Array.from(new Set(piles.map((p) => p.load))).sort().reverse();
  const distances: number[] = [0];
  const index = new Map<number, number>([[0, 0]]);
  const distanceOf = new Int32Array(n * n);
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < i; j++) {
      const distance = hypotenuse(piles[i].x - piles[j].x, piles[i].y - piles[j].y);
      const key = Math.round(distance * 1e6); // a grid's equal distances differ by rounding only
      let at = index.get(key);
      if (at === undefined) {
        index.set(key, (at = distances.length));
        distances.push(distance);
      }
      distanceOf[i * n + j] = distanceOf[j * n + i] = at;
    }
  }
  const pairs = neighbourPairs(piles);
  const nearby = piles.map((_, i) => {
    const others = pairs
      .filter((p) => p.first === i || p.second === i)
      .sort((a, b) => a.distance - b.distance)
      .slice(0, neighboursKept)
      .map((p) => (p.first === i ? p.second : p.first));
    return [i, ...others];
  });
  return { piles, loads, loadOf: Int32Array.from(piles, (p) => loads.indexOf(p.load)), distances: Float64Array.from(distances), distanceOf, pairs, nearby };
}
