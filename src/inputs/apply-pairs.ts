import type { InputId } from "./catalogue.js";
import { found, isBlankOrZero, isEmpty, isError, plainCell, type Cell } from "./cells.js";
import { attempt, type Fault } from "./fault.js";
import { InputError } from "./input-error.js";
import { entryLabelled, nearestLabel } from "./labels.js";
import { inWords, pairPlace, refusal } from "./place.js";
import { ASKS_FOR_DEFAULT, readInput, type Given } from "./read-input.js";
import { readUnitCell } from "./read-unit-cell.js";
import type { Block } from "./scan-block.js";

/** What a pair puts in place of an input. */
export interface Replacement {
  /** 1 for the first pair */
  readonly pair: number;
  /** undefined: the pair asks for the default */
  readonly given: Given | undefined;
}

/**
 * The trailing cells of a formula as one list, whatever way the worksheet bundles them; pairs left empty at the end are dropped.
 *
 * @param pairs  cells, or ranges of cells, in order
 * @returns      plain cells: label, value, label, value, ...
 */
export function flattenPairs(pairs: readonly unknown[] | undefined): Cell[] {
  const cells = ((pairs ?? []) as readonly unknown[]).flat(2).slice(0, 400).map(plainCell);
  while (cells.length > 0 && cells.length % 2 === 0 && isEmpty(cells[cells.length - 1]!) && isEmpty(cells[cells.length - 2]!)) cells.length -= 2;
  return cells.length === 1 && isEmpty(cells[0]!) ? [] : cells;
}

/**
 * Reads the label, value pairs that replace inputs. A value is in the unit of the block's own row, or in the catalogue's unit where the
 * block has no such row.
 *
 * @param cells   as flattened
 * @param block   the block whose inputs are replaced
 * @param faults  where refusals are noted
 * @returns       what each input is replaced by
 */
export function readPairs(cells: readonly Cell[], block: Block, faults: Fault[]): Map<InputId, Replacement> {
  const replacements = new Map<InputId, Replacement>();
  if (cells.length % 2 === 1) {
    attempt(faults, { id: undefined, label: "pairs", row: undefined }, () => {
      throw new InputError(`The formula ends with ${cells.length} ${cells.length === 1 ? "cell" : "cells"} of label, value pairs; each label needs one value after it, so their number must be even.`);
    });
    return replacements;
  }
  for (let index = 0; index < cells.length; index += 2) {
    const pair = index / 2 + 1;
    const label = cells[index]!;
    const entry = typeof label === "string" && !isError(label) ? entryLabelled(label) : undefined;
    attempt(faults, { id: entry?.id, label: entry?.label ?? `pair ${pair}`, row: undefined }, () => {
      if (entry === undefined) throw unknownLabel(label, pair);
      const place = pairPlace(entry.label, pair);
      if (replacements.has(entry.id)) throw refusal(place, "is replaced twice in the same formula");
      if (entry.kind === "list") throw refusal(place, "is a list; only inputs of one value can be replaced by a formula");
      const unit = block.inputs.get(entry.id)?.unit ?? readUnitCell(entry.kind, null, entry.unit, place, entry.per);
      const given = readInput(entry, cells[index + 1]!, unit, place);
      replacements.set(entry.id, { pair, given: given === ASKS_FOR_DEFAULT ? undefined : given });
    });
  }
  return replacements;
}

function unknownLabel(label: Cell, pair: number): InputError {
  const where = `The label of pair ${pair} of the formula`;
  if (isBlankOrZero(label)) return new InputError(`${where} is blank.`);
  if (typeof label !== "string" || isError(label)) return new InputError(`${where} is ${found(label)}; the name of an input is needed, such as ${inWords(['"Stiffness COV"', '"Hole depth"'])}.`);
  const nearest = nearestLabel(label);
  return new InputError(`${where} is ${found(label)}, which is not a known label${nearest === undefined ? "; the check rows list all labels." : `; is "${nearest}" meant?`}`);
}
