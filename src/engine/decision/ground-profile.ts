import { exponential } from "../numerics/exponential.js";
import { logarithm, logarithmOfOnePlus } from "../numerics/logarithm.js";
import type { Ground, GroundLayer } from "./problem.js";

/** The ground's medians and variances by depth, split into a level that scales and a shape that does not. */
export interface GroundProfile {
  /** median modulus at the surface with the regional level at its median, kPa */
  readonly modulus: number;
  /** median modulus at a depth (m) over `modulus` */
  shape(depth: number): number;
  /** equal keys mean equal shapes */
  readonly shapeKey: string;
  /** variance of ln modulus in the first layer that varies at all */
  readonly groundVariance: number;
  /** standard deviation of ln modulus at a depth (m) over the root of `groundVariance` */
  relativeSd(depth: number): number;
  readonly sdKey: string;
  readonly regionalVariance: number;
  /** whether the median is the same at all depths */
  readonly uniform: boolean;
  /** ln of `modulus` */
  readonly logModulus: number;
  /** ln of the median modulus at a depth (m), kPa */
  logMedian(depth: number): number;
}

/**
 * Medians of a lognormal field about a mean that may grow with depth: sigma^2 = ln(1 + COV^2), median = mean exp(-sigma^2 / 2).
 * The regional multiplier has unit mean and lowers the median in the same way.
 */
export function groundProfile(ground: Ground): GroundProfile {
  const variances = ground.layers.map((layer) => logarithmOfOnePlus(layer.cov ** 2));
  const regionalVariance = logarithmOfOnePlus(ground.regionalCov ** 2);
  const groundVariance = variances.find((v) => v > 0) ?? 0;
  const at = (depth: number): number => layerAt(ground.layers, depth);
  const logMedian = (depth: number): number => {
    const layer = ground.layers[at(depth)];
    return logarithm(layer.mean + layer.increase * (depth - layer.top)) - variances[at(depth)] / 2 - regionalVariance / 2;
  };
  const surface = logMedian(0);
  const relative = variances.map((v) => (groundVariance > 0 ? Math.sqrt(v / groundVariance) : 1));
  const uniform = ground.layers.length === 1 && ground.layers[0].increase === 0;
  return {
    modulus: exponential(surface),
    shape: uniform ? () => 1 : (depth) => exponential(logMedian(depth) - surface),
    shapeKey: uniform
      ? "uniform"
      : JSON.stringify(ground.layers.map((l, i) => [l.top, l.mean / ground.layers[0].mean, l.increase / ground.layers[0].mean, variances[i] - variances[0]])),
    groundVariance,
    relativeSd: (depth) => relative[at(depth)],
    sdKey: relative.every((r) => r === 1) ? "even" : JSON.stringify([ground.layers.map((l) => l.top), relative]),
    regionalVariance,
    uniform,
    logModulus: surface,
    logMedian,
  };
}

function layerAt(layers: readonly GroundLayer[], depth: number): number {
  let found = 0;
  for (let i = 1; i < layers.length; i++) if (layers[i].top <= depth) found = i;
  return found;
}
