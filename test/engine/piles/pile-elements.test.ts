import { describe, expect, it } from "vitest";
import { ELEMENT_UNKNOWNS } from "../../../src/engine/piles/pile-elements.js";
import { buildMesh } from "../../../src/engine/piles/pile-mesh.js";
import { halfForces } from "../../../src/engine/piles/pile-solution.js";

// An uneven mesh: a field that strains the ground evenly must be reproduced exactly by elements of any shape.
const columns = [0, 0.3, 0.5, 1.4, 2.1];
const rows = [0, 0.2, 1.1, 1.5, 4];
const poisson = 0.31;
const mesh = buildMesh({ columns: Float64Array.from(columns), rows: Float64Array.from(rows), pileColumns: 1, pileRows: 0, poisson });
const nc = columns.length - 1;
const nr = rows.length - 1;

/** Radius and depth of each unknown's node, and whether it is the downward one, rebuilt from the lines. */
function nodes(): { r: number; z: number; down: boolean }[] {
  const list: { r: number; z: number; down: boolean }[] = [];
  for (let t = 0; t <= 2 * nr; t++) {
    const z = t % 2 === 0 ? rows[t / 2] : (rows[(t - 1) / 2] + rows[(t + 1) / 2]) / 2;
    for (let s = 0; s <= 2 * nc; s += t % 2 === 0 ? 1 : 2) {
      const r = s % 2 === 0 ? columns[s / 2] : (columns[(s - 1) / 2] + columns[(s + 1) / 2]) / 2;
      if (s > 0) list.push({ r, z, down: false });
      list.push({ r, z, down: true });
    }
  }
  return list;
}

/** K u over the elements, and u' K u. */
function apply(u: Float64Array): { forces: Float64Array; energy: number } {
  const forces = new Float64Array(mesh.unknowns);
  const local = new Float64Array(ELEMENT_UNKNOWNS);
  let energy = 0;
  for (let e = 0; e < nc * nr; e++) {
    for (const half of [mesh.upper, mesh.lower]) {
      energy += halfForces(mesh, e, half, u, local);
      for (let i = 0; i < ELEMENT_UNKNOWNS; i++) {
        const p = mesh.elementUnknowns[e * ELEMENT_UNKNOWNS + i];
        if (p >= 0) forces[p] += local[i];
      }
    }
  }
  return { forces, energy };
}

const places = nodes();
const inside = places.map(({ r, z }) => r < columns[nc] && z > 0 && z < rows[nr]);

describe("the 8-node axisymmetric element", () => {
  it("has as many unknowns as nodes times two, less those held on the axis", () => expect(mesh.unknowns).toBe(places.length));

  // Source: patch test. Radial strain = hoop strain = a, vertical strain = b: even stresses, in equilibrium without body forces.
  it("passes the patch test: even strain needs no force inside", () => {
    const [a, b] = [0.7e-3, -1.3e-3];
    const u = Float64Array.from(places, ({ r, z, down }) => (down ? b * z + 0.2e-3 : a * r));
    const { forces } = apply(u);
    const largest = Math.max(...forces.map(Math.abs));
    forces.forEach((force, p) => {
      if (inside[p] && places[p].r > 0) expect(Math.abs(force)).toBeLessThan(1e-12 * largest);
    });
    expect(largest).toBeGreaterThan(1e-4);
  });

  // Source: identity. A downward shift strains nothing, so only the ground beyond the mesh, which does not shift at infinity, resists.
  it("resists no downward shift inside", () => {
    const { forces } = apply(Float64Array.from(places, ({ down }) => (down ? 1 : 0)));
    const largest = Math.max(...forces.map(Math.abs));
    forces.forEach((force, p) => {
      if (inside[p]) expect(Math.abs(force)).toBeLessThan(1e-12 * largest);
    });
    expect(largest).toBeGreaterThan(0.1);
  });

  // Source: closed form. Energy of even strain in a cylinder: volume times strain energy density, by the definition of the moduli.
  it("stores the energy of even strain", () => {
    const [a, b] = [0.7e-3, -1.3e-3];
    const lame = poisson / ((1 + poisson) * (1 - 2 * poisson));
    const shear = 1 / (2 * (1 + poisson));
    const density = (lame * (2 * a + b) ** 2 + 2 * shear * (2 * a * a + b * b)) / 2;
    // elements that touch no edge of the mesh carry no ground beyond it
    let energy = 0;
    const u = Float64Array.from(places, ({ r, z, down }) => (down ? b * z : a * r));
    const local = new Float64Array(ELEMENT_UNKNOWNS);
    for (let c = 0; c < nc - 1; c++) for (let r = 0; r < nr - 1; r++) for (const half of [mesh.upper, mesh.lower]) energy += halfForces(mesh, c * nr + r, half, u, local) / 2;
    const volume = Math.PI * columns[nc - 1] ** 2 * rows[nr - 1];
    expect(Math.abs(energy / (volume * density) - 1)).toBeLessThan(1e-12);
  });

  // Source: by hand. Downward displacement z^2 / 2 strains the ground by z, so that the energy of a row of integration points
  // goes as the square of its depth, z = (top + bottom) / 2 -+ height / sqrt(12).
  it("has its upper integration points in its upper half", () => {
    const u = Float64Array.from(places, ({ z, down }) => (down ? (z * z) / 2 : 0));
    const local = new Float64Array(ELEMENT_UNKNOWNS);
    const element = 1 * nr + 1;
    const upper = halfForces(mesh, element, mesh.upper, u, local);
    const lower = halfForces(mesh, element, mesh.lower, u, local);
    const middle = (rows[1] + rows[2]) / 2;
    const apart = (rows[2] - rows[1]) / Math.sqrt(12);
    expect(upper / lower).toBeCloseTo(((middle - apart) / (middle + apart)) ** 2, 10);
  });
});

describe("the ground beyond the mesh", () => {
  it("belongs to the lower half of the lowest elements, and to both halves of the outermost", () => {
    const shift = Float64Array.from(places, ({ down }) => (down ? 1 : 0)); // strains the ground beyond the mesh only
    const local = new Float64Array(ELEMENT_UNKNOWNS);
    const energies = (c: number, r: number) => [mesh.upper, mesh.lower].map((half) => halfForces(mesh, c * nr + r, half, shift, local));
    const [aboveLowest, lowest] = energies(0, nr - 1);
    expect(Math.abs(aboveLowest)).toBeLessThan(1e-12 * lowest);
    const [above, below] = energies(nc - 1, 0);
    expect(Math.min(above, below)).toBeGreaterThan(0.1 * Math.max(above, below));
  });

  // Source: independent quadrature. Energy of u = (r, z) f / |x|^2-like fields of degree -1 outside the box, by brute force on rays.
  it("holds the energy of a displacement that dies away as 1 / distance along rays", () => {
    // on the boundary: u_r = r / 10, u_z = 0.3 + z / 7; outside: the same at the boundary's point of the ray, over lambda
    const [R, Z] = [columns[nc], rows[nr]];
    const boundary = (r: number, z: number) => [r / 10, 0.3 + z / 7] as const;
    const outside = (r: number, z: number) => {
      const lambda = Math.max(r / R, z / Z);
      const [u, w] = boundary(r / lambda, z / lambda);
      return [u / lambda, w / lambda] as const;
    };
    const lame = poisson / ((1 + poisson) * (1 - 2 * poisson));
    const shear = 1 / (2 * (1 + poisson));
    const density = (r: number, z: number) => {
      const h = 1e-5 * Math.hypot(r, z);
      const [u1, w1] = outside(r + h, z);
      const [u2, w2] = outside(r - h, z);
      const [u3, w3] = outside(r, z + h);
      const [u4, w4] = outside(r, z - h);
      const [u] = outside(r, z);
      const strains = [(u1 - u2) / (2 * h), u / r, (w3 - w4) / (2 * h)];
      const angle = (u3 - u4 + w1 - w2) / (2 * h);
      const trace = strains[0] + strains[1] + strains[2];
      return lame * trace ** 2 + 2 * shear * strains.reduce((sum, e) => sum + e * e, 0) + shear * angle ** 2;
    };
    // lambda from 1 to infinity by the substitution lambda = 1 / t; midpoint rules
    let energy = 0;
    const n = 400;
    const m = 40;
    for (let i = 0; i < n; i++) {
      for (let k = 0; k < m; k++) {
        const t = (k + 0.5) / m;
        const lambda = 1 / t;
        const dLambda = 1 / (t * t * m);
        const z = ((i + 0.5) / n) * Z;
        energy += density(lambda * R, lambda * z) * 2 * Math.PI * (lambda * R) * lambda * R * (Z / n) * dLambda;
        const r = ((i + 0.5) / n) * R;
        energy += density(lambda * r, lambda * Z) * 2 * Math.PI * (lambda * r) * lambda * Z * (R / n) * dLambda;
      }
    }
    // inside the mesh the same field is linear, hence exact: the rest of u' K u is the ground beyond
    const u = Float64Array.from(places, ({ r, z, down }) => boundary(r, z)[down ? 1 : 0]);
    const trace = 2 / 10 + 1 / 7;
    const insideEnergy = (lame * trace ** 2 + 2 * shear * (2 / 100 + 1 / 49)) * Math.PI * R * R * Z;
    expect(Math.abs((apply(u).energy - insideEnergy) / energy - 1)).toBeLessThan(2e-3);
  });
});
