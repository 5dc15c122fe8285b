import { exponential } from "../numerics/exponential.js";
import { logarithm } from "../numerics/logarithm.js";
import { headCompliance } from "../piles/pile-solution.js";
import { averageLevels } from "../piles/project-levels.js";
import type { LengthForm } from "./length-form.js";

/**
 * ln head stiffness of one pile in realised ground by finite elements on the mesh of its length.
 *
 * @param form         of the pile's length: mesh and median moduli
 * @param pileModulus  kPa
 * @param field        log modulus about the median, level and own part together, rings x cells
 * @param bounds       depths that bound the cells, m
 * @returns            ln of the stiffness in kN/m
 */
export function elementLnStiffness(form: LengthForm, pileModulus: number, field: Float64Array, bounds: Float64Array): number {
  const { mesh } = form;
  const onLevels = averageLevels(field, mesh.rings.length, bounds, mesh.levelBounds);
  for (let c = 0; c < onLevels.length; c++) onLevels[c] = form.moduli[c] * exponential(onLevels[c]);
  return -logarithm(headCompliance(mesh, onLevels, pileModulus));
}
