import { assess, assessCounts, type Assessment, type CountRow, type Problem } from "../../../src/engine/index.js";
import { callFunction } from "../../../src/functions/registry.js";
import { vectorKernels } from "../../../src/engine/numerics/vector-kernels.js";
import { templateRows } from "../../../src/inputs/index.js";
import { metres } from "../../../src/units/quantities.js";
import type { BenchCase } from "../bench-case.js";
import { demonstrationProblem, revalued } from "./demonstration.js";

const COUNT = 5;
const TABLE = Array.from({ length: 21 }, (_, count) => count);

function warm(): Problem {
  const problem = demonstrationProblem();
  assessCounts(problem, TABLE);
  return problem;
}

/** The parts must make up the total, and a cost must be a cost. */
function sound({ investigation, foundation, failure, delay, total }: Assessment): void {
  if (!(failure > 0 && foundation > 0 && delay >= 0)) throw new Error("A cost is not a cost.");
  if (!(Math.abs(investigation + foundation + failure + delay - total) < 1e-6 * total)) throw new Error("The parts do not make up the total.");
}

/** Milliseconds promised for a count: less where WebAssembly is there. */
const ofCount = vectorKernels() === undefined ? 4 : 2;

/** One count of a site that is known: what a cell waits for when something changes that neither ground nor holes hang on. */
export const oneCount: BenchCase<Problem, Assessment> = {
  name: "one count, known site",
  size: `12 piles, ${COUNT} holes, 4,096 draws`,
  rounds: 101,
  target: { milliseconds: ofCount },
  setup: warm,
  run: (problem, round) => assess({ ...problem, delay: { ...problem.delay, surpriseTolerance: metres(problem.delay.surpriseTolerance + 1e-6 * (round + 10)) } }, COUNT),
  check: sound,
};

/** What a cell waits for when a price changes. */
export const otherPrice: BenchCase<Problem, Assessment> = {
  name: "one count, other prices",
  size: `12 piles, ${COUNT} holes, 4,096 draws`,
  rounds: 101,
  target: { milliseconds: ofCount },
  setup: warm,
  run: (problem, round) => assess(revalued(problem, round), COUNT),
  check: sound,
};

/** A whole table of counts of a known site. */
export const costTable: BenchCase<Problem, CountRow[]> = {
  name: "table of counts, known site",
  size: "12 piles, 0 to 20 holes",
  rounds: 11,
  target: { milliseconds: 100 },
  setup: warm,
  run: (problem, round) => assessCounts(revalued(problem, round), TABLE),
  check: (rows) => {
    rows.forEach(sound);
    // readings cannot hurt in the long run; a table in the wrong order or of one count would not fall
    if (!(rows[20].failure < rows[1].failure && rows[1].failure < rows[0].failure)) throw new Error("Failure cost does not fall with the count.");
  },
};

/** The first cell of a new ground under piles that are known. */
export const firstCall: BenchCase<Problem, Assessment> = {
  name: "first call, known piles",
  size: "12 piles, other scales of fluctuation",
  rounds: 9,
  target: { milliseconds: 250 },
  setup: warm,
  run: (problem, round) =>
    assess({ ...problem, ground: { ...problem.ground, horizontalScale: metres(problem.ground.horizontalScale * (1 + 0.01 * (round + 10))) } }, COUNT),
  check: sound,
};

/** The first cell of all: finite elements included. */
export const newPiles: BenchCase<Problem, Assessment> = {
  name: "first call, new pile geometry",
  size: "12 piles, other diameter",
  rounds: 7,
  target: { milliseconds: 600 },
  setup: warm,
  run: (problem, round) => assess({ ...problem, piles: { ...problem.piles, diameter: metres(problem.piles.diameter * (1 + 0.01 * (round + 10))) } }, COUNT),
  check: sound,
};

/** A sensitivity table as cells call it: 25 COVs by 20 counts, each cell parsing its site and its pair. */
export const sensitivity: BenchCase<unknown[][], number[]> = {
  name: "500 sensitivity cells, the engine's share",
  size: "12 piles, 25 COVs by 20 counts, through the cell function",
  rounds: 5,
  target: { milliseconds: 1300 },
  setup: () => {
    const site = templateRows() as unknown[][];
    callFunction("TOTALCOST", [site, COUNT]);
    return site;
  },
  run: (site, round) => {
    const costs: number[] = [];
    for (let c = 0; c < 25; c++) {
      const cov = 0.3 + 0.02 * c + 1e-5 * (round + 10);
      for (let count = 1; count <= 20; count++) costs.push(callFunction("TOTALCOST", [site, count, "Stiffness COV", cov]) as number);
    }
    return costs;
  },
  check: (costs) => {
    if (costs.length !== 500 || !costs.every((cost) => cost > 0 && cost < Infinity)) throw new Error("A cell is no cost.");
    if (!(costs[480] > costs[0])) throw new Error("More scatter in the ground does not cost more.");
  },
};
