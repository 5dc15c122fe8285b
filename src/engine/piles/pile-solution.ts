import { requireDomain } from "../numerics/domain-error.js";
import { complianceBanded, factorBanded, solveBanded } from "../numerics/banded-cholesky.js";
import { ELEMENT_UNKNOWNS, PACKED } from "./pile-elements.js";
import { isPile, type PileMesh } from "./pile-mesh.js";

/** What one solve of a mesh under a unit head load gives. */
export interface PileSolution {
  /** settlement of the head under a unit load, averaged over the head, m/kN */
  readonly compliance: number;
  /** displacement under a unit load, by unknown, m/kN */
  readonly displacements: Float64Array;
  /** Cholesky factor of the stiffness, in the mesh's envelope */
  readonly factor: Float64Array;
}

/**
 * Solves a mesh for a unit load on the pile head.
 *
 * @param mesh  the mesh
 * @param moduli  Young's modulus of each cell, kPa, > 0, rings x levels, ring by ring; cells inside the pile are not read
 * @param pileModulus  Young's modulus of the pile, kPa, > 0
 * @returns the solution
 * @throws {DomainError} a modulus is not above zero, or an array is too short
 */
export function solvePile(mesh: PileMesh, moduli: Float64Array, pileModulus: number): PileSolution {
  const { unknowns, envelope, headLoad } = mesh;
  const factor = new Float64Array(envelope.size);
  assemble(mesh, moduli, pileModulus, factor);
  factorBanded(factor, envelope);
  const displacements = Float64Array.from(headLoad);
  solveBanded(factor, envelope, displacements);
  let compliance = 0;
  for (let i = 0; i < unknowns; i++) compliance += headLoad[i] * displacements[i];
  return { compliance, displacements, factor };
}

/**
 * Settlement of the head under a unit load alone, a quarter faster than `solvePile`.
 *
 * @param mesh  the mesh
 * @param moduli  as for `solvePile`
 * @param pileModulus  Young's modulus of the pile, kPa, > 0
 * @returns averaged over the head, m/kN
 * @throws {DomainError} a modulus is not above zero, or an array is too short
 */
export function headCompliance(mesh: PileMesh, moduli: Float64Array, pileModulus: number): number {
  return complianceBanded(mesh.envelope, (stiffness) => assemble(mesh, moduli, pileModulus, stiffness), mesh.headLoad);
}

function assemble(mesh: PileMesh, moduli: Float64Array, pileModulus: number, stiffness: Float64Array): void {
  const { columns, rows, upper, lower, places } = mesh;
  requireDomain(pileModulus > 0 && pileModulus < Infinity, "Pile modulus", pileModulus, "above 0 kPa");
  requireDomain(moduli.length >= mesh.rings.length * (mesh.levelBounds.length - 1), "Number of cell moduli", moduli.length, "one a cell");
  const nr = rows.length - 1;
  const levels = 2 * nr;
  for (let c = 0; c < columns.length - 1; c++) {
    for (let r = 0; r < nr; r++) {
      const pile = isPile(mesh, c, r);
      const above = pile ? pileModulus : moduli[c * levels + 2 * r];
      const below = pile ? pileModulus : moduli[c * levels + 2 * r + 1];
      requireDomain(above > 0 && below > 0, "Modulus of a cell", Math.min(above, below), "above 0 kPa");
      const end = (c * nr + r + 1) * PACKED;
      for (let k = end - PACKED; k < end; k++) {
        const place = places[k];
        if (place >= 0) stiffness[place] += above * upper[k] + below * lower[k];
      }
    }
  }
}

/**
 * Forces on the unknowns of one element by one of its halves at unit modulus: k u.
 *
 * @param mesh  the mesh
 * @param element  number of the element, column by column
 * @param half  the stiffness of that half, `mesh.upper` or `mesh.lower`
 * @param displacements  by unknown of the mesh
 * @param forces  16, by local unknown; overwritten
 * @returns u' k u, twice the strain energy of the half at unit modulus
 */
export function halfForces(mesh: PileMesh, element: number, half: Float64Array, displacements: Float64Array, forces: Float64Array): number {
  const first = element * ELEMENT_UNKNOWNS;
  for (let i = 0; i < ELEMENT_UNKNOWNS; i++) {
    const p = mesh.elementUnknowns[first + i];
    local[i] = p < 0 ? 0 : displacements[p];
  }
  forces.fill(0);
  let k = element * PACKED;
  for (let i = 0; i < ELEMENT_UNKNOWNS; i++) {
    const ui = local[i];
    let sum = 0;
    for (let j = 0; j < i; j++, k++) {
      sum += half[k] * local[j];
      forces[j] += half[k] * ui;
    }
    forces[i] += sum + half[k++] * ui;
  }
  let energy = 0;
  for (let i = 0; i < ELEMENT_UNKNOWNS; i++) energy += forces[i] * local[i];
  return energy;
}
const local = new Float64Array(ELEMENT_UNKNOWNS);
