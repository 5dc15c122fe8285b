import { describe, expect, it } from "vitest";
import { buildMesh } from "../../src/engine/piles/pile-mesh.js";
import { solvePile } from "../../src/engine/piles/pile-solution.js";
import { graded, refined } from "../engine/piles/graded-lines.js";

// Source: Boussinesq's half-space as given by Poulos & Davis (1974), Elastic Solutions for Soil and Rock Mechanics (from
// memory), checked by arithmetic: P = 1,000 kN on a disc of radius 0.5 m, E = 10 MPa, nu = 0.5. Rigid: w = P (1 - nu) / (4 G r)
// = 75.000 mm. Even pressure q on diameter D: centre q D (1 - nu^2) / E = 95.493 mm, edge 2 / pi of that = 60.793 mm.
const radius = 0.5;
const young = 10e3;
const load = 1000;
const rigid = 0.075;
const centre = 0.095493;
const edge = 0.060793;

/** A mesh about a disc of the radius: steps `first` at the edge, growing by `ratio` outwards and downwards. */
function discMesh(first: number, ratio: number, poisson: number, thickness: number, cuts = 1) {
  const inner = graded(radius, 0, first, ratio).reverse();
  const outer = graded(radius, 60 * radius, first, ratio);
  const down = graded(thickness, 60 * radius, first, ratio);
  const columns = Float64Array.from(refined([...inner.slice(0, -1), ...outer], cuts));
  const rows = Float64Array.from(refined(thickness > 0 ? [0, ...down] : down, cuts));
  return buildMesh({ columns, rows, pileColumns: columns.indexOf(radius), pileRows: thickness > 0 ? cuts : 0, poisson });
}

const even = (mesh: ReturnType<typeof discMesh>) => new Float64Array(mesh.rings.length * (mesh.levelBounds.length - 1)).fill(young);

describe("even pressure on a disc", () => {
  // The formula is for nu = 0.5, which the elements exclude; 1 - nu^2 carries it to any other ratio.
  const poisson = 0.3;
  const scale = (1 - poisson ** 2) / (1 - 0.5 ** 2);
  const settlements = (mesh: ReturnType<typeof discMesh>) => {
    const { displacements, compliance } = solvePile(mesh, even(mesh), 1);
    // the downward unknown of node s of the surface row stands at 2 s
    return { centre: load * displacements[0], edge: load * displacements[4 * mesh.pileColumns], mean: load * compliance };
  };

  it("gives the centre and the edge", () => {
    const found = settlements(discMesh(0.04, 1.4, poisson, 0));
    expect(Math.abs(found.centre / (centre * scale) - 1)).toBeLessThan(0.001);
    expect(Math.abs(found.edge / (edge * scale) - 1)).toBeLessThan(0.003); // the slope is infinite there
  });

  // Mean over the disc, 16 q D (1 - nu^2) / (3 pi^2 E) x pi / 2: 8 / (3 pi) of the centre's (from memory; it is the energy of the same solution).
  it("gives the mean, ever better with smaller elements", () => {
    const exact = (8 / (3 * Math.PI)) * centre * scale;
    const errors = [1, 2, 4].map((cuts) => Math.abs(settlements(discMesh(0.4, 2, poisson, 0, cuts)).mean / exact - 1));
    // the field is as rough as the square root of the distance to the load's edge: the energy's error falls as the square of the size
    const rates = errors.slice(1).map((error, i) => Math.log2(errors[i] / error));
    expect(errors[2]).toBeLessThan(4e-4);
    for (const rate of rates) expect(rate).toBeGreaterThan(1.8);
  });
});

describe("a rigid disc, as a very short pile", () => {
  /** Settlement over that of the smooth disc. The plate is 2.5 mm thick, sunk into the ground: its side makes it 0.2 % stiffer. */
  const ratio = (poisson: number) => {
    const mesh = discMesh(0.005, 1.5, poisson, 0.0025);
    return (load * solvePile(mesh, even(mesh), 1e14).compliance) / ((rigid * (1 - poisson ** 2)) / (1 - 0.5 ** 2));
  };
  it("settles 75 mm in ground of constant volume, where rough and smooth are the same", () => expect(Math.abs(ratio(0.499) - 1)).toBeLessThan(0.006));

  // Source: rough rigid disc, P = 4 G r w ln(3 - 4 nu) / (1 - 2 nu), Mossakovskii (1954), Spence (1968) (from memory).
  it("settles less where it is rough and the ground compressible", () => {
    const poisson = 0.3;
    const rough = (1 - 2 * poisson) / ((1 - poisson) * Math.log(3 - 4 * poisson));
    expect(rough).toBeLessThan(0.98);
    expect(Math.abs(ratio(poisson) / rough - 1)).toBeLessThan(0.008);
  });
});
