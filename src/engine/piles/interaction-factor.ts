import { requireDomain } from "../numerics/domain-error.js";
import { hyperbolicTangent, inverseHyperbolicSine } from "../numerics/hyperbolic.js";
import { logarithm } from "../numerics/logarithm.js";

/** A pile about whose neighbours is asked. */
export interface InteractingPile {
  /** m */
  readonly length: number;
  /** shaft radius, m */
  readonly radius: number;
  /** shear modulus at the level of the tip, kPa */
  readonly tipShearModulus: number;
  /** average shear modulus along the shaft over that at the tip */
  readonly averageRatio: number;
  /** Poisson's ratio of the ground, 0 to 0.5 */
  readonly poisson: number;
  /** Young's modulus of the pile, kPa */
  readonly pileModulus: number;
}

/**
 * Interaction factor of two equal piles: what each settles more because the other carries the same load, over what it settles alone.
 *
 * The shaft's ground settles as ln(r_m / r), the base's as 2 r0 / (pi r): a pair is a single pile whose zeta is
 * ln(r_m / r0) + ln(r_m / s) and whose base is softer by 1 + 2 r0 / (pi s), with the compressibility of the shaft as in the
 * closed form of the single pile. The source's logarithm ends at r_m, where elastic ground still settles a good deal; asinh(r_m / (2 s))
 * is the same near the pile and falls with 1 / s far away, as the settlement around any load does.
 *
 * @param pile     one of the two
 * @param spacing  of the axes, m, at least two radii
 * @returns        alpha, 0 to below 1; 0 to 12 % below boundary elements with Mindlin's solution from 2 to 20 diameters
 * @throws {DomainError} an argument is out of range
 * @source Randolph & Wroth (1979), An analysis of the vertical deformation of pile groups, Geotechnique 29 (4)
 */
export function interactionFactor(pile: InteractingPile, spacing: number): number {
  const { length, radius, averageRatio, poisson } = pile;
  requireDomain(radius > 0 && length > 0 && length < Infinity, "Pile", `${length} m long with a radius of ${radius} m`, "longer and thicker than nothing");
  requireDomain(spacing >= 2 * radius, "Spacing of piles", spacing, `at least the diameter, ${2 * radius} m`);
  const reach = 2.5 * averageRatio * (1 - poisson) * length;
  const zeta = logarithm(reach / radius);
  requireDomain(zeta > 0, "Length over radius", length / radius, "large enough for the radius of influence to lie outside the shaft");
  const together = stiffness(pile, zeta + inverseHyperbolicSine(reach / (2 * spacing)), 1 + (2 * radius) / (Math.PI * spacing));
  return stiffness(pile, zeta, 1) / together - 1;
}

/** Head stiffness over the tip's shear modulus and the radius, for a given zeta and a base softened by a factor. */
function stiffness({ length, radius, averageRatio, poisson, tipShearModulus, pileModulus }: InteractingPile, zeta: number, softening: number): number {
  const lambda = pileModulus / tipShearModulus;
  const muLength = (Math.sqrt(2 / (zeta * lambda)) * length) / radius;
  const perShaft = (hyperbolicTangent(muLength) / muLength) * (length / radius);
  const base = 4 / ((1 - poisson) * softening);
  return (base + ((2 * Math.PI * averageRatio) / zeta) * perShaft) / (1 + (base * perShaft) / (Math.PI * lambda));
}
