import { requireDomain } from "../numerics/domain-error.js";
import { geometricStep } from "../numerics/geometric-step.js";
import { metres, type Kilonewtons, type Kilopascals, type Metres } from "../../units/quantities.js";
import type { DesignedLength } from "./design-length.js";
import { randolphWroth } from "./randolph-wroth.js";

/** A pile to be designed in ground whose stiffness changes with depth in a known way. */
export interface ProfileTask {
  readonly diameter: Metres;
  readonly pileModulus: Kilopascals;
  readonly poisson: number;
  readonly shortest: Metres;
  readonly longest: Metres;
  /** modulus at a depth (m) over that at the surface, > 0 */
  readonly shape: (depth: number) => number;
}

/** Lengths at which the profile is averaged; between them the answer is found by halving. */
const trials = 48;
/** Depth below the tip, in diameters, over which the ground under the base is averaged. */
const underBase = 2;
/**
 * Smallest radius of influence, in shaft radii. A tip in a layer far stiffer than those above makes the form's radius so small that the
 * shaft would seem rigid, or inside the shaft; no pile of two diameters or more in uniform or linearly stiffening ground comes below this.
 */
const leastInfluence = 2;

/**
 * A designer of lengths in layered ground or ground that stiffens with depth: Randolph & Wroth's form with the average modulus along the
 * shaft, that at the tip and that below the base.
 *
 * @param task  pile, limits and shape of the profile
 * @returns     the shortest length at which the predicted settlement is allowable, for a load (kN), a modulus at the surface (kPa), an
 *   allowable settlement (m) and a length step (m, 0 for any length); within 1 mm of the first such length where stiffness rises
 *   over each of the 48 stretches of trial lengths
 * @throws {DomainError} the limits are out of order or the profile is not above zero
 * @source Randolph and Wroth (1978); with average and tip moduli for profiles other than linear as is common practice
 */
export function profileDesign(task: ProfileTask): (load: Kilonewtons, modulus: number, allowable: Metres, step: Metres) => DesignedLength {
  const { shortest, longest, diameter, pileModulus, poisson, shape } = task;
  requireDomain(longest >= shortest && longest < Infinity, "Longest length", longest, "at least the shortest length");
  const mean = runningMean(shape, longest + underBase * diameter, Math.min(diameter / 4, 0.1));
  const stiffness = (length: number, modulus: number): number => {
    const along = mean(length);
    const at = shape(length * (1 - 1e-9));
    const below = (mean(length + underBase * diameter) * (length + underBase * diameter) - along * length) / (underBase * diameter);
    return randolphWroth({
      length: metres(length), radius: metres(diameter / 2), baseRatio: 1, tipShearModulus: (modulus * at) / (2 * (1 + poisson)),
      averageRatio: along / at, baseStiffnessRatio: at / below, poisson, pileModulus, leastInfluence,
    }).stiffness;
  };
  return (load, modulus, allowable, step) => {
    const enough = (length: number): boolean => stiffness(length, modulus) * allowable >= load * (1 - 1e-9);
    const first = firstEnough(shortest, longest, enough);
    if (first === undefined) return { length: longest, allowable: false };
    if (step === 0 || first === shortest) return { length: metres(first), allowable: true };
    for (let n = Math.ceil((first - shortest) / step - 1e-6); ; n++) {
      // A longer pile is not always the stiffer one where a soft layer lies below: further steps are tried.
      const length = Math.min(shortest + n * step, longest);
      if (enough(length)) return { length: metres(length), allowable: true };
      if (length === longest) return { length: longest, allowable: false };
    }
  };
}

function firstEnough(shortest: number, longest: number, enough: (length: number) => boolean): number | undefined {
  if (enough(shortest)) return shortest;
  let low = shortest;
  for (let k = 1; k <= trials; k++) {
    let high = k === trials ? longest : geometricStep(shortest, longest, k / trials);
    if (enough(high)) {
      while (high - low > 1e-4) {
        const middle = (low + high) / 2;
        if (enough(middle)) high = middle;
        else low = middle;
      }
      return high;
    }
    low = high;
  }
  return undefined;
}

/** Mean of a function of depth from the surface down, tabulated once and interpolated. */
function runningMean(value: (depth: number) => number, depth: number, step: number): (depth: number) => number {
  const steps = Math.ceil(depth / step);
  const sums = new Float64Array(steps + 1);
  for (let i = 0; i < steps; i++) {
    const here = value((i + 0.5) * step);
    requireDomain(here > 0 && here < Infinity, "Assumed stiffness", here, "above zero at all depths");
    sums[i + 1] = sums[i] + here * step;
  }
  return (z) => {
    const x = Math.min(z / step, steps);
    const i = Math.min(Math.floor(x), steps - 1);
    return (sums[i] + (x - i) * (sums[i + 1] - sums[i])) / Math.min(z, steps * step);
  };
}
