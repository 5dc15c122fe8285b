import { hypotenuse } from "../numerics/hypotenuse.js";
import { lineFamily } from "./correlation.js";
import type { GroundStructure } from "./separable-terms.js";

/**
 * Correlation of the log ground between two places.
 *
 * The ellipsoidal form takes both distances together, all others are a product of a radial plan part and a depth part.
 *
 * @param ground  structure and scales of fluctuation, m, > 0
 * @returns       a function of horizontal distance (m, >= 0) and depth difference (m, either sign), -1 to 1
 */
export function fieldCorrelation(ground: GroundStructure): (distance: number, depthDifference: number) => number {
  const family = lineFamily(ground.correlation);
  const { horizontalScale, verticalScale } = ground;
  if (ground.correlation === "ellipsoidal") return (distance, depth) => family.correlation(hypotenuse(distance / horizontalScale, depth / verticalScale));
  return (distance, depth) => family.correlation(distance / horizontalScale) * family.correlation(Math.abs(depth) / verticalScale);
}
