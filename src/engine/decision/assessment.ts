/** What one number of holes costs in expectation, and how sure that is. Money in the person's own unit. */
export interface Assessment {
  readonly count: number;
  readonly investigation: number;
  readonly foundation: number;
  readonly failure: number;
  readonly delay: number;
  readonly total: number;
  /** standard error of the total, money */
  readonly standardError: number;
  /** chance that the damage cost is above zero, 0 to 1 */
  readonly failureChance: number;
  /** expected carbon of the piles, kg CO2e */
  readonly carbon: number;
  /** expected number of piles whose needed length exceeds the design length by more than the tolerance */
  readonly surprises: number;
  /** chance that the design stays at the longest length and is still not allowable, 0 to 1 */
  readonly tooShortChance: number;
  /** expected metres of all piles together, m */
  readonly totalMetres: number;
}

/** One row of the table of counts. */
export interface CountRow extends Assessment {
  /** chance that this count is the cheapest of the table, given the standard errors, 0 to 1 */
  readonly chanceCheapest: number;
  /** true when the total cannot be told from the smallest one at two standard errors of the difference */
  readonly notDistinguishable: boolean;
}
