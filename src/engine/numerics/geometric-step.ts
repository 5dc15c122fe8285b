import { exponential } from "./exponential.js";
import { logarithm } from "./logarithm.js";

/**
 * A place between two numbers by equal factors rather than equal differences.
 *
 * @param from   above 0
 * @param to     above 0
 * @param share  of the way, 0 to 1
 * @returns from (to / from)^share, relative error below 1e-14
 */
export function geometricStep(from: number, to: number, share: number): number {
  return from * exponential(share * logarithm(to / from));
}
