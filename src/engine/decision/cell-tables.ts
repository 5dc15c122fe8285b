import type { SeparableTerm } from "../ground/separable-terms.js";

/** Readings shared among depth groups, in order. */
export function depthGroups(depths: Float64Array, most: number): Float64Array[] {
  const groups = Math.min(most, depths.length);
  return Array.from({ length: groups }, (_, g) => depths.subarray(Math.floor((g * depths.length) / groups), Math.floor(((g + 1) * depths.length) / groups)));
}

/** A function of depth at the middle of each cell. */
export function cellValues(bounds: Float64Array, value: (depth: number) => number): Float64Array {
  return Float64Array.from({ length: bounds.length - 1 }, (_, i) => value((bounds[i] + bounds[i + 1]) / 2));
}

/** Covariance of the depth part between cells of two grids: cells x cells. */
export function cellCovariance(a: Float64Array, b: Float64Array, term: SeparableTerm): Float64Array {
  const rows = a.length - 1;
  const columns = b.length - 1;
  const out = new Float64Array(rows * columns);
  for (let i = 0; i < rows; i++) {
    for (let j = 0; j < columns; j++) {
      out[i * columns + j] = term.verticalCellAverage((b[j] + b[j + 1] - a[i] - a[i + 1]) / 2, a[i + 1] - a[i], b[j + 1] - b[j]);
    }
  }
  return out;
}

/** Covariance of the depth part between the mean of some point readings, each with its relative standard deviation, and each cell. */
export function pointCellCovariance(depths: Float64Array, bounds: Float64Array, term: SeparableTerm, relativeSd: (depth: number) => number): Float64Array {
  return Float64Array.from({ length: bounds.length - 1 }, (_, i) => {
    let sum = 0;
    for (const z of depths) sum += relativeSd(z) * term.verticalCellAverage((bounds[i] + bounds[i + 1]) / 2 - z, 0, bounds[i + 1] - bounds[i]);
    return sum / depths.length;
  });
}

/** Mean over bands of a quantity known on thinner cells, each cell sharing by overlap: rings x bands. */
export function overBands(values: Float64Array, rings: number, cells: Float64Array, bands: Float64Array): Float64Array {
  const nc = cells.length - 1;
  const nb = bands.length - 1;
  const out = new Float64Array(rings * nb);
  for (let b = 0; b < nb; b++) {
    for (let c = 0; c < nc; c++) {
      const overlap = Math.min(bands[b + 1], cells[c + 1]) - Math.max(bands[b], cells[c]);
      if (overlap <= 0) continue;
      const share = overlap / (bands[b + 1] - bands[b]);
      for (let r = 0; r < rings; r++) out[r * nb + b] += share * values[r * nc + c];
    }
  }
  return out;
}
