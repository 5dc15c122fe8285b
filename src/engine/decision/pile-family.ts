import { metres, kilopascals, type Kilopascals, type Metres } from "../../units/quantities.js";
import { exponential } from "../numerics/exponential.js";
import { geometricStep } from "../numerics/geometric-step.js";
import { logarithm } from "../numerics/logarithm.js";
import { pileResponse } from "../piles/pile-stiffness.js";
import { projectLevels } from "../piles/project-levels.js";
import type { PileGeometry, PileResponse } from "../piles/pile-response.js";
import { levelGrid } from "./level-grid.js";

/** Lengths at which piles are analysed; between them four-point interpolation in ln length. */
const lengthCount = 8;
/** Of those, the lengths at which the second-order form is made: it is dear, and changes slowly with length. */
const formIndices = [0, 2, 5, 7] as const;
/** Ratio of the ground moduli of two neighbouring nodes. */
const nodeRatio = 2;

/** What the finite elements of a family depend on, apart from how stiff the ground is as a whole. */
export interface FamilyKey {
  readonly diameter: Metres;
  readonly pileModulus: Kilopascals;
  readonly poissonRatio: number;
  readonly shortest: Metres;
  readonly longest: Metres;
  /** median modulus over the reference modulus, by depth in m; 1 everywhere in uniform ground */
  readonly shape: (depth: number) => number;
}

/** All lengths of one pile type in ground of one stiffness. */
export interface FamilyNode {
  /** reference modulus, kPa */
  readonly modulus: number;
  readonly responses: readonly PileResponse[];
  /** energy shares on the common depth grid, one array a length, rings x levels */
  readonly weights: readonly Float64Array[];
}

/** One pile type at all lengths, analysed at nodes of ground stiffness as they are asked for. */
export interface PileFamily {
  readonly lengths: Float64Array;
  readonly logLengths: Float64Array;
  readonly formIndices: readonly number[];
  readonly formLogLengths: Float64Array;
  readonly rings: Float64Array;
  readonly levelBounds: Float64Array;
  /** the pile at one of the lengths */
  geometry(index: number): PileGeometry;
  /** median modulus over the reference modulus at a depth in m */
  shape(depth: number): number;
  /** node number j stands at the pile modulus over nodeRatio^j */
  node(j: number): FamilyNode;
  /** the node below a reference modulus, and how far the modulus lies towards the next stiffer one in ln modulus, 0 to 1 */
  locate(modulus: number): { j: number; fraction: number };
}

/** Step of ln modulus between two nodes. */
export const nodeStep = logarithm(nodeRatio);

/** n lengths from the shortest to the longest, each the same factor above the one before, m. */
function geometricLengths(shortest: number, longest: number, n: number): Float64Array {
  return Float64Array.from({ length: n }, (_, i) => (i === n - 1 ? longest : geometricStep(shortest, longest, i / (n - 1))));
}

/**
 * The pile type of a problem as a family over length and ground stiffness.
 *
 * @param key  dimensions and profile shape; the longest length may equal the shortest
 */
export function pileFamily(key: FamilyKey): PileFamily {
  // Interpolation needs a range of lengths even where only one length is allowed.
  const longest = Math.max(key.longest, 1.5 * key.shortest);
  const lengths = geometricLengths(key.shortest, longest, lengthCount);
  const logLengths = lengths.map(logarithm);
  const geometry = (length: number): PileGeometry => ({
    diameter: key.diameter, pileModulus: key.pileModulus, poissonRatio: key.poissonRatio, length: metres(length),
  });
  const nodes = new Map<number, FamilyNode>();
  const analyse = (j: number): FamilyNode => {
    const modulus = key.pileModulus * exponential(-j * nodeStep);
    const responses = Array.from(lengths, (length, i) =>
      pileResponse(
        geometry(length),
        (depth) => kilopascals(modulus * key.shape(depth)),
        { withForm: formIndices.some((index) => index === i) },
      ),
    );
    return { modulus, responses, weights: responses.map((r) => projectLevels(r.weights, r.rings.length, r.levelBounds, levelBounds)) };
  };
  const probe = pileResponse(
    geometry(longest),
    (depth) => kilopascals((key.pileModulus / 1000) * key.shape(depth)),
    { withForm: false },
  );
  const levelBounds = levelGrid(probe.levelBounds[probe.levelBounds.length - 1]);
  return {
    lengths,
    logLengths,
    formIndices,
    formLogLengths: Float64Array.from(formIndices, (i) => logLengths[i]),
    rings: probe.rings,
    levelBounds,
    geometry: (index) => geometry(lengths[index]),
    shape: key.shape,
    node(j) {
      let node = nodes.get(j);
      if (node === undefined) nodes.set(j, (node = analyse(j)));
      return node;
    },
    locate(modulus) {
      const x = logarithm(key.pileModulus / modulus) / nodeStep;
      // Nodes are numbered towards softer ground: the softer node of the pair is the one above x.
      const j = Math.floor(x) + 1;
      return { j, fraction: j - x };
    },
  };
}
