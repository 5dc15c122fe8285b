import type { SimulationTable, SimulationTask } from "../../engine/index.js";
import type { SimulationContent } from "../../host/simulation-sheet.js";
import { simulationStamp } from "../../jobs/simulation-stamp.js";
import { fewGrounds, type SimulationStamp } from "../../results/index.js";
import type { UnitSystem } from "../../units/result-units.js";

/** What a report needs to know of the run besides its figures. */
export interface ReportedRun {
  readonly task: SimulationTask;
  readonly units: UnitSystem;
  /** whose money; "" where nobody wrote it */
  readonly money: string;
  /** where the inputs were read */
  readonly place: string;
}

/** How a run stood when its report was made. */
export interface ReportedStanding {
  readonly isFinished: boolean;
  /** the site block is no longer the one that was run */
  readonly hasChanged: boolean;
}

/** A run as it is written into sheets. */
export interface SimulationReport {
  readonly run: ReportedRun;
  readonly table: SimulationTable;
  readonly stamp: SimulationStamp;
  /** sentences that must be read before the figures */
  readonly warnings: readonly string[];
}

/**
 * The report of a run.
 *
 * @param now  date of the writing
 */
export function simulationReport(run: ReportedRun, table: SimulationTable, standing: ReportedStanding, now: Date): SimulationReport {
  return { run, table, stamp: simulationStamp(run.task, table, now), warnings: [...warningsOf(run, standing), ...fewGrounds(table)] };
}

/** What the sheet of all figures needs of a report. */
export function contentOf({ run: { units, money }, table, stamp, warnings }: SimulationReport): SimulationContent {
  return { table, stamp, units, money, warnings };
}

function warningsOf({ task }: ReportedRun, { isFinished, hasChanged }: ReportedStanding): string[] {
  return [
    ...(isFinished ? [] : ["This run was not finished: it has not reached the precision or the number of grounds that was asked for."]),
    ...(hasChanged ? ["The site block has changed since this run was ordered. These figures are for the inputs as they were."] : []),
    ...(task.variants[0]!.problem.piles.groupInteraction ? ["Piles settle their neighbours in these figures (group interaction is on)."] : []),
  ];
}
