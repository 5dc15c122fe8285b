import { kilopascals, metres, type Metres } from "../../units/quantities.js";
import { groundProfile, type GroundProfile } from "../decision/ground-profile.js";
import { cellValues } from "../decision/cell-tables.js";
import { levelGrid } from "../decision/level-grid.js";
import type { Problem } from "../decision/problem.js";
import { exponential } from "../numerics/exponential.js";
import { lagrangeWeights } from "../numerics/lagrange.js";
import { separableTerms, type SeparableTerm } from "../ground/separable-terms.js";
import { logarithm } from "../numerics/logarithm.js";
import { pileMesh } from "../piles/pile-stiffness.js";
import type { PileGeometry } from "../piles/pile-response.js";
import { elementLnStiffness } from "./element-stiffness.js";
import { lengthForm, type LengthForm } from "./length-form.js";
import { addRowProducts } from "./ordered-rows.js";

/** Lengths at which the form is made, in even steps of the logarithm. */
const lengthCount = 16;
/** Every so many of these, finite elements are solved. */
const elementStep = 3;

/** The piles of one site at all lengths, in the ground's own medians. */
export interface GroundUnderPiles {
  readonly terms: readonly SeparableTerm[];
  readonly profile: GroundProfile;
  readonly rings: Float64Array;
  readonly levelBounds: Float64Array;
  /** standard deviation of the log modulus in each cell of depth */
  readonly cellSd: Float64Array;
  /** from the shortest to at least the longest length, even in the logarithm */
  readonly logLengths: Float64Array;
  readonly forms: readonly LengthForm[];
  readonly pileModulus: number;
}

/** Analyses the piles of a problem. */
export function groundUnderPiles({ ground, piles }: Problem): GroundUnderPiles {
  const profile = groundProfile(ground);
  const terms = separableTerms(ground);
  // Interpolation needs a range of lengths even where only one length is allowed.
  const range = logarithm(Math.max(piles.longest / piles.shortest, 1.5));
  const logLengths = Float64Array.from({ length: lengthCount }, (_, k) => logarithm(piles.shortest) + (range * k) / (lengthCount - 1));
  const geometry = (length: number): PileGeometry => ({
    diameter: piles.diameter, pileModulus: piles.modulus, poissonRatio: ground.poissonRatio, length: metres(length),
  });
  const deepest = pileMesh(geometry(exponential(logLengths[lengthCount - 1])));
  const levelBounds = levelGrid(deepest.levelBounds[deepest.levelBounds.length - 1]);
  const { groundVariance, regionalVariance, relativeSd, modulus, shape } = profile;
  const about = { terms, median: (depth: Metres) => kilopascals(modulus * shape(depth)), relativeSd, groundVariance, regionalVariance };
  return {
    terms,
    profile,
    rings: deepest.rings,
    levelBounds,
    cellSd: cellValues(levelBounds, (depth) => Math.sqrt(groundVariance) * relativeSd(depth)),
    logLengths,
    forms: Array.from(logLengths, (ln) => lengthForm(geometry(exponential(ln)), about, levelBounds)),
    pileModulus: piles.modulus,
  };
}

/** Turns a field of unit variance (piles x rings x cells) into the log modulus about its median, in place. */
export function scaleField(ground: GroundUnderPiles, field: Float64Array): void {
  const { cellSd } = ground;
  for (let c = 0; c < field.length; ) for (let k = 0; k < cellSd.length; k++, c++) field[c] *= cellSd[k];
}

/**
 * ln head stiffness of every pile at every length by the second-order form.
 *
 * @param field  ground's own log modulus about the median, piles x rings x cells
 * @param level  of the site: log modulus
 * @param out    receives piles x lengths
 */
export function formStiffness(ground: GroundUnderPiles, field: Float64Array, level: number, out: Float64Array): void {
  const lengths = ground.logLengths.length;
  const cells = ground.rings.length * ground.cellSd.length;
  const piles = out.length / lengths;
  const felt = new Float64Array(piles * cells);
  const width = 1 + ground.forms[0].values.length;
  const seen = new Float64Array(width * piles);
  ground.forms.forEach((form, k) => {
    const n = form.felt.length;
    for (let i = 0; i < piles; i++) for (let c = 0; c < n; c++) felt[i * n + c] = field[i * cells + form.felt[c]];
    seen.fill(0);
    addRowProducts(form.functionals, felt, piles, n, 1, seen);
    for (let i = 0; i < piles; i++) {
      let ln = form.lnStiffness + form.slope * seen[i] + form.weightSum * level + form.rest;
      for (let r = 1; r < width; r++) ln += form.values[r - 1] * (seen[r * piles + i] + form.sums[r] * level) ** 2;
      out[i * lengths + k] = ln;
    }
  });
}

/**
 * The same by finite elements. They are solved at every third length; in between, what they differ from the form is interpolated:
 * the form follows how the tip passes soft and stiff ground, which cubics through solved lengths miss by more than the form errs.
 *
 * @param form  of `formStiffness` in the same ground
 */
export function elementStiffness(ground: GroundUnderPiles, field: Float64Array, level: number, form: Float64Array, out: Float64Array): void {
  const { logLengths, forms, rings, cellSd, levelBounds, pileModulus } = ground;
  const lengths = logLengths.length;
  const cells = rings.length * cellSd.length;
  const { solved, between } = elementLengths(logLengths);
  const differences = new Float64Array(solved.length);
  for (let i = 0; i < out.length / lengths; i++) {
    const own = field.slice(i * cells, (i + 1) * cells);
    for (let c = 0; c < cells; c++) own[c] += level;
    solved.forEach((k, s) => (differences[s] = elementLnStiffness(forms[k], pileModulus, own, levelBounds) - form[i * lengths + k]));
    for (let k = 0; k < lengths; k++) {
      const { start, weights } = between[k];
      let difference = 0;
      for (let q = 0; q < 4; q++) difference += weights[q] * differences[start + q];
      out[i * lengths + k] = form[i * lengths + k] + difference;
    }
  }
}

/** Number of finite-element solutions that one realisation of a pile takes. */
export const solvesPerPile = Math.ceil(lengthCount / elementStep);

function elementLengths(logLengths: Float64Array): { solved: number[]; between: ReturnType<typeof lagrangeWeights>[] } {
  const solved = Array.from(logLengths, (_, k) => k).filter((k) => k % elementStep === 0);
  const grid = solved.map((k) => logLengths[k]);
  return { solved, between: Array.from(logLengths, (ln) => lagrangeWeights(grid, ln)) };
}
