import { ELEMENT_UNKNOWNS } from "./pile-elements.js";
import { isPile, type PileMesh } from "./pile-mesh.js";
import { halfForces, type PileSolution } from "./pile-solution.js";

/**
 * Share of the strain energy that each cell of ground takes: the derivative of ln head stiffness by the cell's ln modulus.
 *
 * @param mesh  the mesh
 * @param moduli  Young's modulus of each cell, kPa, rings x levels, as solved
 * @param solution  of `solvePile` at these moduli
 * @returns rings x levels, ring by ring, dimensionless, 0 inside the pile; the sum is below 1, the pile takes the rest
 */
export function energyShares(mesh: PileMesh, moduli: Float64Array, solution: PileSolution): Float64Array {
  const nc = mesh.rings.length;
  const nr = mesh.rows.length - 1;
  const shares = new Float64Array(nc * 2 * nr);
  const forces = new Float64Array(ELEMENT_UNKNOWNS);
  for (let c = 0; c < nc; c++) {
    for (let r = 0; r < nr; r++) {
      if (isPile(mesh, c, r)) continue;
      const cell = c * 2 * nr + 2 * r;
      shares[cell] = (moduli[cell] * halfForces(mesh, c * nr + r, mesh.upper, solution.displacements, forces)) / solution.compliance;
      shares[cell + 1] = (moduli[cell + 1] * halfForces(mesh, c * nr + r, mesh.lower, solution.displacements, forces)) / solution.compliance;
    }
  }
  return shares;
}
