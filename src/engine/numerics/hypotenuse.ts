/**
 * Length of a vector of two parts, the same to the bit in every engine; `Math.hypot` need not be.
 *
 * @param x  up to 1e150 in size, as lengths in metres and sums of money are; below 1e-150 it counts as nothing
 * @param y  the same
 * @returns root of x^2 + y^2, >= 0, within one and a half units in the last place
 */
export function hypotenuse(x: number, y: number): number {
  return Math.sqrt(x * x + y * y);
}
