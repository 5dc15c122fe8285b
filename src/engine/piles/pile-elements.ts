/** Nodes of an element, row by row: three above, two half way down, three below. */
export const ELEMENT_NODES = 8;
/** Unknowns of an element: radial and downward displacement of each node in turn. */
export const ELEMENT_UNKNOWNS = 16;
/** Entries of the lower triangle of an element stiffness, row by row. */
export const PACKED = (ELEMENT_UNKNOWNS * (ELEMENT_UNKNOWNS + 1)) / 2;

const nodeXi = [-1, 0, 1, -1, 1, -1, 0, 1];
const nodeEta = [-1, -1, -1, 0, 0, 1, 1, 1];
const gaussPoint = 1 / Math.sqrt(3);

/** The three nodes of the outer and of the lower edge. */
const outerEdge = [2, 4, 7];
const lowerEdge = [5, 6, 7];

const value = new Float64Array(ELEMENT_NODES);
const alongRadius = new Float64Array(ELEMENT_NODES);
const alongDepth = new Float64Array(ELEMENT_NODES);
/** Strains (radial, hoop, vertical, shear) by unknown, and the stresses that they make at unit modulus. */
const strain = new Float64Array(4 * ELEMENT_UNKNOWNS);
const stress = new Float64Array(4 * ELEMENT_UNKNOWNS);

/**
 * Adds one half of an axisymmetric 8-node rectangle, at unit modulus, to a packed element stiffness.
 *
 * The 2 x 2 rule is taken one row of points at a time, so that the upper and the lower half of an element may have moduli of
 * their own. The reduced rule also keeps nearly incompressible ground from locking.
 *
 * @param packed  lower triangle, row by row, from `offset` on; added to, kN/m per kPa
 * @param inner  inner radius, m, >= 0
 * @param outer  outer radius, m
 * @param height  height of the whole element, m
 * @param poisson  Poisson's ratio, 0 to below 0.5
 * @param half  -1 the upper half, 1 the lower
 * @source serendipity shape functions and 2 x 2 integration: Zienkiewicz & Taylor, The Finite Element Method (method only)
 */
export function addElementHalf(packed: Float64Array, offset: number, inner: number, outer: number, height: number, poisson: number, half: -1 | 1): void {
  const halfWidth = (outer - inner) / 2;
  const halfHeight = height / 2;
  const y = half * gaussPoint;
  for (let side = -1; side <= 1; side += 2) {
    const x = side * gaussPoint;
    for (let i = 0; i < ELEMENT_NODES; i++) {
      const xi = nodeXi[i];
      const eta = nodeEta[i];
      if (xi !== 0 && eta !== 0) {
        value[i] = ((1 + x * xi) * (1 + y * eta) * (x * xi + y * eta - 1)) / 4;
        alongRadius[i] = (xi * (1 + y * eta) * (2 * x * xi + y * eta)) / (4 * halfWidth);
        alongDepth[i] = (eta * (1 + x * xi) * (x * xi + 2 * y * eta)) / (4 * halfHeight);
      } else if (xi === 0) {
        value[i] = ((1 - x * x) * (1 + y * eta)) / 2;
        alongRadius[i] = (-x * (1 + y * eta)) / halfWidth;
        alongDepth[i] = (eta * (1 - x * x)) / (2 * halfHeight);
      } else {
        value[i] = ((1 + x * xi) * (1 - y * y)) / 2;
        alongRadius[i] = (xi * (1 - y * y)) / (2 * halfWidth);
        alongDepth[i] = (-y * (1 + x * xi)) / halfHeight;
      }
    }
    const radius = (inner + outer) / 2 + halfWidth * x;
    addPoint(packed, offset, radius, 2 * Math.PI * radius * halfWidth * halfHeight, poisson);
  }
}

/**
 * Adds the ground beside one half of an outermost element, out to infinity, at unit modulus.
 *
 * Beyond the mesh displacements are taken to die away as 1 / distance along rays from the pile head, as they do far from any
 * load on a half-space. Each edge then carries the cone of ground behind it: a conforming extension that adds no unknown. A
 * fixed edge at 150 diameters instead makes piles 1 to 8 % too stiff, more the longer they are.
 *
 * @param packed  lower triangle of the element, as for `addElementHalf`; added to
 * @param outer  radius of the mesh, m
 * @param top  depth of the upper edge of the whole element, m
 * @param bottom  depth of its lower edge, m
 * @source decay with distance: Boussinesq's point load; the extension is our own
 */
export function addGroundBeside(packed: Float64Array, offset: number, outer: number, top: number, bottom: number, poisson: number, half: -1 | 1): void {
  const s = half * gaussPoint;
  addRay(packed, offset, outerEdge, s, outer, (top + bottom) / 2 + ((bottom - top) / 2) * s, 0, (bottom - top) / 2, poisson);
}

/**
 * Adds the ground under a lowest element, as `addGroundBeside` does beside.
 *
 * @param packed  lower triangle of the element; added to
 * @param inner  inner radius of the element, m
 * @param outer  outer radius, m
 * @param bottom  depth of the mesh, m
 */
export function addGroundBelow(packed: Float64Array, offset: number, inner: number, outer: number, bottom: number, poisson: number): void {
  for (let side = -1; side <= 1; side += 2) {
    const s = side * gaussPoint;
    addRay(packed, offset, lowerEdge, s, (inner + outer) / 2 + ((outer - inner) / 2) * s, bottom, (outer - inner) / 2, 0, poisson);
  }
}

/** Adds the ray of ground through the point s of an edge at (r, z), whose derivatives along the edge are rs and zs. */
function addRay(packed: Float64Array, offset: number, nodes: readonly number[], s: number, r: number, z: number, rs: number, zs: number, poisson: number): void {
  // Coordinates (lambda r, lambda z): derivatives along the ray and along the edge, turned into those along r and z at lambda = 1.
  const area = r * zs - z * rs;
  value.fill(0);
  alongRadius.fill(0);
  alongDepth.fill(0);
  for (let k = 0; k < 3; k++) {
    const at = k - 1;
    const shape = at === 0 ? 1 - s * s : (s * (s + at)) / 2;
    const slope = at === 0 ? -2 * s : s + at / 2;
    value[nodes[k]] = shape;
    alongRadius[nodes[k]] = (-zs * shape - z * slope) / area;
    alongDepth[nodes[k]] = (rs * shape + r * slope) / area;
  }
  // Strains fall as lambda^-2 and volume grows as lambda^2: the integral along the ray is 1.
  addPoint(packed, offset, r, 2 * Math.PI * r * Math.abs(area), poisson);
}

/** Adds one integration point, whose shape values stand in the module's buffers, with its volume. */
function addPoint(packed: Float64Array, offset: number, radius: number, volume: number, poisson: number): void {
  const scale = volume / ((1 + poisson) * (1 - 2 * poisson));
  const direct = scale * (1 - poisson);
  const cross = scale * poisson;
  const shear = volume / (2 * (1 + poisson));
  const n = ELEMENT_UNKNOWNS;
  for (let i = 0; i < ELEMENT_NODES; i++) {
    const u = 2 * i;
    const w = u + 1;
    strain[u] = alongRadius[i];
    strain[n + u] = value[i] / radius;
    strain[3 * n + u] = alongDepth[i];
    strain[2 * n + w] = alongDepth[i];
    strain[3 * n + w] = alongRadius[i];
  }
  for (let j = 0; j < n; j++) {
    const a = strain[j];
    const b = strain[n + j];
    const c = strain[2 * n + j];
    stress[j] = direct * a + cross * (b + c);
    stress[n + j] = direct * b + cross * (a + c);
    stress[2 * n + j] = direct * c + cross * (a + b);
    stress[3 * n + j] = shear * strain[3 * n + j];
  }
  let k = offset;
  for (let i = 0; i < n; i++) {
    const a = strain[i];
    const b = strain[n + i];
    const c = strain[2 * n + i];
    const d = strain[3 * n + i];
    for (let j = 0; j <= i; j++, k++) packed[k] += a * stress[j] + b * stress[n + j] + c * stress[2 * n + j] + d * stress[3 * n + j];
  }
}
