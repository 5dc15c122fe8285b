import { gaussLegendre } from "../numerics/gauss-legendre.js";
import type { CorrelationFamily } from "./correlation-family.js";

/** Below this thickness, in scales of fluctuation, differences of integrals lose more digits than three Gauss points. */
const THIN = 1 / 4096;
/** Below this one a cell is a point: the correlation changes by less than the error stated below, and squares may vanish. */
const POINT = 1e-10;

/**
 * Correlation of the ground averaged over two cells of a line, from the second integral F of the correlation (F'' = rho):
 * [F(d + s) + F(d - s) - F(d + e) - F(d - e)] / (h1 h2), with s half the sum and e half the difference of the thicknesses.
 *
 * Cells that overlap use the integral from 0, cells apart the tail, so that neither cancels; a thickness of 0 is a point.
 *
 * @param family  correlation in the scaled lag
 * @param distance  distance of the cells' middles over the scale of fluctuation; the sign does not matter
 * @param thicknessA  thickness of one cell over the scale of fluctuation, >= 0
 * @param thicknessB  thickness of the other
 * @returns covariance of the two averages over the point variance; relative error below 1e-9, and 1e-7 where the edge of a
 *   cell lies inside another one thinner than a four-thousandth of the scale
 * @source Vanmarcke (1983), Random Fields: Analysis and Synthesis, covariance of local averages
 */
export function averageCovariance(family: CorrelationFamily, distance: number, thicknessA: number, thicknessB: number): number {
  const d = Math.abs(distance);
  const thin = Math.min(thicknessA, thicknessB);
  const thick = Math.max(thicknessA, thicknessB);
  if (thin < POINT) return pointToCell(family, d, thick);
  const apart = d - (thin + thick) / 2;
  if (thin < THIN && (apart >= 0 || thin < THIN * thick)) {
    const { nodes, weights } = gaussLegendre(3);
    let sum = 0;
    for (let k = 0; k < 3; k++) sum += weights[k] * pointToCell(family, Math.abs(d + (nodes[k] - 0.5) * thin), thick);
    return sum;
  }
  const sum = (thin + thick) / 2;
  const difference = (thick - thin) / 2;
  const f = apart >= 0 ? family.doubleTail : family.doubleIntegral;
  return (f(d + sum) - f(d + difference) - f(Math.abs(d - difference)) + f(Math.abs(d - sum))) / (thin * thick);
}

function pointToCell(family: CorrelationFamily, d: number, thickness: number): number {
  if (thickness < POINT) return family.correlation(d);
  const half = thickness / 2;
  if (d <= half) return (family.integral(half + d) + family.integral(half - d)) / thickness;
  if (thickness >= THIN) return (family.tail(d - half) - family.tail(d + half)) / thickness;
  const { nodes, weights } = gaussLegendre(3);
  return nodes.reduce((sum, node, k) => sum + weights[k] * family.correlation(d + (node - 0.5) * thickness), 0);
}
