import { bandEnvelope, placeInEnvelope, type BandEnvelope } from "../numerics/band-envelope.js";
import { requireDomain } from "../numerics/domain-error.js";
import { addElementHalf, addGroundBelow, addGroundBeside, ELEMENT_NODES, ELEMENT_UNKNOWNS, PACKED } from "./pile-elements.js";

/** Where a mesh has its lines, and which of its elements are pile. */
export interface MeshLines {
  /** radii of the element columns, m, from 0, increasing */
  readonly columns: Float64Array;
  /** depths of the element rows, m, from 0, increasing */
  readonly rows: Float64Array;
  /** columns, from the axis, that the pile takes */
  readonly pileColumns: number;
  /** rows, from the surface, that the pile takes */
  readonly pileRows: number;
  /** Poisson's ratio of the ground, 0 to below 0.5 */
  readonly poisson: number;
}

/**
 * An axisymmetric mesh of 8-node rectangles about one pile, with everything that does not depend on moduli. A cell is one half
 * (upper or lower) of an element: its modulus is its own. Cells are numbered ring by ring, cell = ring * levels + level.
 */
export interface PileMesh extends MeshLines {
  /** representative radius of each ring of cells, m */
  readonly rings: Float64Array;
  /** depths that bound the levels of cells, m */
  readonly levelBounds: Float64Array;
  readonly unknowns: number;
  /** where the entries of the stiffness stand: nodes between two rows of nodes see fewer others, which saves a quarter of a band's work */
  readonly envelope: BandEnvelope;
  /** unknown of each local unknown, elements x 16, ascending; -1 where held on the axis. Elements are numbered column by column */
  readonly elementUnknowns: Int32Array;
  /** stiffness of the upper and of the lower half of each element at unit modulus, elements x packed lower triangle, kN/m per kPa */
  readonly upper: Float64Array;
  readonly lower: Float64Array;
  /** place in the envelope of each packed entry, -1 where held */
  readonly places: Int32Array;
  /** unit load spread evenly over the pile head, by unknown */
  readonly headLoad: Float64Array;
}

/** Poisson's ratio of the pile itself: concrete. It moves the head stiffness by less than 0.1 %. */
const pilePoisson = 0.2;

/**
 * Builds a mesh from its lines.
 *
 * @param lines  where the lines are
 * @returns the mesh; the surface is free, the axis is held sideways, and the ground goes on to infinity beyond the outer and lower edges
 * @throws {DomainError} lines do not increase from 0, or the pile takes all of them
 */
export function buildMesh(lines: MeshLines): PileMesh {
  const { columns, rows, pileColumns, pileRows, poisson } = lines;
  const nc = columns.length - 1;
  const nr = rows.length - 1;
  requireDomain(increasing(columns) && pileColumns >= 1 && pileColumns < nc, "Columns of the mesh", columns.join(", "), "increasing from 0, with some beyond the pile");
  requireDomain(increasing(rows) && pileRows >= 0 && pileRows < nr, "Rows of the mesh", rows.join(", "), "increasing from 0, with some below the pile");
  requireDomain(poisson >= 0 && poisson < 0.5, "Poisson's ratio", poisson, "from 0 to below 0.5");
  const elements = nc * nr;
  // Rows of nodes hold 2 nc + 1 and nc + 1 nodes in turn; the node on the axis has one unknown, all others two.
  const fullRow = 2 * (2 * nc + 1) - 1;
  const midRow = 2 * (nc + 1) - 1;
  const unknowns = (nr + 1) * fullRow + nr * midRow;
  const elementUnknowns = new Int32Array(elements * ELEMENT_UNKNOWNS);
  const upper = new Float64Array(elements * PACKED);
  const lower = new Float64Array(elements * PACKED);
  for (let c = 0; c < nc; c++) {
    for (let r = 0; r < nr; r++) {
      const e = c * nr + r;
      const above = r * (fullRow + midRow);
      const mid = above + fullRow;
      const nodes = [above + 4 * c, above + 4 * c + 2, above + 4 * c + 4, mid + 2 * c, mid + 2 * c + 2, mid + midRow + 4 * c, mid + midRow + 4 * c + 2, mid + midRow + 4 * c + 4];
      for (let i = 0; i < ELEMENT_NODES; i++) {
        // Node numbers are those of the downward unknown less the one held on the axis at the head of each row.
        const onAxis = c === 0 && (i === 0 || i === 3 || i === 5);
        elementUnknowns[e * ELEMENT_UNKNOWNS + 2 * i] = onAxis ? -1 : nodes[i] - 1;
        elementUnknowns[e * ELEMENT_UNKNOWNS + 2 * i + 1] = nodes[i];
      }
      const nu = isPile(lines, c, r) ? pilePoisson : poisson;
      const height = rows[r + 1] - rows[r];
      const at = e * PACKED;
      addElementHalf(upper, at, columns[c], columns[c + 1], height, nu, -1);
      addElementHalf(lower, at, columns[c], columns[c + 1], height, nu, 1);
      if (c === nc - 1) {
        addGroundBeside(upper, at, columns[nc], rows[r], rows[r + 1], nu, -1);
        addGroundBeside(lower, at, columns[nc], rows[r], rows[r + 1], nu, 1);
      }
      if (r === nr - 1) addGroundBelow(lower, at, columns[c], columns[c + 1], rows[nr], nu);
    }
  }
  const envelope = bandEnvelope(firstUnknowns(elementUnknowns, unknowns));
  // Strain energy about a shaft falls with the square of the radius, so half of a column's energy lies inside its geometric mean radius:
  // a field taken there has the column's variance within 1 %, at the arithmetic mean it is 3 % short.
  const rings = Float64Array.from({ length: nc }, (_, c) => (columns[c] > 0 ? Math.sqrt(columns[c] * columns[c + 1]) : columns[c + 1] / 2));
  const levelBounds = Float64Array.from({ length: 2 * nr + 1 }, (_, l) => (l % 2 === 0 ? rows[l / 2] : (rows[(l - 1) / 2] + rows[(l + 1) / 2]) / 2));
  return {
    ...lines, rings, levelBounds, unknowns, envelope, elementUnknowns, upper, lower,
    places: placesOf(elementUnknowns, envelope), headLoad: headLoad(columns, pileColumns, unknowns),
  };
}

/** Whether an element is pile. */
export function isPile(lines: MeshLines, column: number, row: number): boolean {
  return column < lines.pileColumns && row < lines.pileRows;
}

/** The first unknown that each unknown shares an element with. */
function firstUnknowns(elementUnknowns: Int32Array, unknowns: number): Int32Array {
  const first = Int32Array.from({ length: unknowns }, (_, p) => p);
  for (let e = 0; e < elementUnknowns.length; e += ELEMENT_UNKNOWNS) {
    const own = elementUnknowns.subarray(e, e + ELEMENT_UNKNOWNS);
    const least = own.reduce((low, p) => (p >= 0 && p < low ? p : low), unknowns);
    for (const p of own) if (p >= 0 && least < first[p]) first[p] = least;
  }
  return first;
}

function placesOf(elementUnknowns: Int32Array, envelope: BandEnvelope): Int32Array {
  const places = new Int32Array((elementUnknowns.length / ELEMENT_UNKNOWNS) * PACKED);
  for (let e = 0, k = 0; e < elementUnknowns.length; e += ELEMENT_UNKNOWNS) {
    for (let i = 0; i < ELEMENT_UNKNOWNS; i++) {
      const p = elementUnknowns[e + i];
      for (let j = 0; j <= i; j++, k++) {
        const q = elementUnknowns[e + j];
        places[k] = p < 0 || q < 0 ? -1 : placeInEnvelope(envelope, p, q);
      }
    }
  }
  return places;
}

/** Nodal forces of a unit load spread evenly over the pile columns at the surface. */
function headLoad(columns: Float64Array, pileColumns: number, unknowns: number): Float64Array {
  const load = new Float64Array(unknowns);
  const area = columns[pileColumns] ** 2 / 2;
  for (let c = 0; c < pileColumns; c++) {
    const half = (columns[c + 1] - columns[c]) / 2;
    for (let side = -1; side <= 1; side += 2) {
      const x = side / Math.sqrt(3); // two points are exact: shape times radius is a cubic
      const share = (half * (columns[c] + half * (1 + x))) / area;
      load[4 * c] += (share * x * (x - 1)) / 2;
      load[4 * c + 2] += share * (1 - x * x);
      load[4 * c + 4] += (share * x * (x + 1)) / 2;
    }
  }
  return load;
}

function increasing(bounds: Float64Array): boolean {
  return bounds[0] === 0 && bounds.every((bound, i) => i === 0 || (bound > bounds[i - 1] && bound < Infinity));
}
