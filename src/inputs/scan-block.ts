import type { CatalogueEntry, InputId } from "./catalogue.js";
import { found, isBlankOrZero, isEmpty, isError, looksLikeNumber, type Cell } from "./cells.js";
import { attempt, MOST_FAULTS, type Fault } from "./fault.js";
import { InputError } from "./input-error.js";
import { entryLabelled, isSectionTitle, nearestLabel, normaliseLabel } from "./labels.js";
import { refusal, rowPlace, rowWords } from "./place.js";
import { ASKS_FOR_DEFAULT, readInput, type Given } from "./read-input.js";
import { isFraction, isListHeading, namesComeFirst, readList, type ListReading, type RawList } from "./read-list.js";
import { readUnitCell, type UnitReading } from "./read-unit-cell.js";

/** What stands in one row of the block. */
export interface GivenRow {
  readonly row: number;
  /** undefined: the row asks for the default */
  readonly given: Given | undefined;
  readonly unit: UnitReading;
}

/** A block as read, before defaults and before pairs. Not changed afterwards: it is shared by all formulas that use the block. */
export interface Block {
  readonly inputs: ReadonlyMap<InputId, GivenRow>;
  readonly lists: ReadonlyMap<InputId, ListReading>;
  /** row of every input that has one, refused ones too */
  readonly rows: ReadonlyMap<InputId, number>;
  readonly faults: readonly Fault[];
}

/**
 * Reads a site block row by row: section titles and blank rows are skipped, labels found, units and values read, lists gathered.
 *
 * @param rows  plain cells, row by row: label, value, unit, note
 * @returns     everything that was read, and everything that was refused
 */
export function scanBlock(rows: readonly (readonly Cell[])[]): Block {
  const scan = new BlockScan(rows);
  rows.forEach((cells, index) => scan.take(cells, index + 1));
  return scan.finish();
}

/** One pass over the rows; it remembers the list that is open. */
class BlockScan {
  private readonly inputs = new Map<InputId, GivenRow>();
  private readonly lists = new Map<InputId, ListReading>();
  private readonly rowOf = new Map<InputId, number>();
  private readonly faults: Fault[] = [];
  private open: RawList | undefined;
  private gap: number | undefined;
  /** Some machines hand blank cells over as 0, others as null: where there is a null, a row of zeros is a row of zeros. */
  private readonly zerosMayBeBlank: boolean;

  constructor(rows: readonly (readonly Cell[])[]) {
    this.zerosMayBeBlank = !rows.some((cells) => cells.includes(null));
  }

  take(cells: readonly Cell[], row: number): void {
    if (cells.every(isEmpty) || (this.zerosMayBeBlank && cells.every((cell) => cell === 0))) {
      if (this.open !== undefined) this.gap ??= row;
      return;
    }
    if (this.open !== undefined && this.takeListRow(this.open, cells, row)) return;
    this.close();
    const label = cells[0] ?? null;
    if (typeof label === "string" && !isEmpty(label) && !isError(label)) this.takeLabelled(label.trim(), cells, row);
    else this.takeUnlabelled(label, cells, row);
  }

  finish(): Block {
    this.close();
    const byRow = [...this.faults].sort((a, b) => (a.row ?? Infinity) - (b.row ?? Infinity));
    return { inputs: this.inputs, lists: this.lists, rows: this.rowOf, faults: byRow };
  }

  private takeListRow(list: RawList, cells: readonly Cell[], row: number): boolean {
    const first = cells[0] ?? null;
    if (list.rows.length === 0 && list.heading === undefined && this.gap === undefined && isListHeading(list.entry, first)) {
      list.heading = { row, cells };
      return true;
    }
    if (!this.belongsToList(list, first, cells)) return false;
    const firstOfDamage = list.entry.id === "damageList" && list.rows.length === 0;
    if (firstOfDamage && first === 0 && isBlankOrZero(cells[1] ?? null)) return true; // no damage at no distortion says nothing new
    // elsewhere zeros may be a pile or a hole at (0, 0) half filled in
    if (this.gap !== undefined && !firstOfDamage) this.refuseGap(list, this.gap);
    this.gap = undefined;
    list.rows.push({ row, cells });
    return true;
  }

  private belongsToList(list: RawList, first: Cell, cells: readonly Cell[]): boolean {
    if (typeof first !== "string" || isEmpty(first)) return !isEmpty(first) || cells.slice(0, 3).some((cell) => typeof cell === "number" && cell !== 0);
    if (isError(first) || looksLikeNumber(first) || (list.entry.id === "damageList" && isFraction(first))) return true;
    return namesComeFirst(list) && entryLabelled(first) === undefined && !isSectionTitle(first);
  }

  private refuseGap(list: RawList, row: number): void {
    const { id, label } = list.entry;
    const zero = id === "holeList" || id === "pileList" ? `. If it stands for (0, 0), write its name in a first column headed ${list.entry.columns![0]!.name}` : "";
    attempt(this.faults, { id, label, row }, () => {
      throw refusal(rowPlace(label, row), `has a row that is blank or all zeros among its rows; take it out or fill it in${zero}`);
    });
  }

  private close(): void {
    const list = this.open;
    const faulty = this.faults.length;
    this.open = undefined;
    this.gap = undefined;
    if (list === undefined) return;
    if (this.inputs.has(list.entry.id)) { // the word automatic stands beside the label
      const { entry, row, rows } = list;
      if (rows.length > 0) attempt(this.faults, { id: entry.id, label: entry.label, row }, () => {
        throw refusal(rowPlace(entry.label, row), `has the word automatic beside it, but ${rows.length} ${rows.length === 1 ? "row" : "rows"} below it; take out one or the other`);
      });
      return;
    }
    const reading = readList(list, this.faults);
    if (reading !== undefined && this.faults.length === faulty) this.lists.set(list.entry.id, reading);
  }

  private takeLabelled(label: string, cells: readonly Cell[], row: number): void {
    const value = cells[1] ?? null;
    const entry = entryLabelled(label);
    if (entry === undefined) {
      if (isHeadRow(label, value)) return;
      if (this.faults.length >= MOST_FAULTS) return;
      attempt(this.faults, { id: undefined, label, row }, () => {
        if (isSectionTitle(label)) {
          if (!isBlankOrZero(value)) throw new InputError(`${found(label)} (${rowWords(row)}) is a section title and takes no value, but ${found(value)} stands beside it.`);
          return;
        }
        const nearest = nearestLabel(label);
        throw new InputError(`${found(label)} (${rowWords(row)}) is not a known label${nearest === undefined ? "; the check rows list all labels" : `; is "${nearest}" meant?`}${nearest === undefined ? "." : ""}`);
      });
      return;
    }
    attempt(this.faults, { id: entry.id, label: entry.label, row }, () => this.takeInput(entry, cells, row));
  }

  private takeInput(entry: CatalogueEntry, cells: readonly Cell[], row: number): void {
    const value = cells[1] ?? null;
    const place = rowPlace(entry.label, row);
    const before = this.rowOf.get(entry.id);
    if (before !== undefined) throw refusal(place, `is given twice: in row ${before} and in row ${row}; take one of them out`);
    this.rowOf.set(entry.id, row);
    if (entry.kind === "list") {
      this.open = { entry, row, heading: undefined, rows: [] };
      if (isBlankOrZero(value)) return;
      if (typeof value !== "string" || readAutomatic(entry, value) === undefined) throw refusal(place, `has ${found(value)} beside it; its rows stand below the label, or the word automatic beside it`);
      this.inputs.set(entry.id, { row, given: undefined, unit: readUnitCell("list", null, "", place) });
      return;
    }
    const unit = readUnitCell(entry.kind, cells[2] ?? null, entry.unit, place, entry.per);
    const given = readInput(entry, value, unit, place);
    this.inputs.set(entry.id, { row, given: given === ASKS_FOR_DEFAULT ? undefined : given, unit });
  }

  private takeUnlabelled(label: Cell, cells: readonly Cell[], row: number): void {
    const value = cells[1] ?? null;
    const where = `Row ${row} of the site block`;
    attempt(this.faults, { id: undefined, label: `row ${row}`, row }, () => {
      if (isError(label)) throw new InputError(`${where} has the error ${String(label).trim()} where a label is expected.`);
      if (!isBlankOrZero(label)) throw new InputError(`${where} begins with ${found(label)} where a label is expected; the rows of a list stand directly below its label.`);
      if (!isBlankOrZero(value)) throw new InputError(`${where} has ${isError(value) ? `the error ${String(value).trim()}` : found(value)} in its value cell, but no label.`);
    });
  }
}

function readAutomatic(entry: CatalogueEntry, value: string): true | undefined {
  const word = normaliseLabel(value);
  return word === "automatic" || word === "auto" || word === "default" || (entry.id === "pileList" && word === "grid") ? true : undefined;
}

/** The head of the columns: Input, Value, Unit, Note. */
function isHeadRow(label: string, value: Cell): boolean {
  return typeof value === "string" && normaliseLabel(value) === "value" && ["input", "inputs", "label"].includes(normaliseLabel(label));
}
