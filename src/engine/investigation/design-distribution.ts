import { requireDomain } from "../numerics/domain-error.js";
import { exponentialLessOne } from "../numerics/exponential-less-one.js";
import { logarithmOfOnePlus } from "../numerics/logarithm.js";
import { normalDensity, normalDistribution, normalQuantile } from "../numerics/normal.js";
import type { DesignRule } from "./design-rule.js";
import type { ReadingSums } from "./reading-sums.js";

/** Variances of the logarithms: of the ground about its median, of the site's level, and of the three errors. */
export interface LogVariances {
  readonly ground: number;
  readonly regional: number;
  readonly reading: number;
  readonly hole: number;
  readonly method: number;
}

/** The log design value as a normal variable, and how it hangs together with the ground under the piles. */
export interface DesignDistribution {
  /** mean of ln(design value in kPa) */
  readonly mean: number;
  /** variance of the same */
  readonly variance: number;
  /** factor on the covariance of the mean log reading with anything: 1 for raw rules, the gain for an update */
  readonly gain: number;
  /**
   * How the covariance of the ground falls or grows with the design value: Cov(.,. | D) = S - c c'/v - bend (D - mean)/v G,
   * with G the mean over readings of the products of what a reading tells beyond the mean. 0 for rules linear in the log readings.
   */
  readonly bend: number;
}

/**
 * Distribution of the log design value that a rule makes from the readings of a layout. Where the assumed stiffness changes with depth,
 * readings are taken over the assumed profile, so that the design value is a level: the modulus at the surface of a profile of known shape.
 *
 * @param rule       the rule; with `update` the normal-normal update of the log level, else the raw rule
 * @param sums       of the layout; undefined for no holes
 * @param level      ln of the median modulus at the surface with the regional level at its median, kPa
 * @param variances  of the logarithms
 * @returns          mean, variance, gain and bend; variance 0 where nothing is random
 * @throws {DomainError} the rule needs more readings than there are
 * @source geometric mean exact; arithmetic and harmonic mean by moment matching of lognormal sums (Fenton 1960, IRE Trans. CS-8);
 *   lower quartile by the representation of Bahadur (1966, Ann. Math. Stat. 37) with plotting position of Blom (1958);
 *   the update is the conjugate normal-normal one (Raiffa and Schlaifer 1961)
 */
export function designDistribution(rule: DesignRule, sums: ReadingSums | undefined, level: number, variances: LogVariances): DesignDistribution {
  if (sums === undefined || sums.holes === 0) {
    const spread = variances.ground + variances.regional;
    return { mean: level + ruleOffset(rule, spread), variance: 0, gain: 0, bend: 0 };
  }
  const n = sums.holes * sums.readings;
  const errors = variances.reading + variances.hole + variances.method;
  const noiseOfMean = variances.ground * sums.meanCovariance + variances.method + variances.hole / sums.holes + variances.reading / n;
  if (rule.update && variances.regional > 0) {
    const gain = variances.regional / (variances.regional + noiseOfMean);
    const left = (1 - gain) * variances.regional;
    return { mean: level + ruleOffset(rule, variances.ground + left), variance: gain * variances.regional, gain, bend: 0 };
  }
  const meanOfLogs = level - errors / 2; // the multipliers have unit mean, so their logarithms lie below zero
  const varianceOfMean = noiseOfMean + variances.regional;
  const total = variances.ground * sums.meanVariance + variances.regional + errors;
  switch (rule.name) {
    case "geometric":
      return { mean: meanOfLogs, variance: varianceOfMean, gain: 1, bend: 0 };
    case "arithmetic":
    case "harmonic": {
      const sign = rule.name === "arithmetic" ? 1 : -1;
      const variance = logarithmOfOnePlus(meanOfExponentials(sums, variances));
      return { mean: meanOfLogs + (sign * (total - variance)) / 2, variance, gain: 1, bend: -sign };
    }
    case "quartile":
    case "lessdeviations": {
      requireDomain(n >= 2 || rule.name === "quartile", "number of readings", n, "at least 2 for a rule that takes off standard deviations");
      const spread = sampleSpread(sums, variances);
      const below = rule.name === "lessdeviations" ? rule.deviations : quartileBelow(n, spread);
      const noise = rule.name === "lessdeviations" ? 0 : quantileNoise(sums, variances, below);
      const variance = varianceOfMean + below ** 2 * spread.varianceOfSd + noise;
      const bend = spread.meanSd > 0 ? (below / spread.meanSd) * (1 - spread.varianceOfSquare / (2 * spread.meanSquare ** 2)) : 0;
      return { mean: meanOfLogs - below * spread.meanSd, variance, gain: 1, bend };
    }
  }
}

/** What the rule takes off (or adds to) the log median of a known population. */
function ruleOffset(rule: DesignRule, spread: number): number {
  switch (rule.name) {
    case "geometric":
      return 0;
    case "arithmetic":
      return spread / 2;
    case "harmonic":
      return -spread / 2;
    case "quartile":
      return normalQuantile(0.25) * Math.sqrt(spread);
    case "lessdeviations":
      return -rule.deviations * Math.sqrt(spread);
  }
}

/** Mean over all ordered pairs of readings of exp(covariance) - 1. */
function meanOfExponentials(sums: ReadingSums, v: LogVariances): number {
  const { holePairs, lagPairs, readings } = sums;
  const common = v.regional + v.method;
  let sum = 0;
  for (let d = 0; d < holePairs.length; d++) {
    for (let lag = 0; lag < readings; lag++) {
      const own = d === 0 ? v.hole + (lag === 0 ? v.reading : 0) : 0;
      const covariance = v.ground * sums.meanVariance * sums.correlation[d * readings + lag] + common + own;
      sum += holePairs[d] * lagPairs[lag] * exponentialLessOne(covariance);
    }
  }
  return sum / (sums.holes * readings) ** 2;
}

interface SampleSpread {
  /** mean and variance of the sample variance S^2 (divisor n - 1) */
  readonly meanSquare: number;
  readonly varianceOfSquare: number;
  /** mean and variance of S */
  readonly meanSd: number;
  readonly varianceOfSd: number;
}

/** Moments of the sample variance of correlated normal readings: E = tr(H C)/(n-1), Var = 2 tr(H C H C)/(n-1)^2, H the centring matrix. */
function sampleSpread(sums: ReadingSums, v: LogVariances): SampleSpread {
  const n = sums.holes * sums.readings;
  if (n < 2) return { meanSquare: 0, varianceOfSquare: 0, meanSd: 0, varianceOfSd: 0 };
  const m = sums.readings;
  const g = v.ground;
  // What all readings share (level, method) is taken out by the centring.
  const diagonal = g * sums.meanVariance + v.hole + v.reading;
  const grandMean = g * sums.meanCovariance + v.hole / sums.holes + v.reading / n;
  const meanSquareOfAll =
    g * g * sums.meanSquare + (2 * g * v.hole * sums.meanSameHole + (2 * g * v.reading * sums.meanVariance) / n) + v.hole ** 2 / sums.holes + (2 * v.hole * v.reading) / n + v.reading ** 2 / n;
  // A row's mean covariance is g r + hole m/n + reading/n: its square, averaged over the rows.
  const constant = (v.hole * m + v.reading) / n;
  const meanRowSquare = g * g * sums.meanRowSquare + 2 * g * sums.meanCovariance * constant + constant ** 2;
  const trace = n * (diagonal - grandMean);
  const traceOfSquare = n * n * (meanSquareOfAll - 2 * meanRowSquare + grandMean ** 2);
  const meanSquare = trace / (n - 1);
  const varianceOfSquare = (2 * Math.max(traceOfSquare, 0)) / (n - 1) ** 2;
  const ratio = meanSquare > 0 ? varianceOfSquare / meanSquare ** 2 : 0;
  const meanSd = Math.sqrt(meanSquare) * (1 - Math.min(ratio, 2) / 8);
  return { meanSquare, varianceOfSquare, meanSd, varianceOfSd: Math.max(meanSquare - meanSd ** 2, 0) };
}

/** Standard deviations below the mean at which the lower quartile of n readings lies (inclusive percentile rule, plotting position of Blom). */
function quartileBelow(n: number, spread: SampleSpread): number {
  if (n < 2) return 0;
  const position = 1 + 0.25 * (n - 1);
  const z = normalQuantile((position - 0.375) / (n + 0.25));
  // Readings of one layout are flatter than normal, because their spread varies from layout to layout (Cornish and Fisher's kurtosis term).
  const excess = spread.meanSquare > 0 ? (-3 * spread.varianceOfSquare) / (spread.meanSquare ** 2 + spread.varianceOfSquare) : 0;
  return -(z + (excess / 24) * z * (z * z - 3));
}

/**
 * Variance of the empirical quartile beyond what mean and spread explain: Hermite terms of order 3 and above of the indicator
 * "below the quartile", over the density squared. What all readings share moves the quartile as it moves the mean and is left out.
 */
function quantileNoise(sums: ReadingSums, v: LogVariances, below: number): number {
  const { holePairs, lagPairs, readings } = sums;
  const ground = v.ground * sums.meanVariance;
  const total = ground + v.hole + v.reading;
  if (total <= 0) return 0;
  const orders = 16;
  const squares = hermiteSquares(-below, orders);
  let sum = 0;
  for (let d = 0; d < holePairs.length; d++) {
    for (let lag = d === 0 ? 1 : 0; lag < readings; lag++) {
      const rho = (ground * sums.correlation[d * readings + lag] + (d === 0 ? v.hole : 0)) / total;
      let power = rho * rho;
      let terms = 0;
      for (let j = 3; j <= orders; j++) {
        power *= rho;
        terms += squares[j] * power;
      }
      sum += holePairs[d] * lagPairs[lag] * terms;
    }
  }
  // A reading with itself: the series in closed form, p (1 - p) / density^2 less its first two terms.
  const p = normalDistribution(-below);
  const itself = (p * (1 - p)) / normalDensity(below) ** 2 - 1 - below ** 2 / 2;
  const n = sums.holes * readings;
  return total * (sum / (n * n) + itself / n);
}

/** He_{j-1}(x)^2 / j! for j up to the order, with Hermite polynomials of the probabilists' kind. */
function hermiteSquares(x: number, orders: number): Float64Array {
  const squares = new Float64Array(orders + 1);
  let previous = 0;
  let current = 1;
  let factorial = 1;
  for (let j = 1; j <= orders; j++) {
    factorial *= j;
    squares[j] = current ** 2 / factorial;
    const next = x * current - (j - 1) * previous;
    previous = current;
    current = next;
  }
  return squares;
}
