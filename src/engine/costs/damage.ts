/** Share of the building's value that is lost at an angular distortion. */
export interface DamagePoint {
  /** angular distortion, settlement difference over distance, a ratio (1/500 = 0.002) */
  readonly distortion: number;
  /** share of the building's value, 0 to 1 */
  readonly share: number;
}
