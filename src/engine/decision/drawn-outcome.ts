import { logarithm } from "../numerics/logarithm.js";
import { normalDistribution } from "../numerics/normal.js";
import { gaussLegendre } from "../numerics/gauss-legendre.js";
import { lnDesignValues, outerNodes, type DesignLaw } from "./design-law.js";
import { interactionOf, type Interaction } from "./group-interaction.js";
import type { HoleCovariance } from "./hole-covariance.js";
import { nodeMoments } from "./node-moments.js";
import { lengthenedPlaces, type LengthenedPlace } from "./lengthened-place.js";
import { chanceTooSoft, expectedLnStiffness, lengthLaws, placeOfLength, trialLength, type LengthLaws, type TrialLength } from "./needed-length.js";
import { distortionDraws, type FoundSurprises } from "./node-draws.js";
import { designLengths, softestAllowable } from "./design-lengths.js";
import type { Plan } from "./plan.js";
import type { Problem } from "./problem.js";
import { standardDraws } from "./standard-draws.js";
import type { SiteModel } from "./site-model.js";

/** What happens to the piles of one count, before any price is put to it: by node of the design value, and by draw of the ground in it. */
export interface DrawnOutcome {
  /** one a node, summing to 1 */
  readonly weights: Float64Array;
  readonly drawsPerNode: number;
  /** the nodes are a sample of the design values themselves, whose scatter is an error too */
  readonly isSampled: boolean;
  /** one a node: metres of all piles, expected surprises, metres by which they would be lengthened */
  readonly metres: Float64Array;
  readonly surprises: Float64Array;
  readonly extensions: Float64Array;
  /** nodes x draws: largest angular distortion with no surprise found */
  readonly distortion: Float64Array;
  /** nodes x draws: the same with all surprises found and lengthened, and how many they are; empty where none is looked for */
  readonly foundDistortion: Float64Array;
  readonly drawnSurprises: Float64Array;
  readonly tooShortChance: number;
}

/**
 * Outcome by conditioning on the design value: an outer rule over it, and inside it the piles' ground by quasi-random draws.
 *
 * @param problem  ground, piles, loads, tolerance; prices, building value, damage list and the share found are not read
 * @param model    ground under the piles
 * @param holes    what the design values say of it
 * @param law      of the design values
 */
export function drawnOutcome(problem: Problem, model: SiteModel, holes: HoleCovariance, law: DesignLaw): DrawnOutcome {
  const { plan } = model;
  const n = plan.piles.length;
  const nodes = outerNodes(law, problem.seed);
  const { drawsPerNode } = nodes;
  const count = nodes.weights.length;
  const finds = problem.delay.foundShare > 0;
  const draws = standardDraws(n, drawsPerNode, problem.seed);
  const width = 2 * n * drawsPerNode;
  const { distortion, foundDistortion, surprises: drawnSurprises, draw } = distortionDraws(plan, drawsPerNode);
  const needed = Float64Array.from(plan.piles, (p) => logarithm(p.load / problem.building.allowableSettlement));
  const laws = lengthLaws(model);
  const interaction = rememberedInteraction(problem, model, laws);
  const lengthened = finds && interaction !== undefined ? lengthenedPlaces(model, holes, laws, problem.piles.longest, needed) : undefined;
  const out = {
    metres: new Float64Array(count), surprises: new Float64Array(count), extensions: new Float64Array(count),
    distortion: new Float64Array(count * drawsPerNode),
    foundDistortion: new Float64Array(finds ? count * drawsPerNode : 0), drawnSurprises: new Float64Array(finds ? count * drawsPerNode : 0),
  };
  let tooShortSampled = 0;
  for (let node = 0; node < count; node++) {
    const normals = nodes.normals.subarray(node * law.size, (node + 1) * law.size);
    const { lengths, metres, allowable } = designLengths(problem, plan, lnDesignValues(law, normals), law.ofPile, "mean");
    const bend = law.bend === 0 ? 0 : (law.bend * normals[0]) / law.root[0];
    const moments = nodeMoments(model, holes, normals, lengths, bend);
    if (!allowable) tooShortSampled += nodes.weights[node];
    const { surprises, extension } = surprisesAt(problem, model, laws, lengths, (trial, i) => chanceTooSoft(trial, model.slopes.length, holes, i, normals), needed);
    out.metres[node] = metres;
    out.surprises[node] = surprises;
    out.extensions[node] = extension;
    draw(moments, draws.subarray(node * width, (node + 1) * width), finds ? foundSurprises(problem, lengths, laws, needed, lengthened?.(normals, lengths)) : undefined, interaction);
    out.distortion.set(distortion, node * drawsPerNode);
    if (!finds) continue;
    out.foundDistortion.set(foundDistortion, node * drawsPerNode);
    out.drawnSurprises.set(drawnSurprises, node * drawsPerNode);
  }
  return { ...out, weights: nodes.weights, drawsPerNode, isSampled: law.size > 1, tooShortChance: tooShort(problem, plan, law, Math.min(tooShortSampled, 1)) };
}

const interactions = new WeakMap<SiteModel, Interaction>();

/** Interaction on the laws' lengths; all counts of a site share one table. */
function rememberedInteraction(problem: Problem, model: SiteModel, laws: LengthLaws): Interaction | undefined {
  if (!problem.piles.groupInteraction) return undefined;
  let known = interactions.get(model);
  if (known === undefined) interactions.set(model, (known = interactionOf(problem, model.plan, laws.logLengths)));
  return known;
}

/** Chance that the longest length is not enough: in closed form for one design value, where few nodes would give it in steps. */
function tooShort(problem: Problem, plan: Plan, law: DesignLaw, sampled: number): number {
  if (law.size !== 1) return sampled;
  const limit = softestAllowable(problem, plan, law.mean);
  return Number.isFinite(limit) ? normalDistribution((limit - law.mean) / law.root[0]) : limit > 0 ? 1 : 0;
}

/** Expected number of surprises, and the metres by which they would be lengthened, at one set of design lengths. */
function surprisesAt(
  problem: Problem, model: SiteModel, laws: LengthLaws, lengths: Float64Array, tooSoft: (trial: TrialLength, pile: number) => number, needed: Float64Array,
): { surprises: number; extension: number } {
  const { longest } = problem.piles;
  const { surpriseTolerance, foundShare } = problem.delay;
  const { nodes, weights } = gaussLegendre(6);
  let surprises = 0;
  let extension = 0;
  const trials = new Map<number, { length: number; at: TrialLength[] }>();
  for (let i = 0; i < lengths.length; i++) {
    const from = lengths[i] + surpriseTolerance;
    // A pile at the longest length cannot be lengthened: nothing on site tells it from the others.
    if (from >= longest) continue;
    let trial = trials.get(needed[i]);
    if (trial === undefined || trial.length !== lengths[i]) {
      const steps = foundShare > 0 ? Array.from(nodes, (node) => from + (longest - from) * node) : [];
      trials.set(needed[i], (trial = { length: lengths[i], at: [from, ...steps].map((length) => trialLength(laws, model, length, needed[i])) }));
    }
    const chance = tooSoft(trial.at[0], i);
    surprises += chance;
    if (foundShare === 0 || chance < 1e-9) continue;
    extension += surpriseTolerance * chance;
    for (let q = 0; q < nodes.length; q++) extension += weights[q] * (longest - from) * tooSoft(trial.at[q + 1], i);
  }
  return { surprises, extension };
}

function foundSurprises(problem: Problem, lengths: Float64Array, laws: LengthLaws, needed: Float64Array, builtPlace: LengthenedPlace | undefined): FoundSurprises {
  const n = lengths.length;
  const { longest } = problem.piles;
  const gain = (i: number, length: number): number => expectedLnStiffness(laws, length) - expectedLnStiffness(laws, lengths[i]);
  return {
    needed,
    toTolerance: Float64Array.from({ length: n }, (_, i) => {
      const trial = lengths[i] + problem.delay.surpriseTolerance;
      return trial < longest ? gain(i, trial) : Infinity;
    }),
    toLongest: Float64Array.from({ length: n }, (_, i) => gain(i, longest)),
    designPlace: (i) => placeOfLength(laws, lengths[i]),
    builtPlace: builtPlace ?? ((i) => placeOfLength(laws, lengths[i])),
  };
}
