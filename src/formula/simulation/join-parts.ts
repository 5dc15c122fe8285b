import type { SimulationTask } from "../../engine/index.js";
import type { KeptRows } from "../../jobs/batch.js";
import { OutcomeRows } from "../../jobs/outcome-rows.js";
import type { SimulationState, TableLabels } from "../../jobs/simulation-state.js";
import { unreadable } from "../failure.js";

/** A part of a run with the file that it stands in. */
export interface NamedPart {
  readonly path: string;
  readonly state: SimulationState;
}

/** Parts that make a run. */
export interface JoinedParts {
  readonly task: SimulationTask;
  readonly labels: TableLabels;
  readonly rows: KeptRows;
  /** realisations by elements */
  readonly count: number;
}

/**
 * Joins parts of one run.
 *
 * @param parts  in any order, at least one
 * @throws {FormulaLineError} parts that do not belong together, lack something or hold the same twice; the sentence names the files
 */
export function joinedParts(parts: readonly NamedPart[]): JoinedParts {
  const sorted = [...parts].sort((a, b) => firstOf(a) - firstOf(b));
  const [first] = sorted;
  if (first === undefined) throw unreadable("There are no parts to join.");
  const form = new OutcomeRows();
  let next = 0;
  sorted.forEach((part, k) => {
    const { path, state } = part;
    if (state.part === undefined) throw unreadable(`${path} holds a run of its own and no part of one; parts are made with --from, --to and --part.`);
    if (state.inputs !== first.state.inputs) throw unreadable(`${path} belongs to other inputs (${state.inputs}) than ${first.path} (${first.state.inputs}); join parts of one run only.`);
    const { from, to } = state.part;
    if (from > next) throw unreadable(`Realisations ${next + 1} to ${from} are in none of the parts; compute them with --from ${next + 1} --to ${from}.`);
    if (from < next) throw unreadable(`Realisations ${from + 1} to ${Math.min(next, to)} are in both ${sorted[k - 1]?.path ?? ""} and ${path}; leave one of them out.`);
    requireWhole(part);
    for (const run of state.form) {
      if (!form.agrees(run)) throw unreadable(`${path} was computed with other arithmetic than ${first.path}: realisation ${run.from + 1} by the form, which every part holds, differs in its last digits. Compute the part again with the same version of the program and of Node.`);
      form.add(run);
    }
    next = to;
  });
  const { task, labels } = first.state;
  return { task, labels, count: next, rows: { elements: sorted.flatMap(({ state }) => state.elements), form: form.runs() } };
}

function firstOf({ state }: NamedPart): number {
  return state.part?.from ?? -1;
}

function requireWhole({ path, state: { part, elements } }: NamedPart): void {
  if (part === undefined) return;
  const rows = new OutcomeRows(part.from);
  for (const run of elements) rows.add(run);
  if (rows.prefix === part.to - part.from && rows.size === rows.prefix) return;
  throw unreadable(`${path} is not finished: ${rows.size} of its ${part.to - part.from} realisations are there. Run it again with --from ${part.from + 1} --to ${part.to} --part ${path}; it goes on where it stopped.`);
}
