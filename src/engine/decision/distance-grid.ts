import { exponentialLessOne } from "../numerics/exponential-less-one.js";
import { logarithmOfOnePlus } from "../numerics/logarithm.js";

const distanceNodes = 28;
const distanceScale = 0.5;

/** Distances from 0 to the reach, even steps of ln(1 + distance / 0.5 m): close where kernels bend. */
export function distanceGrid(reach: number): Float64Array {
  const top = logarithmOfOnePlus(Math.max(reach, 1) / distanceScale);
  return Float64Array.from({ length: distanceNodes }, (_, i) => distanceScale * exponentialLessOne((top * i) / (distanceNodes - 1)));
}

/** Place of a distance among the grid's nodes in its even coordinate. */
export function distanceCoordinate(distance: number): number {
  return logarithmOfOnePlus(distance / distanceScale);
}

