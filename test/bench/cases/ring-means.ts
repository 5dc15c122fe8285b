import { ringTables, ringToRing } from "../../../src/engine/ground/ring-average.js";
import { separableTerms } from "../../../src/engine/ground/separable-terms.js";
import type { BenchCase } from "../bench-case.js";

const radii = Float64Array.from({ length: 15 }, (_, k) => 0.25 * 300 ** (k / 14));
const distances = Float64Array.from({ length: 24 }, (_, k) => 0.5 * Math.expm1((Math.log1p(120) * k) / 23));

/** The plan tables of an ellipsoidal ground, from the first term to the last, with lengths that are met again. */
export const ringMeans: BenchCase<undefined, Float64Array[]> = {
  name: "means between rings",
  size: `ellipsoidal Markov, ${distances.length} distances, ${radii.length} x ${radii.length} rings, all terms`,
  rounds: 25,
  target: { milliseconds: 60 },
  setup: () => undefined,
  run: (_, round) => separableTerms(ground(round)).map((term) => ringTables(term.plan, radii, distances)),
  check: (tables) => {
    tables.forEach((table) => {
      if (!table.every((value) => value > -1e-4 && value < 1 + 1e-12)) throw new Error("A mean of a correlation lies outside 0 to 1.");
    });
    const [term] = separableTerms(ground(0)).slice(5);
    const exact = ringToRing(term.plan, distances[10], radii[4], radii[2]);
    const table = ringTables(term.plan, radii, distances)[(10 * 15 + 4) * 15 + 2];
    if (!(Math.abs(table - exact) < 1e-4)) throw new Error(`A mean is ${table}, not ${exact}.`);
  },
};

const ground = (round: number) => ({ correlation: "ellipsoidal" as const, horizontalScale: 8 + round / 100, verticalScale: 8 });
