import { assess, estimate, prepareSimulation, simulateElements, simulateForm, type Problem } from "../../src/engine/index.js";
import { arcCosine, arcSine } from "../../src/engine/numerics/arc-sine.js";
import { exponential } from "../../src/engine/numerics/exponential.js";
import { exponentialLessOne } from "../../src/engine/numerics/exponential-less-one.js";
import { geometricStep } from "../../src/engine/numerics/geometric-step.js";
import { hyperbolicCosine, hyperbolicSine, hyperbolicTangent, inverseHyperbolicSine } from "../../src/engine/numerics/hyperbolic.js";
import { hypotenuse } from "../../src/engine/numerics/hypotenuse.js";
import { logarithm, logarithmOfOnePlus } from "../../src/engine/numerics/logarithm.js";
import { normalDistribution, normalQuantile } from "../../src/engine/numerics/normal.js";
import { sine } from "../../src/engine/numerics/sine.js";
import { stream } from "../../src/engine/random/stream.js";
import { normalSource } from "../../src/engine/simulation/normal-source.js";
import { metres } from "../../src/units/quantities.js";
import { ninePiles } from "../engine/decision/example-problem.js";

/** What an engine of JavaScript makes of the same work. */
export interface Digits {
  /** numbers by what they are of */
  readonly ours: Readonly<Record<string, readonly number[]>>;
  /** the same of the language's own functions, whose digits are the engine's choice */
  readonly its: Readonly<Record<string, readonly number[]>>;
}

const OURS = {
  exponential, exponentialLessOne, logarithm, logarithmOfOnePlus, sine, hyperbolicTangent, hyperbolicSine, hyperbolicCosine, inverseHyperbolicSine,
  arcSine: (x: number) => arcSine(x / 10), arcCosine: (x: number) => arcCosine(x / 10), hypotenuse: (x: number) => hypotenuse(x, 1.3),
  geometricStep: (x: number) => geometricStep(0.7, x, 0.3), square: (x: number) => x ** 2, root: Math.sqrt,
  normalDistribution: (x: number) => normalDistribution(x - 7), normalQuantile: (x: number) => normalQuantile(x / 10),
};
const ITS = { exp: Math.exp, log: Math.log, sin: Math.sin, tanh: Math.tanh, hypot: (x: number) => Math.hypot(x, 1.3), cube: (x: number) => x ** 3 };

/** Numbers between 0 and 10, the same everywhere: a multiplicative congruential generator whose products stay whole. */
function numbers(count: number): number[] {
  let state = 1;
  return Array.from({ length: count }, () => (state = (state * 16807) % 2147483647) / 214748364.7);
}

const applied = (functions: Readonly<Record<string, (x: number) => number>>, count: number): Record<string, number[]> =>
  Object.fromEntries(Object.entries(functions).map(([name, of]) => [name, numbers(count).map(of)]));

/**
 * Does the work.
 *
 * @param count  arguments of each function
 * @param thorough  whether ground is realised and more sites are priced; too slow where code is not compiled
 */
export function engineDigits(count: number, thorough: boolean): Digits {
  const random = stream("digits", 1);
  const normals = Float64Array.from({ length: 4000 }, (_, k) => (k < 200 ? random.normal() : 0));
  normalSource(random).fill(normals, 200, normals.length);
  const costs = (problem: Problem, holes: number): number[] => numbersOf(assess(problem, holes));
  const ours = { ...applied(OURS, count), normals: [...normals], cells: costs(twoPiles(), 1) };
  return { ours: thorough ? { ...ours, ...longWork(costs) } : ours, its: applied(ITS, count) };
}

function longWork(costs: (problem: Problem, holes: number) => number[]): Digits["ours"] {
  const sites = [twoPiles(), ninePiles({ correlation: "gaussian", rule: "quartile", lengthRule: "nearest" }), ninePiles({ correlation: "ellipsoidal", regionalCov: 0.3, update: true })];
  const task = { variants: [{ name: "", problem: twoPiles() }], counts: [0, 1], seed: "digits" };
  const simulation = prepareSimulation(task);
  // copies, because the rows stand in the simulation's own room
  const elements = Array.from({ length: 10 }, (_, k) => simulateElements(simulation, k).slice());
  const form = Array.from({ length: 200 }, (_, k) => simulateForm(simulation, k).slice());
  return {
    sites: sites.flatMap((problem) => [0, 1, 4].flatMap((holes) => costs(problem, holes))),
    elements: elements.flatMap((row) => [...row]),
    form: form.flatMap((row) => [...row]),
    table: estimate(task, elements, form).rows.flatMap(numbersOf),
  };
}

const numbersOf = (row: object): number[] => Object.values(row).filter((value) => typeof value === "number");

/** Two short piles that settle each other, a regional update and surprises: little work, but all of it. */
function twoPiles(): Problem {
  const problem = ninePiles({ foundShare: 0.5, regionalCov: 0.3, update: true, groupInteraction: true });
  return {
    ...problem,
    building: { ...problem.building, piles: problem.building.piles.slice(0, 2) },
    piles: { ...problem.piles, longest: metres(5) },
    investigation: { ...problem.investigation, readingSpacing: metres(2) },
  };
}
