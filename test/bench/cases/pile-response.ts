import { energyShares } from "../../../src/engine/piles/energy-shares.js";
import type { GroupedForm } from "../../../src/engine/piles/grouped-form.js";
import { ELEMENT_UNKNOWNS, PACKED } from "../../../src/engine/piles/pile-elements.js";
import { isPile, type PileMesh } from "../../../src/engine/piles/pile-mesh.js";
import { halfForces, solvePile } from "../../../src/engine/piles/pile-solution.js";
import { medianModuli, pileMesh, pileResponse } from "../../../src/engine/piles/pile-stiffness.js";
import type { PileGeometry } from "../../../src/engine/piles/pile-response.js";
import { kilopascals, metres } from "../../../src/units/quantities.js";
import type { BenchCase } from "../bench-case.js";

const geometry = (length: number): PileGeometry => ({ diameter: metres(0.5), length: metres(length), pileModulus: kilopascals(3e7), poissonRatio: 0.3 });
const modulus = kilopascals(6000);

interface Form {
  readonly mesh: PileMesh;
  readonly form: GroupedForm;
  readonly band: Float64Array;
  readonly forces: Float64Array;
}

/** The assembled system and the forces of the form's cells, made here from the elements for the peer to solve. */
function setup(): Form {
  const mesh = pileMesh(geometry(10));
  const form = pileResponse(geometry(10), () => modulus).form!;
  const moduli = medianModuli(mesh, () => modulus);
  const { displacements } = solvePile(mesh, moduli, 3e7);
  const rows = mesh.rows.length - 1;
  const bands = form.levelBounds.length - 1;
  const count = form.radii.length * bands;
  const band = new Float64Array(mesh.unknowns * (mesh.halfBandwidth + 1));
  const forces = new Float64Array(mesh.unknowns * count);
  const local = new Float64Array(ELEMENT_UNKNOWNS);
  for (let c = 0; c < mesh.rings.length; c++) {
    for (let level = 0; level < 2 * rows; level++) {
      const element = c * rows + (level >> 1);
      const half = level % 2 === 0 ? mesh.upper : mesh.lower;
      const pile = isPile(mesh, c, level >> 1);
      for (let k = element * PACKED; k < (element + 1) * PACKED; k++) if (mesh.places[k] >= 0) band[mesh.places[k]] += (pile ? 3e7 : modulus) * half[k];
      if (pile) continue;
      halfForces(mesh, element, half, displacements, local);
      const group = form.ringGroups[c] * bands + form.levelGroups[level];
      for (let i = 0; i < ELEMENT_UNKNOWNS; i++) {
        const p = mesh.elementUnknowns[element * ELEMENT_UNKNOWNS + i];
        if (p >= 0) forces[p * count + group] += modulus * local[i];
      }
    }
  }
  return { mesh, form, band, forces };
}

/** One pile with its energy shares and its second-order form; the peer is handed the assembled system and the forces. */
export const pileForm: BenchCase<Form, GroupedForm> = {
  name: "pile response with second-order form",
  size: "1405 unknowns, half band 67, 72 cells",
  rounds: 25,
  target: { milliseconds: 30, ratio: 1.6 },
  setup,
  // another modulus of pile and ground each round, by one factor: the form is the same, and nothing remembered answers
  run: (_, round) => pileResponse({ ...geometry(10), pileModulus: kilopascals(3e7 * (round + 10)) }, () => kilopascals(modulus * (round + 10))).form!,
  check: (answer, { form }) => {
    const worst = answer.matrix.reduce((most, value, i) => Math.max(most, Math.abs(value - form.matrix[i])), 0);
    if (!(worst < 1e-9)) throw new Error(`The form differs by ${worst} from that of the same ratio of moduli.`);
  },
  peer: {
    name: "pile_form",
    input: ({ mesh, form, band, forces }) => ({ band, n: mesh.unknowns, half: mesh.halfBandwidth, load: mesh.headLoad, forces, shares: form.weights }),
    agree: (ours, theirs) => {
      const worst = ours.matrix.reduce((most, value, i) => Math.max(most, Math.abs(value - theirs[i])), 0);
      if (!(worst < 1e-9)) throw new Error(`numpy's form differs by ${worst}.`);
    },
  },
};

const LENGTHS = [3, 4.06, 5.5, 7.45, 10.08, 13.65, 18.47, 25];

/** All that a new pile type asks of the elements: eight lengths in ground of three moduli, the form at each length once. */
export const pileFamilyCase: BenchCase<null, Float64Array> = {
  name: "elements of a new pile type",
  size: "8 lengths x 3 ground moduli, 8 forms",
  rounds: 9,
  target: { milliseconds: 350 }, // the rest of the 600 ms of a first call is for tables of the ground
  setup: () => null,
  run: (_, round) => {
    const diameter = metres(0.5 + 1e-4 * (round + 10)); // a mesh of its own each round
    return Float64Array.from(LENGTHS.flatMap((length) => [3000, 6000, 12000].map((soil) => pileResponse({ ...geometry(length), diameter }, () => kilopascals(soil), { withForm: soil === 6000 }).lnStiffness)));
  },
  check: (answer) => {
    const rises = answer.every((value, i) => Number.isFinite(value) && (i % 3 === 0 || value > answer[i - 1]));
    if (!rises) throw new Error("Stiffness does not rise with the ground's.");
  },
};

/** Energy shares alone, as a slope or a weight in realised ground asks for them. */
export const pileSolve: BenchCase<{ mesh: PileMesh; moduli: Float64Array; band: Float64Array }, number> = {
  name: "one pile in realised ground",
  size: "1405 unknowns, half band 67, assembled and solved, 432 shares",
  rounds: 40,
  target: { milliseconds: 4 },
  setup: () => {
    const mesh = pileMesh(geometry(10));
    return { mesh, moduli: medianModuli(mesh, () => modulus).map((e, i) => e * Math.exp(0.5 * Math.sin(i))), band: new Float64Array(mesh.unknowns * (mesh.halfBandwidth + 1)) };
  },
  run: ({ mesh, moduli, band }) => energyShares(mesh, moduli, solvePile(mesh, moduli, 3e7, band)).reduce((sum, w) => sum + w, 0),
  check: (sum) => {
    if (!(sum > 0.9 && sum < 1)) throw new Error(`The shares of the ground sum to ${sum}.`);
  },
};
