import { tileEdge } from "../numerics/band-envelope.js";
import { solveBanded } from "../numerics/banded-cholesky.js";
import type { CellGroups, GroupedForm } from "./grouped-form.js";
import { ELEMENT_UNKNOWNS } from "./pile-elements.js";
import { isPile, type PileMesh } from "./pile-mesh.js";
import { halfForces, type PileSolution } from "./pile-solution.js";

/**
 * Second-order term of ln head stiffness about solved moduli, on groups of cells.
 *
 * With a the forces of a group under the pile's own displacements and C the head compliance,
 * M = 1/2 [diag(w) + w w' - 2 A' K^-1 A / C], half the second derivative of ln stiffness by the ln moduli of the groups.
 *
 * @param mesh  the mesh
 * @param moduli  Young's modulus of each cell, kPa, rings x levels, as solved
 * @param solution  of `solvePile` at these moduli
 * @param groups  ring and level groups of the mesh; a level group is a run of levels
 * @returns the form; exact for fields that are even over each group
 * @source the derivatives of C = f' u and of u = K^-1 f by the ln modulus of a group, -u' K_e u and -K^-1 K_e u
 */
export function secondOrderForm(mesh: PileMesh, moduli: Float64Array, solution: PileSolution, groups: CellGroups): GroupedForm {
  const { unknowns, envelope } = mesh;
  const { compliance } = solution;
  const rings = groups.radii.length;
  const bands = groups.levelBounds.length - 1;
  const count = rings * bands;
  const byBand = forcesByBand(mesh, moduli, solution, groups, bands);
  const matrix = new Float64Array(count * count);
  const weights = new Float64Array(count);
  for (let b = 0; b < bands; b++) {
    // Unknowns above the band are eliminated already: below its first one, the factor's tail solves for the same displacements.
    const least = byBand[b].reduce((so, cell) => cell.unknowns.reduce((low, p) => (p >= 0 && p < low ? p : low), so), unknowns);
    const first = least - (least % tileEdge);
    const right = new Float64Array((unknowns - first) * rings);
    for (const { ring, unknowns: places, forces, energy } of byBand[b]) {
      weights[ring * bands + b] += energy / compliance;
      for (let i = 0; i < ELEMENT_UNKNOWNS; i++) if (places[i] >= 0) right[(places[i] - first) * rings + ring] += forces[i];
    }
    solveBanded(solution.factor, envelope, right, rings, first);
    for (let below = b; below < bands; below++) {
      for (const { ring, unknowns: places, forces } of byBand[below]) {
        const row = (ring * bands + below) * count + b;
        for (let i = 0; i < ELEMENT_UNKNOWNS; i++) {
          if (places[i] < 0) continue;
          const at = (places[i] - first) * rings;
          const factor = -forces[i] / compliance;
          for (let q = 0; q < rings; q++) matrix[row + q * bands] += factor * right[at + q];
        }
      }
    }
  }
  for (let i = 0; i < count; i++) {
    for (let j = 0; j < count; j++) {
      const lower = (i % bands) - (j % bands);
      if (lower < 0 || (lower === 0 && i < j)) continue; // filled from the lower band of the pair
      const own = (weights[i] * weights[j] + (i === j ? weights[i] : 0)) / 2;
      matrix[i * count + j] += own;
      matrix[j * count + i] = matrix[i * count + j];
    }
  }
  return { ...groups, matrix, weights };
}

/** What a cell of ground exerts on the pile's own displacements. */
interface CellForces {
  readonly ring: number;
  /** unknowns of its element, -1 where held */
  readonly unknowns: Int32Array;
  /** forces on them under a unit head load, kN/kN */
  readonly forces: Float64Array;
  /** twice its strain energy, m/kN */
  readonly energy: number;
}

function forcesByBand(mesh: PileMesh, moduli: Float64Array, solution: PileSolution, groups: CellGroups, bands: number): CellForces[][] {
  const nr = mesh.rows.length - 1;
  const levels = 2 * nr;
  const byBand: CellForces[][] = Array.from({ length: bands }, () => []);
  for (let c = 0; c < mesh.rings.length; c++) {
    for (let level = 0; level < levels; level++) {
      if (isPile(mesh, c, level >> 1)) continue;
      const element = c * nr + (level >> 1);
      const modulus = moduli[c * levels + level];
      const forces = new Float64Array(ELEMENT_UNKNOWNS);
      const energy = modulus * halfForces(mesh, element, level % 2 === 0 ? mesh.upper : mesh.lower, solution.displacements, forces);
      for (let i = 0; i < ELEMENT_UNKNOWNS; i++) forces[i] *= modulus;
      const unknowns = mesh.elementUnknowns.subarray(element * ELEMENT_UNKNOWNS, (element + 1) * ELEMENT_UNKNOWNS);
      byBand[groups.levelGroups[level]].push({ ring: groups.ringGroups[c], unknowns, forces, energy });
    }
  }
  return byBand;
}
