import { damageShare } from "../../../src/engine/costs/damage.js";
import { outerNodes, lnDesignValues } from "../../../src/engine/decision/design-law.js";
import { designLengths } from "../../../src/engine/decision/design-lengths.js";
import { holeCovariance } from "../../../src/engine/decision/hole-covariance.js";
import { distortionDraws } from "../../../src/engine/decision/node-draws.js";
import { nodeMoments, type NodeMoments } from "../../../src/engine/decision/node-moments.js";
import type { Plan } from "../../../src/engine/decision/plan.js";
import { preparedSite } from "../../../src/engine/decision/prepared-site.js";
import { quadraticWidth } from "../../../src/engine/decision/second-order-terms.js";
import { standardDraws } from "../../../src/engine/decision/standard-draws.js";
import type { Kernels } from "../../../src/engine/numerics/kernels.js";
import { scalarKernels } from "../../../src/engine/numerics/scalar-kernels.js";
import { vectorKernels } from "../../../src/engine/numerics/vector-kernels.js";
import type { Problem } from "../../../src/engine/index.js";
import type { BenchCase } from "../bench-case.js";
import { demonstrationProblem } from "./demonstration.js";

const COUNT = 5;
const NEAR = 5; // a pile and at most four neighbours

interface State {
  readonly problem: Problem;
  readonly plan: Plan;
  readonly moments: readonly NodeMoments[];
  readonly weights: Float64Array;
  readonly draws: Float64Array;
  readonly block: number;
}

function setup(): State {
  const problem = demonstrationProblem();
  const site = preparedSite(problem);
  const { plan } = site.model;
  const law = site.design(COUNT);
  const holes = holeCovariance(site.model, site.layout(COUNT), law);
  const { normals, weights, drawsPerNode } = outerNodes(law, problem.seed);
  const moments = Array.from(weights, (_, node) => {
    const here = normals.subarray(node * law.size, (node + 1) * law.size);
    return nodeMoments(site.model, holes, here, designLengths(problem, plan, lnDesignValues(law, here), law.ofPile, "mean").lengths, 0);
  });
  return { problem, plan, moments, weights, draws: standardDraws(plan.piles.length, drawsPerNode, problem.seed), block: drawsPerNode };
}

const joined = (arrays: readonly Float64Array[]): Float64Array => Float64Array.from(arrays.flatMap((array) => [...array]));

/** The quadratic's coefficients as full 5 x 5 lower triangles, with zeros where a pile has fewer neighbours. */
function spreadOut({ plan, moments }: State): { linear: Float64Array; triangle: Float64Array; constant: Float64Array; near: Float64Array } {
  const n = plan.piles.length;
  const linear = new Float64Array(moments.length * n * NEAR);
  const triangle = new Float64Array(moments.length * n * NEAR * NEAR);
  const constant = new Float64Array(moments.length * n);
  moments.forEach(({ quadratic }, node) => {
    for (let i = 0; i < n; i++) {
      const pile = node * n + i;
      constant[pile] = quadratic[i * quadraticWidth];
      let next = i * quadraticWidth + 1 + NEAR;
      for (let a = 0; a < plan.nearby[i].length; a++) {
        linear[pile * NEAR + a] = quadratic[i * quadraticWidth + 1 + a];
        for (let e = 0; e <= a; e++) triangle[(pile * NEAR + a) * NEAR + e] = quadratic[next++];
      }
    }
  });
  const near = Float64Array.from({ length: n * NEAR }, (_, at) => plan.nearby[Math.floor(at / NEAR)][at % NEAR] ?? 0);
  return { linear, triangle, constant, near };
}

/** What most of a count's time goes into: the piles' joint ground drawn, settled, and priced. */
const drawn = (name: string, using: Kernels): BenchCase<State, number> => ({
  name: `draws of one count, ${name}`,
  size: "12 piles, 32 nodes of 128 draws: factor, second-order term, settlement, distortion, damage",
  rounds: 41,
  target: { ratio: 1.5 },
  setup,
  run: ({ problem, plan, moments, weights, draws: values, block }) => {
    const { damage, value } = problem.building;
    const { distortion, draw } = distortionDraws(plan, block, using);
    const width = 2 * plan.piles.length * block;
    let failure = 0;
    for (let node = 0; node < moments.length; node++) {
      draw(moments[node], values.subarray(node * width, (node + 1) * width), undefined);
      let sum = 0;
      for (let m = 0; m < block; m++) sum += damageShare(damage, distortion[m]);
      failure += (weights[node] * sum * value) / block;
    }
    return failure;
  },
  check: (failure, { problem }) => {
    if (!(failure > 0 && failure < problem.building.value)) throw new Error(`A failure cost of ${failure} is none.`);
  },
  peer: {
    name: "draws",
    input: (state) => {
      const { problem, plan, moments, weights, draws: values, block } = state;
      return {
        ...spreadOut(state),
        means: joined(moments.map(({ means }) => means)),
        factor: joined(moments.map(({ factor }) => factor)),
        residual: joined(moments.map(({ residual }) => residual)),
        normals: values,
        weights,
        loads: Float64Array.from(plan.piles, ({ load }) => load),
        pairs: Float64Array.from(plan.pairs.flatMap(({ first, second, distance }) => [first, second, distance])),
        damage: Float64Array.from(problem.building.damage.flatMap(({ distortion, share }) => [distortion, share])),
        value: problem.building.value,
        piles: plan.piles.length,
        block,
      };
    },
    agree: (ours, [theirs]) => {
      if (!(Math.abs(ours / theirs - 1) < 1e-12)) throw new Error(`numpy prices failure at ${theirs}, we at ${ours}.`);
    },
  },
});

const vector = vectorKernels();

/** In both kinds of kernels, where both are. */
export const draws = [...(vector === undefined ? [] : [drawn("WebAssembly", vector)]), drawn("JavaScript", scalarKernels())];
