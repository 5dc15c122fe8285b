import type { SimulationTask } from "../../engine/index.js";
import type { KeptRows } from "../../jobs/batch.js";
import { loadState, type SimulationState } from "../../jobs/simulation-state.js";
import { misused } from "../failure.js";
import type { PartCall } from "./simulate-call.js";
import { ofFile, readStateFile } from "./state-file.js";

/**
 * What is finished of a part whose file is there already.
 *
 * @returns undefined where there is no file
 * @throws {FormulaLineError} the file holds something else
 */
export function loadPart(part: PartCall, task: SimulationTask): KeptRows | undefined {
  const state = readStateFile(part.file);
  if (state === undefined) return undefined;
  requireFreeOrOwn(part.file, state, part);
  return ofFile(part.file, () => loadState(state, task));
}

/**
 * Refuses to write over a saved run of another kind.
 *
 * @param part  undefined for a whole run
 * @throws {FormulaLineError} it is another part, or a part where a whole run is meant
 */
export function requireFreeOrOwn(path: string, { part: found }: SimulationState, part: PartCall | undefined): void {
  if (found?.from === (part === undefined ? undefined : part.from - 1) && found?.to === part?.to) return;
  throw misused(`${path} holds ${found === undefined ? "a whole run" : `realisations ${found.from + 1} to ${found.to} of a run`}; give another file.`);
}
