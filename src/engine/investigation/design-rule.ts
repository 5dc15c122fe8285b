/** How the one design value is made from the readings. */
export type DesignRuleName = "geometric" | "arithmetic" | "harmonic" | "quartile" | "lessdeviations";

/** The rule with its parameter, and whether the regional knowledge is brought in. */
export interface DesignRule {
  readonly name: DesignRuleName;
  /** number of standard deviations (of the log readings) below the mean, for "lessdeviations"; else ignored */
  readonly deviations: number;
  /** true: normal-normal update of the log level with the regional COV; false: the raw rule on the readings */
  readonly update: boolean;
}
