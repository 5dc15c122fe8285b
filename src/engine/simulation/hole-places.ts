import { positions } from "../decision/prepared-site.js";
import type { Problem } from "../decision/problem.js";
import type { Point } from "../investigation/hole-positions.js";
import { readingDepths } from "../investigation/reading-depths.js";
import { requireDomain } from "../numerics/domain-error.js";

/** Holes and reading depths of one variant as places among those of all variants. */
export interface PlacesOfVariant {
  /** holes of each count, in the order of the counts */
  readonly holes: readonly Int32Array[];
  readonly depths: Int32Array;
}

/** All places where any variant with any count reads the ground. */
export interface HolePlaces {
  readonly holes: readonly Point[];
  /** m, increasing */
  readonly depths: Float64Array;
  readonly variants: readonly PlacesOfVariant[];
}

/** Places that are nearer to each other than this are one, m. */
const same = 1e-6;

/**
 * Gathers the holes and reading depths of all variants and counts, each once: what two of them share is drawn once, and their
 * figures then differ by what differs between them.
 *
 * @param problems  one a variant
 * @param counts    numbers of holes
 * @throws {DomainError} a hole list is too short for a count, or a hole has no reading
 */
export function holePlaces(problems: readonly Problem[], counts: readonly number[]): HolePlaces {
  const holes: Point[] = [];
  const known = new Map<string, number>();
  const indexOf = (hole: Point): number => {
    const key = `${Math.round(hole.x / same)} ${Math.round(hole.y / same)}`;
    let at = known.get(key);
    if (at === undefined) {
      known.set(key, (at = holes.length));
      holes.push(hole);
    }
    return at;
  };
  const depthsOf = problems.map(({ investigation: { readingSpacing, holeDepth } }) => {
    const depths = readingDepths(readingSpacing, holeDepth);
    requireDomain(depths.length > 0, "Reading spacing", `${readingSpacing} m`, "at most the hole depth");
    return depths;
  });
  const all = Float64Array.from(depthsOf.flatMap((depths) => [...depths])).sort();
  const depths = all.filter((depth, k) => k === 0 || depth - all[k - 1] > same);
  return {
    holes,
    depths,
    variants: problems.map((problem, v) => ({
      holes: counts.map((count) => Int32Array.from(positions(problem, count), indexOf)),
      depths: Int32Array.from(depthsOf[v], (depth) => placeOf(depths, depth)),
    })),
  };
}

/** Index of the depth that stands for a given one. */
function placeOf(depths: Float64Array, depth: number): number {
  let nearest = 0;
  for (let k = 1; k < depths.length; k++) if (Math.abs(depths[k] - depth) < Math.abs(depths[nearest] - depth)) nearest = k;
  return nearest;
}
