import type { SimulationTable, SimulationTask } from "../engine/index.js";
import { PRODUCT_VERSION, type SimulationStamp } from "../results/index.js";
import { inputsHash } from "./inputs-hash.js";

/**
 * Where a table comes from.
 *
 * @param date  of the run's end
 */
export function simulationStamp(task: SimulationTask, { elements, form }: SimulationTable, date: Date): SimulationStamp {
  return { version: PRODUCT_VERSION, seed: task.seed, inputs: inputsHash(task), elements, form, date };
}
