import { existsSync } from "node:fs";
import { StateError, type SimulationState } from "../../jobs/simulation-state.js";
import { stateOfText, stateText } from "../../jobs/state-text.js";
import { unreadable } from "../failure.js";
import { readNamedFile, writeNewFile } from "../files.js";

/**
 * Reads a saved run, or a part of one.
 *
 * @returns undefined where there is no such file
 * @throws {FormulaLineError} naming the file, where it cannot be used
 */
export function readStateFile(path: string): SimulationState | undefined {
  if (!existsSync(path)) return undefined;
  const text = new TextDecoder().decode(readNamedFile(path));
  return ofFile(path, () => stateOfText(text));
}

/** Does something with what a file holds and names the file where that fails. */
export function ofFile<T>(path: string, work: () => T): T {
  try {
    return work();
  } catch (reason) {
    if (reason instanceof StateError) throw unreadable(`${path}: ${reason.message}`);
    throw reason;
  }
}

/** Writes a saved run in one step, so that a power cut leaves the one before. */
export function writeStateFile(path: string, state: SimulationState): void {
  writeNewFile(path, new TextEncoder().encode(stateText(state)), true);
}

/** A name for a file that is not there yet. */
export function freeFile(stem: string, ending: string): string {
  for (let number = 1; ; number++) {
    const path = `${stem}${number === 1 ? "" : `-${number}`}${ending}`;
    if (!existsSync(path)) return path;
  }
}
