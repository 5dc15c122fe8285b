/** A range of published or usual values with the one to start from. */
export interface TypicalRange {
  readonly low: number;
  readonly typical: number;
  readonly high: number;
}

/** What a kind of ground usually shows, for a start without data. */
export interface GroundKind {
  readonly name: string;
  /** Young's modulus, drained unless the name says otherwise, MPa */
  readonly stiffness: TypicalRange;
  /** coefficient of variation of the modulus from place to place, a ratio */
  readonly cov: TypicalRange;
  /** vertical scale of fluctuation, m */
  readonly verticalScale: TypicalRange;
  /** horizontal scale of fluctuation, m */
  readonly horizontalScale: TypicalRange;
  /** where each number comes from */
  readonly source: string;
}

const range = (low: number, typical: number, high: number): TypicalRange => ({ low, typical, high });

const PAPER = "Phoon & Kulhawy (1999), Characterization of geotechnical variability, Can. Geotech. J. 36 (from memory)";
const STIFFNESS = "Stiffness: typical range, common practice, not a published table.";
const SITES = "One measured sand had a horizontal scale below 6 m, so a single site may lie far below the mean.";

const CLAY = {
  verticalScale: range(0.8, 2.5, 6.1),
  horizontalScale: range(46, 50.7, 60),
  source: `${STIFFNESS} COV: undrained strength of clay in place of its modulus, 6 to 80 %, mean 32 %; vertical scale: undrained strength of clay, 0.8 to 6.1 m, mean 2.5 m; horizontal scale: vane strength of clay, 46 to 60 m, mean 50.7 m; ${PAPER}.`,
};
const SAND = {
  cov: range(0.28, 0.42, 0.68),
  verticalScale: range(0.1, 0.9, 2.2),
  horizontalScale: range(3, 47.9, 80),
  source: `${STIFFNESS} COV: pressuremeter modulus of sand, 28 to 68 %, mean 42 %; scales: cone resistance of sand and clay, vertical 0.1 to 2.2 m, mean 0.9 m, horizontal 3 to 80 m, mean 47.9 m; ${PAPER}. ${SITES}`,
};

/**
 * Typical means, COVs and scales by kind of ground, to be replaced by the site's own as soon as there are any.
 *
 * @source COVs and scales: Phoon & Kulhawy (1999a), tables of inherent variability and of scale of fluctuation, from memory, to be
 *   checked against print. Stiffness: common practice, marked so in each row, because no published table by kind of ground was at hand
 */
export const GROUND_KINDS: readonly GroundKind[] = [
  { name: "Soft clay", stiffness: range(2, 5, 10), cov: range(0.06, 0.32, 0.8), ...CLAY },
  { name: "Firm clay", stiffness: range(8, 15, 25), cov: range(0.06, 0.32, 0.8), ...CLAY },
  { name: "Stiff clay", stiffness: range(20, 35, 60), cov: range(0.06, 0.32, 0.8), ...CLAY },
  {
    name: "Silt", stiffness: range(3, 10, 20), cov: range(0.07, 0.36, 0.67), verticalScale: range(0.1, 0.9, 2.2), horizontalScale: range(3, 47.9, 80),
    source: `${STIFFNESS} COV: dilatometer modulus of sand and silt, 7 to 67 %, mean 36 %; scales: cone resistance of sand and clay, in place of silt; ${PAPER}. ${SITES}`,
  },
  { name: "Loose sand", stiffness: range(8, 15, 25), ...SAND },
  { name: "Medium dense sand", stiffness: range(20, 35, 50), ...SAND },
  { name: "Dense sand", stiffness: range(45, 65, 100), ...SAND },
  {
    name: "Mixed fill", stiffness: range(3, 10, 30), cov: range(0.3, 0.7, 1), verticalScale: range(0.3, 1, 3), horizontalScale: range(2, 8, 20),
    source: "All values: typical range, common practice, not a published table. Fill follows its tipping, so scales are short and the spread is wide.",
  },
];
