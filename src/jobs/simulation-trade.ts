import { estimate, growthWanted, nextBatch, prepareSimulation, simulateElements, simulateForm, type SimulationTable, type SimulationTarget, type SimulationTask } from "../engine/index.js";
import type { RowMaker, Trade } from "./answer-thread.js";
import type { BatchJob, Look, LookAt } from "./batch.js";
import type { Totals } from "./realisations.js";

/** A part of a larger run: its realisations by elements. */
export interface PartTarget {
  /** index behind the last */
  readonly to: number;
}

/** Realisations by the form that every part holds: parts made with other arithmetic are known by them. */
const FINGERPRINT = 4;
/** Before these an estimate says too little of where the run will end. */
const FEWEST_TO_PROJECT = 16;

/** The engine as a thread's trade: what it computes, and what it makes of what was computed. */
export const simulationTrade: Trade = { prepare, lookAt };

function prepare(task: SimulationTask): RowMaker {
  const simulation = prepareSimulation(task);
  return (kind, index) => (kind === "elements" ? simulateElements(simulation, index) : simulateForm(simulation, index));
}

function lookAt({ task, target, first }: BatchJob): LookAt<SimulationTable> {
  const wanted = target as SimulationTarget | PartTarget;
  return "to" in wanted ? (elements, form) => lookAtPart(wanted, first + elements.length, form.length) : (elements, form, isCheckpoint) => lookAtRun(task as SimulationTask, wanted, elements, form, isCheckpoint);
}

function lookAtPart({ to }: PartTarget, elements: number, form: number): Look<SimulationTable> {
  const whole = { elements: to, form: FINGERPRINT };
  return { table: undefined, next: elements >= to && form >= FINGERPRINT ? "enough" : whole, projected: whole };
}

function lookAtRun(task: SimulationTask, target: SimulationTarget, elements: readonly Float64Array[], form: readonly Float64Array[], isCheckpoint: boolean): Look<SimulationTable> {
  const table = elements.length >= 2 || form.length >= 2 ? estimate(task, elements, form) : undefined;
  const next = isCheckpoint ? nextBatch(task, target, elements, form) : undefined;
  return { table, next, projected: projection(target, table) };
}

function projection(target: SimulationTarget, table: SimulationTable | undefined): Totals | undefined {
  if ("realisations" in target) return { elements: target.realisations, form: 0 };
  if (table === undefined || table.elements < FEWEST_TO_PROJECT) return undefined;
  const growth = Math.max(1, growthWanted(table, target.regret));
  return { elements: Math.ceil(growth * table.elements), form: Math.ceil(growth * table.form) };
}
