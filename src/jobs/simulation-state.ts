import type { SimulationTask } from "../engine/index.js";
import { PRODUCT_VERSION } from "../results/index.js";
import type { KeptRows } from "./batch.js";
import { inputsHash } from "./inputs-hash.js";

/** Raised by every change that moves a digit of any realisation, and of the form of what is kept: older realisations are refused, not mixed with newer ones. */
const FORMAT = 2;
/** What made realisations that may be joined with those of now. */
export const KEPT_VERSION = `${PRODUCT_VERSION}/${FORMAT}`;

/** A run as it is kept: plain data that a page's own store takes as it is, and that stateText writes into a file. */
export interface SimulationState extends KeptRows {
  readonly format: typeof FORMAT;
  readonly version: string;
  /** hash of the task */
  readonly inputs: string;
  readonly task: SimulationTask;
  /** realisations by elements of this part of a larger run; absent for a run of its own */
  readonly part?: { readonly from: number; /** index behind the last */ readonly to: number };
  /** how the person's sheet calls things, for the table that is made later */
  readonly labels: TableLabels;
}

/** What a table needs besides figures. */
export interface TableLabels {
  readonly units: "SI" | "US";
  /** currency; "" where nobody wrote it */
  readonly money: string;
}

/** A saved run that cannot be used; the message is for the person. */
export class StateError extends Error {
  override readonly name = "StateError";
}

/**
 * What is finished, to go on with later.
 *
 * @param task  of the run
 * @param rows  `rows()` of the run
 */
export function saveState(task: SimulationTask, rows: KeptRows, labels: TableLabels, part?: SimulationState["part"]): SimulationState {
  return { format: FORMAT, version: PRODUCT_VERSION, inputs: inputsHash(task), task, ...(part === undefined ? {} : { part }), labels, elements: rows.elements, form: rows.form };
}

/**
 * The realisations of a saved run.
 *
 * @param state  as it was saved, or whatever was found in its place
 * @param task   that is to be run
 * @throws {StateError} it is none, or of other inputs, or made by another version
 */
export function loadState(state: unknown, task: SimulationTask): KeptRows {
  const found = requireState(state);
  const inputs = inputsHash(task);
  if (found.inputs !== inputs) throw new StateError(`The saved run belongs to other inputs (${found.inputs}; those of now are ${inputs}), so its realisations cannot be used; start anew, or take back what was changed.`);
  return { elements: found.elements, form: found.form };
}

/**
 * Makes sure that something is a saved run of this version.
 *
 * @throws {StateError} with the reason
 */
export function requireState(state: unknown): SimulationState {
  const found = state as Partial<SimulationState> | null;
  if (typeof found !== "object" || found === null || typeof found.version !== "string" || typeof found.inputs !== "string") throw new StateError("This is no saved simulation.");
  if (found.version === PRODUCT_VERSION && found.format !== FORMAT) {
    throw new StateError(`The saved run was made by another build of version ${PRODUCT_VERSION}, whose realisations differ from those of this one in their last digits or in how they are kept; start anew, or finish it with that build.`);
  }
  if (found.version !== PRODUCT_VERSION) {
    throw new StateError(`The saved run was made by version ${found.version} and this is version ${PRODUCT_VERSION}, whose realisations are not the same; start anew, or finish it with the other version.`);
  }
  const isWhole = typeof found.task === "object" && found.task !== null && areRuns(found.elements) && areRuns(found.form) && inputsHash(found.task) === found.inputs;
  if (!isWhole) throw damaged();
  return found as SimulationState;
}

/** A saved run that is cut short or changed. */
export function damaged(): StateError {
  return new StateError("The saved run is damaged or cut short and cannot be used; take an earlier copy of it, or start anew.");
}

function areRuns(runs: unknown): boolean {
  return Array.isArray(runs) && runs.every(({ from, count, values }: { from?: unknown; count?: unknown; values?: unknown }) => isWhole(from) && isWhole(count) && count > 0 && values instanceof Float64Array && values.length > 0 && values.length % count === 0);
}

function isWhole(value: unknown): value is number {
  return typeof value === "number" && Number.isSafeInteger(value) && value >= 0;
}
