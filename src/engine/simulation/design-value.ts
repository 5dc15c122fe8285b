import type { DesignRule } from "../investigation/design-rule.js";
import { requireDomain } from "../numerics/domain-error.js";
import { exponential } from "../numerics/exponential.js";
import { logarithm } from "../numerics/logarithm.js";
import { moments } from "../numerics/moments.js";
import { percentile } from "../numerics/percentile.js";

/**
 * Log design value that a raw rule makes of readings.
 *
 * @param rule  the rule; its update is not looked at
 * @param logs  logarithms of the readings (of the modulus in kPa), at least one
 * @returns     ln of the design value
 * @throws {DomainError} the rule needs more readings
 */
export function lnDesignValue(rule: DesignRule, logs: Float64Array): number {
  switch (rule.name) {
    case "geometric":
      return mean(logs);
    case "arithmetic":
      return lnMeanOfExponentials(logs, 1);
    case "harmonic":
      return -lnMeanOfExponentials(logs, -1);
    case "quartile":
      return logarithm(percentile(logs.map(exponential), 25)); // of the readings themselves: between two of them the logarithm's quartile lies lower
    case "lessdeviations": {
      requireDomain(logs.length >= 2, "Number of readings", logs.length, "at least 2 for a rule that takes off standard deviations");
      const spread = moments(logs);
      return spread.mean - rule.deviations * spread.sd;
    }
  }
}

function mean(values: Float64Array): number {
  let sum = 0;
  for (const value of values) sum += value;
  return sum / values.length;
}

function lnMeanOfExponentials(logs: Float64Array, sign: number): number {
  const middle = logs[0]; // keeps the exponentials near 1
  let sum = 0;
  for (const value of logs) sum += exponential(sign * (value - middle));
  return sign * middle + logarithm(sum / logs.length);
}
