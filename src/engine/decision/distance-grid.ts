const distanceNodes = 28;
const distanceScale = 0.5;

/** Distances from 0 to the reach, even steps of ln(1 + distance / 0.5 m): close where kernels bend. */
export function distanceGrid(reach: number): Float64Array {
  const top = Math.log1p(Math.max(reach, 1) / distanceScale);
  return Float64Array.from({ length: distanceNodes }, (_, i) => distanceScale * Math.expm1((top * i) / (distanceNodes - 1)));
}

/** Place of a distance among the grid's nodes in its even coordinate. */
export function distanceCoordinate(distance: number): number {
  return Math.log1p(distance / distanceScale);
}

