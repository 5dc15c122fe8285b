import type { InputId } from "./catalogue.js";

/** A value of the demonstration with the unit in which it is written and a remark of its own; without one the catalogue's help stands there. */
export interface DemonstrationValue {
  readonly value: number | string;
  readonly unit?: string;
  readonly note?: string;
}

/** The invented bid: no place, firm or person of this name exists to our knowledge, and no figure is taken from a real job. */
export const DEMONSTRATION = {
  title: "Quillhaven seed store, piled ground floor (invented)",
  bidder: "Tarnmoor Foundations (invented)",
  ground: "Soft to firm silty alluvium over the whole depth, known only from its neighbours.",
} as const;

/** What the demonstration writes beside each input; inputs that are not here are left to their defaults and stay out of the block. */
export const DEMONSTRATION_VALUES: Partial<Record<InputId, DemonstrationValue>> = {
  meanStiffness: { value: 12, note: "Young's modulus, drained, as the neighbours' files suggest; or a layer list instead" },
  stiffnessCov: { value: 0.65, note: "spread from place to place: standard deviation over mean" },
  stiffnessIncrease: { value: 0, note: "growth of the mean with depth; 0 for none" },
  horizontalScale: { value: 10, note: "within about this distance two places are alike" },
  verticalScale: { value: 5, note: "the same, downwards" },
  correlation: { value: "separable Markov", note: "or ellipsoidal Markov, Gaussian, spherical, second-order Markov" },
  regionalCov: { value: 0.4, note: "how far this site's mean may lie from the assumed one before any hole is drilled" },
  poissonRatio: { value: 0.3, note: "0.2 to 0.35 drained, 0.49 undrained" },
  pilesAlongX: { value: 4, note: "the first pile stands at (0, 0); or a pile list instead of the grid" },
  pilesAlongY: { value: 3, note: "rows of the grid" },
  spacingAlongX: { value: 6.5, note: "centre to centre" },
  spacingAlongY: { value: 6, note: "centre to centre" },
  interiorLoad: { value: 1800, note: "working load of a pile inside the grid" },
  edgeLoadShare: { value: 0.85, note: "edge pile over interior pile" },
  cornerLoadShare: { value: 0.7, note: "corner pile over interior pile" },
  footprintLength: { value: "automatic", note: "holes are placed within: outline of the piles and half a spacing on either side" },
  footprintWidth: { value: "automatic", note: "as above, along y" },
  buildingValue: { value: 8_000_000, unit: "EUR", note: "what damage takes its share of" },
  damageList: { value: "", note: "share of the building value that repair costs, by angular distortion" },
  allowableSettlement: { value: 25, note: "of a pile head under its working load" },
  pileDiameter: { value: 0.6, note: "bored, solid, round" },
  pileModulus: { value: 30, note: "concrete" },
  shortestLength: { value: 4, note: "no pile is made shorter" },
  longestLength: { value: 28, note: "reach of the rig" },
  lengthStep: { value: 0.5, note: "lengths are rounded up to this; 0 for any length" },
  lengthRule: { value: "one per load", note: "or one for all, nearest hole" },
  groupInteraction: { value: "off", note: "on: neighbours' loads add to a pile's settlement" },
  method: { value: "Pressuremeter", note: "a name of the method table, =PROBE.METHODS(), or own" },
  readingCov: { value: "from the method", note: "error new at each reading" },
  holeCov: { value: "from the method", note: "error that one hole's readings share" },
  methodCov: { value: "from the method", note: "error that all holes share" },
  readingSpacing: { value: 0.5, note: "distance of readings in depth" },
  holeDepth: { value: 24, note: "below pile head level" },
  holeList: { value: "automatic", note: "or rows of x and y below this label" },
  designRule: { value: "geometric mean", note: "or arithmetic mean, harmonic mean, lower quartile, mean less deviations" },
  deviationsBelowMean: { value: 0.5, note: "only for the rule mean less deviations" },
  regionalUpdate: { value: "yes", note: "readings and the assumed mean are weighed by how sure each is" },
  mobilisation: { value: 2800, unit: "EUR", note: "push rig to site and back, once; common practice" },
  pricePerHole: { value: 650, unit: "EUR", note: "setting up and backfilling; common practice" },
  pricePerMetreOfHole: { value: 62, unit: "EUR/m", note: "common practice" },
  pricePerReading: { value: "none", unit: "EUR", note: "the word none is a deliberate zero" },
  report: { value: 3500, unit: "EUR", note: "supervision, interpretation, report, once" },
  daysPerHole: { value: 0.4, note: "that one more hole holds up the programme" },
  waitingDayPrice: { value: 900, unit: "EUR/day", note: "site overheads while waiting" },
  rig: { value: 18000, unit: "EUR", note: "to site and back, once" },
  pricePerPile: { value: 650, unit: "EUR", note: "setting up, trimming, integrity test" },
  pricePerMetreOfPile: { value: 165, unit: "EUR/m", note: "bored, concreted and reinforced; common practice" },
  concreteCarbon: { value: 250, note: "before reinforcement; 150 to 350 covers most mixes" },
  delayDayPrice: { value: 6500, unit: "EUR/day", note: "piling crew and rig standing, client's damages" },
  daysPerSurprise: { value: 1.5, note: "a pile that turns out too short" },
  surpriseTolerance: { value: 1.5, note: "needed length above design length that nobody minds" },
  foundShare: { value: 0.3, note: "chance that too short piles are noticed while piling; then all are put right" },
  seed: { value: 1, note: "the same seed gives the same figures" },
  counts: { value: "0 to 12", note: "numbers of holes that tables compare" },
  resultUnits: { value: "SI", note: "or US customary" },
};

/** Distortion and share of the demonstration's damage list, as they are written. */
export const DEMONSTRATION_DAMAGE: readonly (readonly [string, number])[] = [["1/500", 0], ["1/300", 0.1], ["1/150", 1]];
