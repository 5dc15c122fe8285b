import type { SimulationTable } from "../../engine/index.js";
import type { SimulationContent } from "../../host/simulation-sheet.js";
import { simulationStamp } from "../../jobs/simulation-stamp.js";
import type { SimulationStamp } from "../../results/index.js";
import type { RunOrder } from "../run-order.js";
import type { RunState } from "../run-store.js";

/** A run as it is written into sheets. */
export interface SimulationReport {
  readonly order: RunOrder;
  readonly table: SimulationTable;
  readonly stamp: SimulationStamp;
  readonly warnings: readonly string[];
}

/**
 * The report of a run as it stands.
 *
 * @param state  of the run
 * @param now    date of the writing
 * @returns      undefined where there is no table
 */
export function reportOf({ order, table, end, phase, changed }: RunState, now: Date): SimulationReport | undefined {
  if (order === undefined || table === undefined) return undefined;
  const isFinished = phase === "ended" && end === "done";
  return { order, table, stamp: simulationStamp(order.task, table, now), warnings: warningsOf(order, isFinished, changed) };
}

/** What the sheet of all figures needs of a report. */
export function contentOf({ order, table, stamp, warnings }: SimulationReport): SimulationContent {
  return { table, stamp, units: order.units, money: order.money, warnings };
}

function warningsOf({ task }: RunOrder, isFinished: boolean, hasChanged: boolean): string[] {
  return [
    ...(isFinished ? [] : ["This run was not finished: it has not reached the precision or the number of grounds that was asked for."]),
    ...(hasChanged ? ["The site block has changed since this run was ordered. These figures are for the inputs as they were."] : []),
    ...(task.interaction === true ? ["Piles settle their neighbours in these figures (interaction factors); in the cell functions each pile stands alone."] : []),
  ];
}
