/** Largest number of holes that can be priced: above it no bid would be decided by one hole more. */
export const LARGEST_COUNT = 60;
/** Largest number of piles of one site. Work grows with its cube; larger foundations are priced by a typical part. */
export const MOST_PILES = 100;
export const MOST_LAYERS = 20;
export const MOST_DAMAGE_ROWS = 20;
/** Readings of one hole; nearer readings tell nothing new and are averaged before they are used. */
export const MOST_READINGS = 400;
/** Rows of a site block: all inputs and all lists at their largest fill a third of it. */
export const MOST_ROWS = 1000;
/** A COV above 3 is nowhere published for ground or tests. */
export const LARGEST_COV = 3;
