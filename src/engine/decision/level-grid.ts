/** Cells of the common depth grid: thin where piles begin, thicker with depth as the weights become smooth. */
const firstThickness = 0.25;
const growth = 0.04;

/**
 * Depths that bound the cells on which the weights of all pile lengths are compared.
 *
 * @param depth  depth to be covered, m, > 0
 * @returns      bounds from 0 to `depth`, m, increasing
 */
export function levelGrid(depth: number): Float64Array {
  const bounds = [0];
  while (bounds[bounds.length - 1] < depth * (1 - 1e-9)) {
    const last = bounds[bounds.length - 1];
    const next = last + firstThickness + growth * last;
    // A sliver at the end would be a cell of its own for no weight: the last cell takes it.
    bounds.push(next + (firstThickness + growth * next) / 2 >= depth ? depth : next);
  }
  return Float64Array.from(bounds);
}
