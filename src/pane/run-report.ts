import type { RunState } from "./run-store.js";
import { simulationReport, type SimulationReport } from "./sheets/simulation-report.js";

/**
 * The report of a run as it stands.
 *
 * @param state  of the run
 * @param now    date of the writing
 * @returns      undefined where there is no table
 */
export function reportOf({ order, table, end, phase, changed }: RunState, now: Date): SimulationReport | undefined {
  if (order === undefined || table === undefined) return undefined;
  return simulationReport(order, table, { isFinished: phase === "ended" && end === "done", hasChanged: changed }, now);
}
