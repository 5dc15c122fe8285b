import { assess, prepareSimulation, simulateElements } from "../../../src/engine/index.js";
import { kernels } from "../../../src/engine/numerics/chosen-kernels.js";
import { ninePiles } from "../../engine/decision/example-problem.js";

/** What the engine says somewhere. */
export interface KernelFigures {
  /** whether it runs in WebAssembly */
  readonly compiled: boolean;
  /** cells of two counts, and one realisation with finite elements */
  readonly figures: number[];
}

/** Lets the engine speak. */
export function kernelFigures(): KernelFigures {
  const problem = ninePiles({ foundShare: 0.5 });
  const cells = [0, 2].map((count) => assess(problem, count)).flatMap(({ foundation, failure, delay, standardError, surprises }) => [foundation, failure, delay, standardError, surprises]);
  const simulation = prepareSimulation({ variants: [{ name: "", problem }], counts: [2], seed: "kernels" });
  return { compiled: String(kernels().factor).includes("[native code]"), figures: [...cells, ...simulateElements(simulation, 0)] };
}
