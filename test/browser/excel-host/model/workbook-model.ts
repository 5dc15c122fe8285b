import { areaAddress, type Area } from "../../../../src/formula/addresses.js";
import { accessDenied, invalidArgument, itemAlreadyExists, itemNotFound } from "../host-error.js";
import { entryOf } from "./entry.js";
import { isName, type NameModel } from "./name-model.js";
import { cellKey, SheetModel } from "./sheet-model.js";

/** Who changes something: the page through the library, or a person. */
export type Author = "addin" | "person";

/** What happened to the workbook. */
export type ModelEvent =
  | { readonly what: "changed"; readonly sheet: SheetModel; readonly area: Area; readonly author: Author }
  | { readonly what: "added" | "deleted" | "activated" | "deactivated" | "calculated"; readonly sheet: SheetModel }
  | { readonly what: "renamed"; readonly sheet: SheetModel; readonly before: string; readonly author: Author }
  | { readonly what: "selected"; readonly sheet: SheetModel; readonly area: Area };

const LONGEST_SHEET_NAME = 31;

/** The workbook behind the wire. Everything that changes it goes through here, so that events and protection are never missed. */
export class WorkbookModel {
  readonly sheets: SheetModel[] = [];
  readonly names: NameModel[] = [];
  isStructureProtected = false;
  calculationMode = "Automatic";
  active: SheetModel;
  selection: { sheet: SheetModel; areas: readonly Area[] };
  /** told of every change, in order */
  readonly listeners = new Set<(event: ModelEvent) => void>();
  /** told of changes of which Excel raises no event */
  readonly quiet = new Set<() => void>();
  private sheetsMade = 0;

  constructor() {
    this.active = this.newSheet("Sheet1");
    this.selection = { sheet: this.active, areas: [{ top: 0, left: 0, bottom: 0, right: 0 }] };
  }

  /** @throws {Error} in a test's own words: the test named a sheet that is not there */
  sheet(name: string): SheetModel {
    const found = this.findSheet(name);
    if (found === undefined) throw new Error(`The model has no sheet ${name}; it has ${this.sheets.map((each) => each.name).join(", ")}.`);
    return found;
  }

  /** By name in any case, or by id. */
  findSheet(key: string): SheetModel | undefined {
    return this.sheets.find(({ id, name }) => id === key || name.toLowerCase() === key.toLowerCase());
  }

  addSheet(name: string | undefined): SheetModel {
    this.refuseIfProtected();
    if (name !== undefined) this.checkSheetName(name);
    let free = this.sheets.length + 1;
    while (name === undefined && this.findSheet(`Sheet${free}`) !== undefined) free++;
    const sheet = this.newSheet(name ?? `Sheet${free}`);
    this.tell({ what: "added", sheet });
    return sheet;
  }

  renameSheet(sheet: SheetModel, name: string, author: Author): void {
    this.refuseIfProtected();
    if (name.toLowerCase() !== sheet.name.toLowerCase()) this.checkSheetName(name);
    const before = sheet.name;
    sheet.name = name;
    this.tell({ what: "renamed", sheet, before, author });
  }

  deleteSheet(sheet: SheetModel): void {
    this.refuseIfProtected();
    if (this.sheets.filter(({ visibility }) => visibility === "Visible").length === 1 && sheet.visibility === "Visible") throw invalidArgument("a workbook keeps at least one visible sheet");
    this.sheets.splice(this.sheets.indexOf(sheet), 1);
    for (const name of [...this.names, ...this.sheets.flatMap(({ names }) => names)]) {
      if (name.range?.sheet !== sheet) continue;
      name.range = undefined;
      name.formula = "=#REF!";
    }
    if (this.active === sheet) this.activate(this.sheets[0]!);
    this.tell({ what: "deleted", sheet });
  }

  activate(sheet: SheetModel): void {
    if (sheet.visibility !== "Visible") throw invalidArgument(`${sheet.name} is hidden`);
    if (sheet === this.active) return;
    const before = this.active;
    this.active = sheet;
    this.selection = { sheet, areas: [{ top: 0, left: 0, bottom: 0, right: 0 }] };
    this.tell({ what: "deactivated", sheet: before });
    this.tell({ what: "activated", sheet });
  }

  select(sheet: SheetModel, areas: readonly Area[]): void {
    this.activate(sheet);
    this.selection = { sheet, areas };
    this.tell({ what: "selected", sheet, area: areas[0]! });
  }

  /** @param on  the sheet on which alone the name is known; undefined for the whole workbook */
  addName(name: string, range: NameModel["range"], formula: string, on: SheetModel | undefined, comment = ""): NameModel {
    if (!isName(name)) throw invalidArgument(`${name} cannot be a name`);
    const names = on?.names ?? this.names;
    if (names.some((each) => each.name.toLowerCase() === name.toLowerCase())) throw itemAlreadyExists(name);
    const made: NameModel = { name, sheet: on, range, formula, comment, visible: true };
    names.push(made);
    this.tellAll();
    return made;
  }

  deleteName(name: NameModel): void {
    const names = name.sheet?.names ?? this.names;
    if (!names.includes(name)) throw itemNotFound(name.name);
    names.splice(names.indexOf(name), 1);
    this.tellAll();
  }

  /**
   * Writes into cells what a page or a person gives.
   *
   * @param rows  row by row; one row of one value fills the whole area
   */
  write(sheet: SheetModel, area: Area, rows: readonly (readonly unknown[])[], author: Author): void {
    const height = area.bottom - area.top + 1;
    const width = area.right - area.left + 1;
    const isOne = rows.length === 1 && rows[0]?.length === 1;
    if (!isOne && (rows.length !== height || rows.some((row) => row.length !== width))) {
      throw invalidArgument(`the number of rows or columns in the input array doesn't match the size or dimensions of the range ${areaAddress(area)}`);
    }
    if (sheet.isLocked(area)) throw accessDenied(`${sheet.name} is protected`);
    const made: [number, ReturnType<typeof entryOf>][] = [];
    for (let row = 0; row < height; row++) for (let column = 0; column < width; column++) {
      const written = isOne ? rows[0]?.[0] : rows[row]?.[column];
      made.push([cellKey(area.top + row, area.left + column), entryOf(written, String(sheet.lookAt(area.top + row, area.left + column, "numberFormat") ?? "General"))]);
    }
    for (const [key, entry] of made) {
      if (entry === null) sheet.entries.delete(key);
      else if (entry !== undefined) sheet.entries.set(key, entry);
    }
    this.tell({ what: "changed", sheet, area, author });
  }

  tell(event: ModelEvent): void {
    for (const listener of this.listeners) listener(event);
  }

  /** A change of names moves values without any event of its own. */
  private tellAll(): void {
    for (const listener of this.quiet) listener();
  }

  private newSheet(name: string): SheetModel {
    const sheet = new SheetModel(`{00000000-0001-0000-${String(this.sheetsMade++).padStart(4, "0")}-000000000000}`, name);
    this.sheets.push(sheet);
    return sheet;
  }

  private refuseIfProtected(): void {
    if (this.isStructureProtected) throw accessDenied("the structure of the workbook is protected");
  }

  private checkSheetName(name: string): void {
    if (name === "" || name.length > LONGEST_SHEET_NAME || /[:\\/?*[\]]/.test(name) || /^'|'$/.test(name) || /^history$/i.test(name)) throw invalidArgument(`${name} cannot name a sheet`);
    if (this.findSheet(name) !== undefined) throw itemAlreadyExists(name);
  }
}
