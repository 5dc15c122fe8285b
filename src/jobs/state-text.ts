import { base64Of, figuresOf } from "./base-64.js";
import type { RowRun } from "./realisations.js";
import { sha256 } from "./sha-256.js";
import { damaged, requireState, StateError, type SimulationState } from "./simulation-state.js";

const SUM = "sum ";

/**
 * A saved run as text for a file or a cell: one line of JSON, one with its check sum. Figures keep every bit.
 *
 * @param state  as saveState made it
 */
export function stateText(state: SimulationState): string {
  const line = JSON.stringify({ ...state, elements: state.elements.map(written), form: state.form.map(written) });
  return `${line}\n${SUM}${sumOf(line)}\n`;
}

/**
 * The saved run of such a text.
 *
 * @throws {StateError} the text is none, is cut short or changed, or was made by another version
 */
export function stateOfText(text: string): SimulationState {
  const [line, sum] = text.split("\n");
  if (!line.startsWith('{"format":')) throw new StateError("This is no saved simulation.");
  if (sum !== `${SUM}${sumOf(line)}`) throw damaged();
  const found = JSON.parse(line) as { elements?: unknown; form?: unknown };
  return requireState({ ...found, elements: readRuns(found.elements), form: readRuns(found.form) });
}

function sumOf(line: string): string {
  return sha256(new TextEncoder().encode(line));
}

function written({ from, count, values }: RowRun): { from: number; count: number; values: string } {
  return { from, count, values: base64Of(values) };
}

function readRuns(runs: unknown): unknown {
  return Array.isArray(runs) ? runs.map((run: { values?: unknown }) => ({ ...run, values: figuresOf(String(run.values)) })) : runs;
}
