import { hypotenuse } from "../numerics/hypotenuse.js";
import type { Point } from "./hole-positions.js";

/** Correlation of the unit field between two places: horizontal distance and depth difference, m. */
export type FieldCorrelation = (distance: number, depthDifference: number) => number;

/**
 * What the readings of one layout have in common, summed once: everything that a design value's moments need of the ground.
 * All sums are of the unit field times the relative standard deviation at the readings' depths; errors are added later.
 */
export interface ReadingSums {
  readonly holes: number;
  /** readings a hole */
  readonly readings: number;
  /** ordered pairs of holes at each distinct distance; the first entry is the distance 0, the holes themselves */
  readonly holePairs: Float64Array;
  /** ordered pairs of readings of two holes at each multiple of the spacing */
  readonly lagPairs: Float64Array;
  /** correlation, distances x lags */
  readonly correlation: Float64Array;
  /** mean over all ordered pairs of readings of their covariance */
  readonly meanCovariance: number;
  /** mean over the readings of the square of a reading's mean covariance with all readings */
  readonly meanRowSquare: number;
  /** mean over all ordered pairs of the squared covariance */
  readonly meanSquare: number;
  /** mean over all ordered pairs, pairs in different holes counting zero */
  readonly meanSameHole: number;
  /** mean over the readings of their variance (1 where the coefficient of variation is the same at all depths) */
  readonly meanVariance: number;
}

/**
 * Sums over the readings of a layout.
 *
 * @param holes        positions, m
 * @param spacing      distance of the readings in depth, m
 * @param relativeSd   standard deviation of the log ground at each reading's depth over the reference one, one entry a reading
 * @param correlation  of the unit field
 */
export function readingSums(holes: readonly Point[], spacing: number, relativeSd: Float64Array, correlation: FieldCorrelation): ReadingSums {
  const readings = relativeSd.length;
  const { distances, classOf, holePairs } = holeDistances(holes);
  const table = new Float64Array(distances.length * readings);
  for (let d = 0; d < distances.length; d++) {
    for (let lag = 0; lag < readings; lag++) table[d * readings + lag] = correlation(distances[d], lag * spacing);
  }
  const lagPairs = Float64Array.from({ length: readings }, (_, lag) => (lag === 0 ? readings : 2 * (readings - lag)));
  const rows = new Float64Array(distances.length * readings); // covariance of a reading with all readings of a hole at that distance
  let meanSquare = 0;
  const all = (holes.length * readings) ** 2;
  for (let d = 0; d < distances.length; d++) {
    for (let j = 0; j < readings; j++) {
      let sum = 0;
      for (let k = 0; k < readings; k++) {
        const covariance = table[d * readings + Math.abs(j - k)] * relativeSd[j] * relativeSd[k];
        sum += covariance;
        meanSquare += (holePairs[d] * covariance * covariance) / all;
      }
      rows[d * readings + j] = sum;
    }
  }
  let meanCovariance = 0;
  let meanRowSquare = 0;
  for (let h = 0; h < holes.length; h++) {
    for (let j = 0; j < readings; j++) {
      let row = 0;
      for (let g = 0; g < holes.length; g++) row += rows[classOf[h * holes.length + g] * readings + j];
      meanCovariance += row / all;
      meanRowSquare += row ** 2 / (all * holes.length * readings);
    }
  }
  let meanSameHole = 0;
  let meanVariance = 0;
  for (let j = 0; j < readings; j++) {
    meanSameHole += (holes.length * rows[j]) / all;
    meanVariance += relativeSd[j] ** 2 / readings;
  }
  return { holes: holes.length, readings, holePairs, lagPairs, correlation: table, meanCovariance, meanRowSquare, meanSquare, meanSameHole, meanVariance };
}

/** Distinct distances between holes (0 first), the class of each ordered pair, and how many ordered pairs a class has. */
function holeDistances(holes: readonly Point[]): { distances: number[]; classOf: Int32Array; holePairs: Float64Array } {
  const distances = [0];
  const index = new Map<number, number>([[0, 0]]);
  const classOf = new Int32Array(holes.length ** 2);
  const pairs = [holes.length];
  for (let i = 0; i < holes.length; i++) {
    for (let j = 0; j < holes.length; j++) {
      if (i === j) continue;
      const distance = hypotenuse(holes[i].x - holes[j].x, holes[i].y - holes[j].y);
      const key = Math.round(distance * 1e6); // to a micrometre: a grid's equal distances differ by rounding only
      let at = index.get(key);
      if (at === undefined) {
        at = distances.length;
        index.set(key, at);
        distances.push(distance);
        pairs.push(0);
      }
      classOf[i * holes.length + j] = at;
      pairs[at] += 1;
    }
  }
  return { distances, classOf, holePairs: Float64Array.from(pairs) };
}
