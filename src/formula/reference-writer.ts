import { nearestWord } from "../inputs/labels.js";
import { columnLetters, COLUMNS, ROWS, type Area } from "./addresses.js";
import { ABOUT_RANGES, wantsOneValue } from "./function-names.js";
import type { Surroundings } from "./surroundings.js";
import type { Place } from "./table-references.js";
import { UnsupportedFormula } from "./unsupported.js";

/** A bracket around the place in the formula that is being written. */
export interface Level {
  /** the function whose arguments stand here; undefined for a plain bracket */
  readonly name: string | undefined;
  argument: number;
  /** what is written after the closing bracket */
  readonly after: string;
}

/** The name under which the formula engine knows a sheet. */
export function sheetAlias(sheet: number): string {
  return `S_${sheet}`;
}

/** Writes references for the formula engine: with their sheet, not longer than the used cells, one cell where one is wanted. */
export class ReferenceWriter {
  constructor(
    private readonly place: Place,
    private readonly isSingle: boolean,
    private readonly around: Surroundings,
  ) {}

  /**
   * The sheet that a formula names.
   *
   * @param written  what stands before "!"; undefined for the formula's own sheet
   * @throws {UnsupportedFormula} for another workbook, several sheets, or a sheet that does not exist
   */
  sheetIndex(written: string | undefined): number {
    if (written === undefined) return this.place.sheet;
    if (written.includes("[")) throw new UnsupportedFormula(`The formula takes values from another workbook (${written}), which the formula line does not open.`, "#REF!");
    const names = this.around.book.sheets.map(({ name }) => name);
    const index = names.findIndex((name) => name.toLowerCase() === written.toLowerCase());
    if (index >= 0) return index;
    if (written.includes(":")) throw new UnsupportedFormula(`The formula takes cells from several sheets at once (${written}), which the formula line does not calculate.`, "#REF!");
    const near = nearestWord(written, names);
    throw new UnsupportedFormula(`The workbook has no sheet named ${written}${near === undefined ? `; it has ${names.join(", ")}.` : `; the nearest is ${near}.`}`, "#REF!", false);
  }

  /** A reference as it is, for the ends of a range that a formula makes with a colon. */
  whole(sheet: number, area: Area): string {
    const first = `$${columnLetters(area.left)}$${area.top + 1}`;
    const isOne = area.top === area.bottom && area.left === area.right;
    return `${sheetAlias(sheet)}!${first}${isOne ? "" : `:$${columnLetters(area.right)}$${area.bottom + 1}`}`;
  }

  /**
   * A reference as an operand.
   *
   * @param levels   the brackets around it, from the outermost on
   * @param onlyOne  true after the sign "@"
   */
  written(sheet: number, area: Area, levels: readonly Level[], onlyOne: boolean): string {
    const isOne = area.top === area.bottom && area.left === area.right;
    if (!isOne && (onlyOne || (this.isSingle && wantOneValue(levels)))) return this.ownCell(sheet, area);
    const inner = levels.filter(({ name }) => name !== undefined).at(-1)?.name;
    return this.whole(sheet, inner !== undefined && ABOUT_RANGES.has(inner) ? area : this.cut(area));
  }

  /** The cells that a spilled table fills, for the sign "#" after its first cell. */
  spilled(sheet: number, area: Area): string {
    const spill = this.around.spillOf({ sheet, row: area.top, column: area.left });
    if (spill === undefined) throw new UnsupportedFormula("The sign # stands after a cell whose formula spills no table.", "#REF!", false);
    return this.whole(sheet, spill);
  }

  /** Of a column the cell in the formula's own row, of a row the cell in its own column. */
  private ownCell(sheet: number, area: Area): string {
    const { row, column } = this.place;
    const inRows = area.top === area.bottom ? area.top : row;
    const inColumns = area.left === area.right ? area.left : column;
    const isInside = inRows >= area.top && inRows <= area.bottom && inColumns >= area.left && inColumns <= area.right;
    const isLine = area.top === area.bottom || area.left === area.right;
    if (!isInside || !isLine) return "#VALUE!";
    return this.whole(sheet, { top: inRows, bottom: inRows, left: inColumns, right: inColumns });
  }

  /** A range beyond the used cells of every sheet holds nothing more, and a million blank rows take seconds to read. */
  private cut(area: Area): Area {
    if (area.bottom < 1000 && area.right < 1000) return area;
    const { rows, columns } = this.around.used();
    const bottom = area.bottom === ROWS - 1 || area.bottom - rows > 1000 ? Math.max(area.top, Math.min(area.bottom, rows - 1)) : area.bottom;
    const right = area.right === COLUMNS - 1 || area.right - columns > 1000 ? Math.max(area.left, Math.min(area.right, columns - 1)) : area.right;
    return { ...area, bottom, right };
  }
}

function wantOneValue(levels: readonly Level[]): boolean {
  return levels.every(({ name, argument }) => name === undefined || wantsOneValue(name, argument));
}
