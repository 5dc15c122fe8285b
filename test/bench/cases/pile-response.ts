import type { GroupedForm } from "../../../src/engine/piles/grouped-form.js";
import { ELEMENT_UNKNOWNS, PACKED } from "../../../src/engine/piles/pile-elements.js";
import { isPile, type PileMesh } from "../../../src/engine/piles/pile-mesh.js";
import { halfForces, headCompliance, solvePile } from "../../../src/engine/piles/pile-solution.js";
import { medianModuli, pileMesh, pileResponse } from "../../../src/engine/piles/pile-stiffness.js";
import type { PileGeometry } from "../../../src/engine/piles/pile-response.js";
import { kilopascals, metres } from "../../../src/units/quantities.js";
import type { BenchCase } from "../bench-case.js";

const geometry = (length: number): PileGeometry => ({ diameter: metres(0.5), length: metres(length), pileModulus: kilopascals(3e7), poissonRatio: 0.3 });
const modulus = kilopascals(6000);

interface Form {
  readonly mesh: PileMesh;
  readonly form: GroupedForm;
  /** half bandwidth, and the band row by row, as the peer wants them */
  readonly half: number;
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
  const half = mesh.elementUnknowns.reduce((most, p, at) => Math.max(most, p - leastOf(mesh, Math.floor(at / ELEMENT_UNKNOWNS))), 0);
  const band = new Float64Array(mesh.unknowns * (half + 1));
  const forces = new Float64Array(mesh.unknowns * count);
  const local = new Float64Array(ELEMENT_UNKNOWNS);
  for (let c = 0; c < mesh.rings.length; c++) {
    for (let level = 0; level < 2 * rows; level++) {
      const element = c * rows + (level >> 1);
      const stiffness = level % 2 === 0 ? mesh.upper : mesh.lower;
      const pile = isPile(mesh, c, level >> 1);
      const own = mesh.elementUnknowns.subarray(element * ELEMENT_UNKNOWNS, (element + 1) * ELEMENT_UNKNOWNS);
      for (let i = 0, k = element * PACKED; i < ELEMENT_UNKNOWNS; i++) {
        for (let j = 0; j <= i; j++, k++) if (own[i] >= 0 && own[j] >= 0) band[own[i] * half + half + own[j]] += (pile ? 3e7 : modulus) * stiffness[k];
      }
      if (pile) continue;
      halfForces(mesh, element, stiffness, displacements, local);
      const group = form.ringGroups[c] * bands + form.levelGroups[level];
      for (let i = 0; i < ELEMENT_UNKNOWNS; i++) {
        const p = mesh.elementUnknowns[element * ELEMENT_UNKNOWNS + i];
        if (p >= 0) forces[p * count + group] += modulus * local[i];
      }
    }
  }
  return { mesh, form, half, band, forces };
}

/** The least unknown of an element. */
function leastOf({ elementUnknowns, unknowns }: PileMesh, element: number): number {
  return elementUnknowns.subarray(element * ELEMENT_UNKNOWNS, (element + 1) * ELEMENT_UNKNOWNS).reduce((low, p) => (p >= 0 && p < low ? p : low), unknowns);
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
    input: ({ mesh, form, half, band, forces }) => ({ band, n: mesh.unknowns, half, load: mesh.headLoad, forces, shares: form.weights }),
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

/** The head's stiffness alone, as a realisation asks for it. */
export const pileSolve: BenchCase<{ mesh: PileMesh; moduli: Float64Array; compliance: number }, number> = {
  name: "one pile in realised ground",
  size: "1405 unknowns, half band 67, assembled, factored, head stiffness",
  rounds: 101,
  target: { milliseconds: 4 },
  setup: () => {
    const mesh = pileMesh(geometry(10));
    const moduli = medianModuli(mesh, () => modulus).map((e, i) => e * Math.exp(0.5 * Math.sin(i)));
    return { mesh, moduli, compliance: solvePile(mesh, moduli, 3e7).compliance };
  },
  run: ({ mesh, moduli }) => headCompliance(mesh, moduli, 3e7),
  check: (compliance, state) => {
    if (!(Math.abs(compliance / state.compliance - 1) < 1e-12)) throw new Error(`The head settles by ${compliance}, not ${state.compliance}.`);
  },
};
