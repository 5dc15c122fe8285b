import type { Kilonewtons, Kilopascals, Metres } from "../../units/quantities.js";
import { metres } from "../../units/quantities.js";
import { requireDomain } from "../numerics/domain-error.js";
import { exponential } from "../numerics/exponential.js";
import { hyperbolicTangent } from "../numerics/hyperbolic.js";
import { logarithm } from "../numerics/logarithm.js";

/** A pile to be designed in ground of one modulus. */
export interface DesignTask {
  /** kN, >= 0 */
  readonly load: Kilonewtons;
  /** m, > 0 */
  readonly diameter: Metres;
  /** Young's modulus of the ground that the design assumes, kPa, > 0 */
  readonly soilModulus: Kilopascals;
  /** Young's modulus of the pile, kPa, > 0 */
  readonly pileModulus: Kilopascals;
  /** allowable settlement of the head, m, > 0 */
  readonly allowable: Metres;
  /** Poisson's ratio of the ground, 0 to 0.5 */
  readonly poisson: number;
  /** m, at least e / (5 (1 - poisson)) diameters, about one: the closed form has no meaning for shorter piles */
  readonly shortest: Metres;
  /** m, at least the shortest */
  readonly longest: Metres;
  /** lengths are the shortest plus a whole number of these, m; 0 or absent: any length */
  readonly step?: Metres;
}

/** The length that is built. */
export interface DesignedLength {
  /** m, from shortest to longest */
  readonly length: Metres;
  /** whether the predicted settlement is allowable at that length */
  readonly allowable: boolean;
}

/**
 * Shortest length at which the predicted settlement is allowable.
 *
 * The prediction is Randolph & Wroth's closed form in uniform ground. Stiffness rises with length up to a greatest value and
 * falls slowly beyond it, because the form's radius of influence grows with length while a compressible pile no longer carries
 * load to its lower end; where even that value is not enough, or lies beyond the longest length, no length helps and the longest is returned.
 *
 * @param task  load, ground and limits
 * @returns length, relative error below 1e-9 before the step is applied, and whether it is enough
 * @throws {DomainError} an argument is out of range
 * @source `randolphWrothSettlement`, solved for the length by Newton's method between bounds
 */
export function designLength(task: DesignTask): DesignedLength {
  const { load, diameter, soilModulus, pileModulus, allowable, poisson, shortest, longest, step = metres(0) } = task;
  requireDomain(load >= 0 && load < Infinity, "Load", load, "0 kN or more");
  requireDomain(diameter > 0 && diameter < Infinity, "Pile diameter", diameter, "above 0 m");
  requireDomain(soilModulus > 0 && soilModulus < Infinity, "Young's modulus of the ground", soilModulus, "above 0 kPa");
  requireDomain(pileModulus > 0 && pileModulus < Infinity, "Pile modulus", pileModulus, "above 0 kPa");
  requireDomain(allowable > 0 && allowable < Infinity, "Allowable settlement", allowable, "above 0 m");
  requireDomain(poisson >= 0 && poisson <= 0.5, "Poisson's ratio", poisson, "from 0 to 0.5");
  requireDomain(longest >= shortest && longest < Infinity, "Longest length", longest, "at least the shortest length");
  requireDomain(step >= 0 && step < Infinity, "Length step", step, "0 m or more");
  const least = (Math.E * diameter) / (5 * (1 - poisson));
  requireDomain(shortest >= least, "Shortest length", shortest, `at least ${least.toPrecision(3)} m for this diameter`);
  const radius = diameter / 2;
  const shear = soilModulus / (2 * (1 + poisson));
  const needed = load / (allowable * shear * radius);
  const form: Form = { base: 4 / (1 - poisson), lambda: pileModulus / shear, reach: 2.5 * (1 - poisson) };
  const [from, to] = [shortest / radius, longest / radius];
  if (dimensionless(form, from) >= needed) return { length: shortest, allowable: true };
  const enough = stiffEnough(form, from, to, needed);
  if (enough === undefined) return { length: longest, allowable: false };
  const length = lengthOf(form, from, enough, needed) * radius;
  if (step === 0) return { length: metres(Math.min(Math.max(length, shortest), longest)), allowable: true };
  // A hair below a multiple is the multiple: the root is known to nine digits only.
  const stepped = Math.min(shortest + Math.ceil((length - shortest) / step - 1e-9) * step, longest);
  return { length: metres(stepped), allowable: dimensionless(form, stepped / radius) >= needed * (1 - 1e-9) };
}

/** Constants of the closed form in uniform ground: 4 / (1 - nu), Ep / G and r_m / L. */
interface Form {
  readonly base: number;
  readonly lambda: number;
  readonly reach: number;
}

/** Derivative of ln stiffness by ln length, set by each call of `dimensionless`: a second result without an allocation. */
let elasticity = 0;

/** Head stiffness over shear modulus and radius, P / (G r0 w), of a pile of a given length over radius. */
function dimensionless(form: Form, slenderness: number): number {
  const zeta = logarithm(form.reach * slenderness);
  const mu = Math.sqrt(2 / (zeta * form.lambda));
  const y = mu * slenderness;
  const tanh = hyperbolicTangent(y);
  const shaft = tanh / mu;
  const shaftChange = ((1 - tanh * tanh) * y * (1 - 1 / (2 * zeta)) + tanh / (2 * zeta)) / mu;
  const toBase = form.base / (Math.PI * form.lambda);
  const numerator = form.base + (2 * Math.PI * shaft) / zeta;
  const denominator = 1 + toBase * shaft;
  elasticity = (2 * Math.PI * (shaftChange - shaft / zeta)) / (zeta * numerator) - (toBase * shaftChange) / denominator;
  return numerator / denominator;
}

/** A slenderness up to `to` at which the pile is stiff enough and below which stiffness rises, or undefined if there is none. */
function stiffEnough(form: Form, from: number, to: number, needed: number): number | undefined {
  if (dimensionless(form, to) >= needed) return to;
  if (elasticity >= 0) return undefined;
  let low = from;
  let high = to;
  while (high > low * (1 + 1e-12)) {
    const middle = Math.sqrt(low * high);
    if (dimensionless(form, middle) >= needed) return middle;
    if (elasticity > 0) low = middle;
    else high = middle;
  }
  return undefined;
}

/** Root of ln stiffness = ln needed between a slenderness too small and one large enough. */
function lengthOf(form: Form, from: number, enough: number, needed: number): number {
  let low = logarithm(from);
  let high = logarithm(enough);
  const target = logarithm(needed);
  let x = (low + high) / 2;
  for (let i = 0; i < 80; i++) {
    const gap = logarithm(dimensionless(form, exponential(x))) - target;
    if (gap >= 0) high = x;
    else low = x;
    const step = -gap / elasticity;
    let next = x + step;
    if (!(next > low && next < high)) next = (low + high) / 2;
    if (Math.abs(next - x) < 1e-10) return exponential(next);
    x = next;
  }
  return exponential(high);
}
