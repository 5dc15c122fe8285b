import type { DesignRuleName, Problem } from "../../../src/engine/index.js";
import { kilonewtons, kilopascals, metres } from "../../../src/units/quantities.js";

/** What the tests change of the nine-pile building. */
export interface Change {
  readonly correlation?: Problem["ground"]["correlation"];
  readonly scales?: readonly [number, number];
  readonly cov?: number;
  readonly regionalCov?: number;
  readonly rule?: DesignRuleName;
  readonly deviations?: number;
  readonly update?: boolean;
  readonly lengthRule?: Problem["piles"]["lengthRule"];
  readonly holes?: readonly (readonly [number, number])[];
  readonly covs?: readonly [number, number, number];
  readonly foundShare?: number;
  readonly groupInteraction?: boolean;
  readonly seed?: string;
}

/** Nine piles at 6 m in ground of 8 MPa, the building of the finite-element fixture; axes about its centre. */
export function ninePiles(change: Change = {}): Problem {
  const [horizontal, vertical] = change.scales ?? [8, 8];
  const [readingCov, holeCov, methodCov] = change.covs ?? [0.2, 0.15, 0.2];
  return {
    ground: {
      layers: [{ top: metres(0), mean: kilopascals(8000), increase: 0, cov: change.cov ?? 0.6 }],
      correlation: change.correlation ?? "markov", horizontalScale: metres(horizontal), verticalScale: metres(vertical),
      regionalCov: change.regionalCov ?? 0, poissonRatio: 0.3,
    },
    building: {
      piles: [-6, 0, 6].flatMap((y) => [-6, 0, 6].map((x) => ({ x: metres(x), y: metres(y), load: kilonewtons(1000 * (x === 0 ? 1 : 0.75) * (y === 0 ? 1 : 0.75)) }))),
      footprint: { length: metres(15), width: metres(15) }, value: 2e6,
      damage: [{ distortion: 1 / 500, share: 0 }, { distortion: 1 / 150, share: 1 }], allowableSettlement: metres(0.025),
    },
    piles: { diameter: metres(0.5), modulus: kilopascals(30e6), shortest: metres(3), longest: metres(25), lengthStep: metres(0), lengthRule: change.lengthRule ?? "load", groupInteraction: change.groupInteraction ?? false },
    investigation: {
      readingCov, holeCov, methodCov, readingSpacing: metres(0.5), holeDepth: metres(15.6), holes: change.holes?.map(([x, y]) => ({ x: metres(x), y: metres(y) })),
      designRule: { name: change.rule ?? "geometric", deviations: change.deviations ?? 1, update: change.update ?? false },
    },
    prices: {
      mobilisation: 0, perHole: 1500, perHoleMetre: 120, perReading: 0, report: 0, daysPerHole: 0, waitingDay: 0,
      rig: 0, perPile: 0, perPileMetre: 300, carbonPerCubicMetre: 250,
    },
    delay: { dayCost: 5000, daysPerSurprise: 1, surpriseTolerance: 1, foundShare: change.foundShare ?? 0 },
    seed: change.seed ?? "1",
  };
}
