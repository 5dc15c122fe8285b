/** One kind of investigation with the errors of its readings. */
export interface Method {
  readonly name: string;
  /** other spellings, in lower case */
  readonly also: readonly string[];
  /** one error a reading, a ratio */
  readonly readingCov: number;
  /** one error a hole, a ratio */
  readonly holeCov: number;
  /** one error common to all holes of the method, a ratio */
  readonly methodCov: number;
  /** usual distance of readings in depth, m */
  readonly readingSpacing: number;
  /** where each number comes from, and how it was derived */
  readonly source: string;
}

const TABLE = "Kulhawy & Trautmann (1996), Estimation of in-situ test uncertainty, ASCE GSP 58 (from memory)";
const SPLIT = "reading COV = printed random part; hole COV = root of the summed squares of the printed equipment and procedure parts";
const GUIDE = "Phoon & Kulhawy (1999), Can. Geotech. J. 36 (from memory)";

/**
 * Kinds of investigation and the COVs of what they read, as multipliers of the modulus.
 *
 * How the published parts become three errors: the random part of a test varies from reading to reading; equipment and procedure stay the
 * same down a hole and change with the next set-up, so they are one draw a hole; the step from what is measured to Young's modulus
 * (transformation) is the same for every hole of a method, so no number of holes averages it out. Where one rig and one crew drill all
 * holes, part of the hole COV belongs into the method COV: write own COVs.
 *
 * @source Kulhawy & Trautmann (1996), in-situ test uncertainty (equipment, procedure, random);
 *   Phoon & Kulhawy (1999a, b), laboratory error, transformation and design-property COVs. All from memory, to be checked against print.
 *   Transformation to a pile's modulus is not printed there for most tests: the source text of each row says what stands in for it
 */
export const METHODS: readonly Method[] = [
  {
    name: "Electric cone", also: ["cpt", "electric cpt", "cone", "piezocone", "cptu"], readingCov: 0.05, holeCov: 0.058, methodCov: 0.35, readingSpacing: 0.5,
    source: `${TABLE}: tip, equipment 3 %, procedure 5 %, random 5 %; ${SPLIT}. Method COV 35 %: transformation of cone resistance to strength, ${GUIDE}, in place of that to modulus. Spacing: readings averaged over half a metre, common practice.`,
  },
  {
    name: "Mechanical cone", also: ["mechanical cpt"], readingCov: 0.1, holeCov: 0.112, methodCov: 0.35, readingSpacing: 0.5,
    source: `${TABLE}: tip, equipment 5 %, procedure 10 %, random 10 %; ${SPLIT}. Method COV as for the electric cone. Spacing: common practice.`,
  },
  {
    name: "Standard penetration test", also: ["spt"], readingCov: 0.135, holeCov: 0.268, methodCov: 0.5, readingSpacing: 1.5,
    source: `${TABLE}: random 12 to 15 % (middle taken); equipment and procedure 5 to 75 % each, so hole COV is what brings the total to 30 %, the middle of the recommended 15 to 45 %. Method COV 50 %: middle of 40 to 60 % for dilatometer modulus from N in silt, ${GUIDE}; clay prints 85 to 95 %. Spacing: common practice.`,
  },
  {
    name: "Field vane", also: ["vane", "vst", "vane shear test"], readingCov: 0.1, holeCov: 0.094, methodCov: 0.4, readingSpacing: 1,
    source: `${TABLE}: equipment 5 %, procedure 8 %, random 10 %; ${SPLIT}. Method COV 40 %: from strength to modulus, common practice (the ratio of the two varies by a factor of two and more). Spacing: common practice.`,
  },
  {
    name: "Flat dilatometer", also: ["dilatometer", "dmt"], readingCov: 0.08, holeCov: 0.071, methodCov: 0.25, readingSpacing: 0.5,
    source: `${TABLE}: equipment 5 %, procedure 5 %, random 8 %; ${SPLIT}. Method COV 25 %: from dilatometer modulus to Young's modulus, common practice. Spacing: common practice.`,
  },
  {
    name: "Pressuremeter", also: ["pmt", "menard pressuremeter"], readingCov: 0.1, holeCov: 0.13, methodCov: 0.2, readingSpacing: 1.5,
    source: `${TABLE}: equipment 5 %, procedure 12 %, random 10 %; ${SPLIT}. Method COV 20 %: a modulus is measured, but at the hole's strain and direction; common practice. Spacing: common practice.`,
  },
  {
    name: "Self-boring pressuremeter", also: ["sbpmt", "self boring pressuremeter", "selfboring pressuremeter"], readingCov: 0.08, holeCov: 0.17, methodCov: 0.15, readingSpacing: 1.5,
    source: `${TABLE}: equipment 8 %, procedure 15 %, random 8 %; ${SPLIT}. Method COV 15 %: a modulus is measured in ground little disturbed; common practice. Spacing: common practice.`,
  },
  {
    name: "Samples and triaxial tests", also: ["triaxial", "laboratory", "lab", "samples"], readingCov: 0.19, holeCov: 0.1, methodCov: 0.3, readingSpacing: 2,
    source: `Reading COV 19 %: laboratory error of strength in triaxial compression, mean of 8 to 38 %, ${GUIDE}. Hole COV 10 % (one crew, one sampler) and method COV 30 % (disturbance; small-strain modulus missed): common practice. Spacing: common practice.`,
  },
];

/** The word for COVs of one's own, instead of a method of the table. */
export const OWN_METHOD = "own";
/** Reading spacing where the method is one's own, m. */
export const OWN_READING_SPACING = 0.5;
