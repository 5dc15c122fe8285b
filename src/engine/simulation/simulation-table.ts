/** One variant with one count. Money in the person's own unit; every estimate is a mean over realised grounds. */
export interface SimulationRow {
  /** index and name of the variant */
  readonly variant: number;
  readonly name: string;
  readonly count: number;
  readonly investigation: number;
  readonly foundation: number;
  readonly failure: number;
  readonly delay: number;
  readonly total: number;
  /** standard errors of the parts, money */
  readonly errors: { readonly foundation: number; readonly failure: number; readonly delay: number };
  /** standard error of the total, money */
  readonly standardError: number;
  /** chance that the damage cost is above zero, 0 to 1, and its standard error */
  readonly failureChance: number;
  readonly failureChanceError: number;
  /** realisations with damage */
  readonly damageSeen: { readonly elements: number; readonly form: number };
  /** where no realisation of either kind saw damage: what the chance is below with 95 % confidence (3 over their number); else undefined */
  readonly failureChanceAtMost: number | undefined;
  /** expected carbon of the piles, kg CO2e */
  readonly carbon: number;
  /** expected number of piles whose needed length exceeds the built one by more than the tolerance */
  readonly surprises: number;
  /** expected metres of all piles beyond what the ground needed, m */
  readonly overDesign: number;
  /** expected metres of all piles together, m */
  readonly totalMetres: number;
  /** chance that the longest length is built though it is predicted to settle too much, 0 to 1 */
  readonly tooShortChance: number;
  /** percentiles of the mean pile length, m, at `lengthPercentiles` */
  readonly meanLengths: readonly number[];
  /** chance to be the cheapest of all rows, and of the rows of this variant, given the errors */
  readonly chanceCheapest: number;
  readonly chanceWithin: number;
  /** true when the total cannot be told from the smallest of its variant at two standard errors of the difference */
  readonly notDistinguishable: boolean;
  /** what choosing this row is expected to cost more than the cheapest of all rows, money */
  readonly regret: number;
  /** correlation of the failure cost by finite elements and by the form; undefined where it never varied */
  readonly correlation: number | undefined;
  /** variance of the total by finite elements over what the form leaves of it; undefined where nothing is left */
  readonly varianceCut: number | undefined;
}

/** All variants and counts side by side. */
export interface SimulationTable {
  /** variant by variant, counts in the task's order */
  readonly rows: readonly SimulationRow[];
  /** index of the row with the smallest total */
  readonly cheapest: number;
  /** expected regret of choosing that row, money */
  readonly expectedRegret: number;
  /** realisations that the table rests on; with fewer than 2 by elements it rests on the form alone */
  readonly elements: number;
  readonly form: number;
}
