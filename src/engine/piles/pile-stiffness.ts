import { requireDomain } from "../numerics/domain-error.js";
import { exponential } from "../numerics/exponential.js";
import { gaussLegendre } from "../numerics/gauss-legendre.js";
import type { Kilopascals, Metres } from "../../units/quantities.js";
import { metres } from "../../units/quantities.js";
import { logarithm } from "../numerics/logarithm.js";
import { energyShares } from "./energy-shares.js";
import { buildMesh, type PileMesh } from "./pile-mesh.js";
import { pileMeshLines, standardGroups } from "./pile-mesh-lines.js";
import type { PileGeometry, PileResponse } from "./pile-response.js";
import { solvePile } from "./pile-solution.js";
import { secondOrderForm } from "./second-order.js";

/**
 * Response of a pile's head stiffness to the ground around it, from one finite-element solve in the median ground.
 *
 * @param pile  dimensions and pile modulus
 * @param median  median Young's modulus of the ground at a depth in m, kPa, > 0
 * @param options  withForm: whether the second-order form is made too (default); it takes twice the time of the rest
 * @returns stiffness, energy shares and the form; the stiffness is 0.1 to 0.2 % high in even ground up to a Poisson's ratio of 0.35, 0.3 to 0.6 % at 0.49
 * @throws {DomainError} a dimension or a modulus is out of range
 */
export function pileResponse(pile: PileGeometry, median: (depth: Metres) => Kilopascals, options: { readonly withForm?: boolean } = {}): PileResponse {
  const mesh = pileMesh(pile);
  const moduli = medianModuli(mesh, median);
  const solution = solvePile(mesh, moduli, pile.pileModulus);
  const weights = energyShares(mesh, moduli, solution);
  return {
    length: pile.length,
    lnStiffness: -logarithm(solution.compliance),
    rings: mesh.rings,
    levelBounds: mesh.levelBounds,
    weights,
    weightSum: weights.reduce((sum, w) => sum + w, 0),
    form: options.withForm === false ? undefined : secondOrderForm(mesh, moduli, solution, standardGroups(mesh)),
  };
}

/** Meshes last used: they depend on dimensions and Poisson's ratio only, and making one costs as much as a solve. */
const recent = new Map<string, PileMesh>();
const recentLimit = 24;

/**
 * The standard mesh about a pile.
 *
 * @param pile  dimensions; the modulus does not matter
 * @returns the mesh, shared between calls: not to be written to
 * @throws {DomainError} a dimension is out of range
 */
export function pileMesh(pile: PileGeometry): PileMesh {
  const key = `${pile.diameter} ${pile.length} ${pile.poissonRatio}`;
  let mesh = recent.get(key);
  if (mesh === undefined) {
    mesh = buildMesh(pileMeshLines(pile));
    if (recent.size >= recentLimit) recent.delete(recent.keys().next().value!);
    recent.set(key, mesh);
  }
  return mesh;
}

/**
 * Moduli of a mesh's cells in ground that varies with depth only.
 *
 * @param mesh  the mesh
 * @param median  Young's modulus at a depth in m, kPa, > 0
 * @returns geometric mean over each level, rings x levels, kPa
 * @throws {DomainError} a modulus is not above zero
 */
export function medianModuli(mesh: PileMesh, median: (depth: Metres) => Kilopascals): Float64Array {
  const { rings, levelBounds } = mesh;
  const levels = levelBounds.length - 1;
  const rule = gaussLegendre(4);
  const moduli = new Float64Array(rings.length * levels);
  for (let level = 0; level < levels; level++) {
    let ln = 0;
    for (let q = 0; q < rule.nodes.length; q++) {
      const depth = levelBounds[level] + (levelBounds[level + 1] - levelBounds[level]) * rule.nodes[q];
      const modulus = median(metres(depth));
      requireDomain(modulus > 0 && modulus < Infinity, "Median ground modulus", modulus, "above 0 kPa");
      ln += rule.weights[q] * logarithm(modulus);
    }
    for (let ring = 0; ring < rings.length; ring++) moduli[ring * levels + level] = exponential(ln);
  }
  return moduli;
}
