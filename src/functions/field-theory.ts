import { correlation, varianceReduction } from "../engine/index.js";
import { metres } from "../units/quantities.js";
import { answer } from "./answer.js";
import { above0, numberFrom } from "./arguments.js";
import { modelFrom } from "./model-argument.js";

/**
 * Correlation of the log stiffness at two points a distance apart, along one direction.
 * @customfunction CORRELATION
 * @param lag_m Distance between the two points, m.
 * @param scale_m Scale of fluctuation in that direction, m.
 * @param [model] Correlation: markov (default), ellipsoidal, gaussian, spherical, markov2, triangular.
 * @source Vanmarcke (1983), Random Fields: Analysis and Synthesis; spherical: Fenton & Griffiths (2008), Risk Assessment in Geotechnical Engineering.
 */
export function correlationAt(lag_m: any, scale_m: any, model?: any): number {
  return answer(() => correlation(modelFrom(model), Math.abs(numberFrom(lag_m, "Lag", ANY_LENGTH)), numberFrom(scale_m, "Scale", above0("scale of fluctuation", "m"))));
}

/**
 * Share of the point variance that remains when ground is averaged along a length: a ratio of variances, 0 to 1.
 * @customfunction VARIANCEFACTOR
 * @param length_m Averaging length, m.
 * @param scale_m Scale of fluctuation in that direction, m.
 * @param [model] Correlation: markov (default), ellipsoidal, gaussian, spherical, markov2, triangular.
 * @source Vanmarcke (1983), Random Fields: Analysis and Synthesis.
 */
export function varianceFactor(length_m: any, scale_m: any, model?: any): number {
  return answer(() => varianceReduction(modelFrom(model), metres(numberFrom(length_m, "Length", LENGTH)), metres(numberFrom(scale_m, "Scale", above0("scale of fluctuation", "m")))));
}

const ANY_LENGTH = { words: "a distance in m", holds: () => true };
const LENGTH = { words: "a length of 0 m or more", holds: (value: number) => value >= 0 };
