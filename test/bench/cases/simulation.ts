import { estimate, outcomeColumns, prepareSimulation, simulateElements, simulateForm, type Simulation, type SimulationTask } from "../../../src/engine/index.js";
import { ninePiles, type Change } from "../../engine/decision/example-problem.js";
import type { BenchCase } from "../bench-case.js";
import { demonstrationProblem } from "./demonstration.js";

function demonstration(): Simulation {
  return prepareSimulation({ variants: [{ name: "", problem: demonstrationProblem() }], counts: Array.from({ length: 13 }, (_, n) => n), seed: "bench" });
}

const checkRow = (row: Float64Array): void => {
  if (!row.every(Number.isFinite) || !(row[5] > 0)) throw new Error("The realisation built nothing.");
};

/** What a worker does all the time. */
export const oneElements: BenchCase<Simulation, Float64Array> = {
  name: "realisation with finite elements",
  size: "demonstration, 12 piles, counts 0 to 12: 72 solutions",
  rounds: 15,
  target: {},
  setup: demonstration,
  run: (simulation, round) => simulateElements(simulation, round + 2),
  check: checkRow,
};

export const oneForm: BenchCase<Simulation, Float64Array> = {
  name: "realisation by the second-order form",
  size: "demonstration, 12 piles, counts 0 to 12",
  rounds: 301,
  target: {},
  setup: demonstration,
  run: (simulation, round) => simulateForm(simulation, round + 2),
  check: checkRow,
};

export const prepare: BenchCase<null, Simulation> = {
  name: "simulation made ready",
  size: "demonstration, 12 piles, 78 holes of 48 readings",
  rounds: 5,
  target: { milliseconds: 2000 },
  setup: () => null,
  run: demonstration,
  check: (simulation) => checkRow(simulateForm(simulation, 0)),
};

interface Efficiency {
  readonly cuts: readonly number[];
  readonly times: readonly number[];
}

const GROUNDS: readonly Change[] = [{ scales: [8, 8] }, { scales: [12, 3] }, { scales: [8, 8], correlation: "ellipsoidal" }, { scales: [10, 4], correlation: "spherical" }];
const ELEMENTS = 24;
const FORM = 240;

function efficiency(cov: number, atLeast: number): BenchCase<readonly Simulation[], Efficiency> {
  return {
    name: `finite-element solutions saved, COV ${cov}`,
    size: `nine piles, geometric mean rule, counts 1, 4, 9, four correlation structures: ${ELEMENTS} realisations each with its control`,
    rounds: 5,
    target: {},
    setup: () => GROUNDS.map((change) => prepareSimulation({ variants: [{ name: "", problem: ninePiles({ ...change, cov }) }], counts: [1, 4, 9], seed: "bench" })),
    run: (simulations, round) => {
      const found = simulations.map((simulation) => {
        const from = (round + 2) * ELEMENTS;
        const begun = performance.now();
        const elements = Array.from({ length: ELEMENTS }, (_, k) => simulateElements(simulation, from + k));
        const between = performance.now();
        const form = Array.from({ length: FORM }, (_, k) => simulateForm(simulation, (round + 2) * FORM + k));
        const end = performance.now();
        return saved(simulation.task, elements, form, (between - begun) / ELEMENTS, (end - between) / FORM);
      });
      return { cuts: found.map(({ cut }) => cut), times: found.map(({ time }) => time) };
    },
    check: ({ cuts }) => {
      // of one round; the figure below is what was promised
      if (!(geometric(cuts) > atLeast / 3)) throw new Error(`The form saves ${geometric(cuts)} times the solutions only.`);
    },
    figure: (answers) => {
      const cuts = GROUNDS.map((_, g) => geometric(answers.map((answer) => answer.cuts[g])));
      const times = GROUNDS.map((_, g) => geometric(answers.map((answer) => answer.times[g])));
      const list = (values: readonly number[]): string => values.map((value) => Math.round(value)).join(", ");
      return `solutions for equal standard error: ${list(cuts)} times fewer in the four structures (promised ${atLeast}); whole time ${list(times)} times less`;
    },
  };
}

/**
 * Variance cut of the total, and how much less time the best split of both kinds takes to one standard error than plain sampling by
 * finite elements. Plain sampling has no form to guide it between lengths: it needs solutions at twice as many for the same accuracy.
 */
function saved(task: SimulationTask, elements: readonly Float64Array[], form: readonly Float64Array[], ofElements: number, ofForm: number): { cut: number; time: number } {
  const { rows } = estimate(task, elements, form);
  const cut = geometric(rows.flatMap((row) => (row.varianceCut === undefined ? [] : [row.varianceCut])));
  if (elements[0].length !== 2 * rows.length * outcomeColumns.length) throw new Error("Rows are missing.");
  const plain = 2 * (ofElements - ofForm);
  // Elements with the variance 1 / cut of the plain one, the form with the rest: least time for a sum of variances.
  return { cut, time: plain / (Math.sqrt(ofElements / cut) + Math.sqrt(ofForm * (1 - 1 / cut))) ** 2 };
}

const geometric = (values: readonly number[]): number => Math.exp(values.reduce((sum, value) => sum + Math.log(value), 0) / values.length);

export const savedAtModerate = efficiency(0.6, 300);
export const savedAtHigh = efficiency(1, 100);
