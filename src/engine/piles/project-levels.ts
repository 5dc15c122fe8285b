import { requireDomain } from "../numerics/domain-error.js";

/**
 * Shares of levels moved to other levels by overlap of depth, sums conserved.
 *
 * @param shares  rings x levels, ring by ring
 * @param rings  number of rings
 * @param bounds  depths that bound the levels, m, increasing from 0
 * @param onto  depths that bound the new levels, m, increasing from 0; what lies below the last goes to the last level
 * @returns rings x new levels, ring by ring
 * @throws {DomainError} the shape of the shares does not fit
 */
export function projectLevels(shares: Float64Array, rings: number, bounds: Float64Array, onto: Float64Array): Float64Array {
  const levels = bounds.length - 1;
  const target = onto.length - 1;
  requireDomain(shares.length === rings * levels, "Number of shares", shares.length, `${rings * levels}, one a ring and level`);
  const moved = new Float64Array(rings * target);
  eachOverlap(bounds, onto, (level, into, share) => {
    for (let r = 0; r < rings; r++) moved[r * target + into] += share * shares[r * levels + level];
  });
  return moved;
}

/**
 * A field known on some levels, averaged over others by overlap of depth: the transpose of `projectLevels`, so that shares on
 * either grid give the same weighted mean.
 *
 * @param field  rings x levels of `from`, ring by ring
 * @param rings  number of rings
 * @param from  depths that bound the field's levels, m, increasing from 0; the field goes on below the last
 * @param bounds  depths that bound the wanted levels, m, increasing from 0
 * @returns rings x wanted levels, ring by ring
 * @throws {DomainError} the shape of the field does not fit
 */
export function averageLevels(field: Float64Array, rings: number, from: Float64Array, bounds: Float64Array): Float64Array {
  const levels = bounds.length - 1;
  const source = from.length - 1;
  requireDomain(field.length === rings * source, "Number of field values", field.length, `${rings * source}, one a ring and level`);
  const averaged = new Float64Array(rings * levels);
  eachOverlap(bounds, from, (level, cell, share) => {
    for (let r = 0; r < rings; r++) averaged[r * levels + level] += share * field[r * source + cell];
  });
  return averaged;
}

/** Calls with each level of `bounds`, a level of `onto` that it meets, and the share of its own height that lies there. */
function eachOverlap(bounds: Float64Array, onto: Float64Array, each: (level: number, into: number, share: number) => void): void {
  const last = onto.length - 2;
  let into = 0;
  for (let level = 0; level < bounds.length - 1; level++) {
    const top = bounds[level];
    const bottom = bounds[level + 1];
    while (into < last && onto[into + 1] <= top) into++;
    for (let k = into; k <= last; k++) {
      const from = Math.max(top, onto[k]);
      const to = k === last ? bottom : Math.min(bottom, onto[k + 1]);
      if (to > from) each(level, k, (to - from) / (bottom - top));
      if (to >= bottom) break;
    }
  }
}
