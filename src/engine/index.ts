/** The one door of the engine: everything that the rest of the house may use stands here. */
export { DomainError } from "./numerics/domain-error.js";
export { correlation, varianceReduction, type CorrelationName, type LineCorrelationName } from "./ground/correlation.js";
export { randolphWrothSettlement } from "./piles/randolph-wroth.js";
export { designLength } from "./piles/design-length.js";
export { assess, contingency, investigationPrice as investigationCost, pileLengthPercentile, pileLengthTable, type LengthTable } from "./decision/assess.js";
export { assessCounts, cheapestCount } from "./decision/compare-counts.js";
export { positions as holePositions } from "./decision/prepared-site.js";
export { neighbourPairs, type NeighbourPair } from "./decision/neighbour-pairs.js";
export type { Assessment, CountRow } from "./decision/assessment.js";
export type { Building, Ground, GroundLayer, Investigation, PilePoint, Problem } from "./decision/problem.js";
export type { DamagePoint } from "./costs/damage.js";
export type { Delay, Prices } from "./costs/prices.js";
export type { DesignRule, DesignRuleName } from "./investigation/design-rule.js";
export type { Point } from "./investigation/hole-positions.js";
export type { LengthRule, PileSpecification } from "./piles/pile-specification.js";
