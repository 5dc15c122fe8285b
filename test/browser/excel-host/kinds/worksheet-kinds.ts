import { accessDenied, invalidArgument, itemNotFound } from "../host-error.js";
import { opened, type Kind, type Opened } from "../kind.js";
import type { SheetModel } from "../model/sheet-model.js";
import type { WorkbookModel } from "../model/workbook-model.js";
import { registering } from "./event-members.js";
import { placeOn } from "./places.js";
import { part } from "./range-kind.js";

const VISIBILITIES = ["Visible", "Hidden", "VeryHidden"];

/** All sheets. */
export const worksheetsKind: Kind<WorkbookModel> = {
  items: ({ sheets }) => sheets.map((sheet) => opened("Worksheet", sheet)),
  item: (book, key) => found(book, key) ?? missing(key),
  open: {
    getActiveWorksheet: ({ active }) => opened("Worksheet", active),
    getItem: (book, given) => found(book, given.text(0)) ?? missing(given.text(0)),
    getItemOrNullObject: (book, given) => found(book, given.text(0)),
    getFirst: ({ sheets }, given) => opened("Worksheet", seen(sheets, given.truth(0, false))[0]!),
    getLast: ({ sheets }, given) => opened("Worksheet", seen(sheets, given.truth(0, false)).at(-1)!),
    add: (book, given) => opened("Worksheet", book.addSheet(given.optionalText(0))),
  },
  call: { getCount: ({ sheets }, given) => seen(sheets, given.truth(0, false)).length, ...registering("Workbook") },
};

/** One sheet. */
export const worksheetKind: Kind<SheetModel> = {
  id: ({ id }) => id,
  get: {
    id: ({ id }) => id,
    name: ({ name }) => name,
    position: (sheet, { book }) => book.sheets.indexOf(sheet),
    visibility: ({ visibility }) => visibility,
    showGridlines: ({ page }) => page.showGridlines ?? true,
    tabColor: ({ page }) => page.tabColor ?? "",
  },
  set: {
    name: (sheet, value, { book }) => {
      if (typeof value !== "string") throw invalidArgument("Worksheet.name");
      book.renameSheet(sheet, value, "addin");
    },
    visibility: (sheet, value, { book }) => {
      if (!VISIBILITIES.includes(String(value))) throw invalidArgument(`Worksheet.visibility ${JSON.stringify(value)}`);
      if (book.isStructureProtected) throw accessDenied("the structure of the workbook is protected");
      sheet.visibility = String(value);
    },
    showGridlines: ({ page }, value) => {
      if (typeof value !== "boolean") throw invalidArgument("Worksheet.showGridlines");
      page.showGridlines = value;
    },
    tabColor: ({ page }, value) => {
      if (typeof value !== "string") throw invalidArgument("Worksheet.tabColor");
      page.tabColor = value;
    },
  },
  open: {
    names: (sheet, _given, { book }) => opened("NamedItemCollection", { book, sheet }),
    charts: (sheet) => opened("ChartCollection", sheet),
    tables: (sheet, _given, { book }) => opened("TableCollection", { book, sheet }),
    protection: (sheet) => opened("WorksheetProtection", sheet),
    freezePanes: (sheet) => opened("WorksheetFreezePanes", sheet),
    pageLayout: (sheet) => opened("PageLayout", sheet),
    getRange: (sheet, given, { book }) => opened("Range", placeOn(book, sheet, given.optionalText(0))),
    getRangeByIndexes: (sheet, given) => part(sheet, given.integer(0), given.integer(1), given.integer(2, 1), given.integer(3, 1)),
    getCell: (sheet, given) => part(sheet, given.integer(0), given.integer(1), 1, 1),
    getUsedRange: (sheet, given) => used(sheet, given.truth(0, false)) ?? part(sheet, 0, 0, 1, 1),
    getUsedRangeOrNullObject: (sheet, given) => used(sheet, given.truth(0, false)),
  },
  call: {
    activate: (sheet, _given, { book }) => book.activate(sheet),
    delete: (sheet, _given, { book }) => book.deleteSheet(sheet),
    calculate: (sheet, given, { calculator }) => calculator.againOn(sheet, given.truth(0, false)),
    ...registering("Worksheet"),
  },
};

function found(book: WorkbookModel, key: unknown): Opened | null {
  const sheet = typeof key === "string" ? book.findSheet(key) : undefined;
  return sheet === undefined ? null : opened("Worksheet", sheet);
}

function missing(key: unknown): never {
  throw itemNotFound(`the sheet ${String(key)}`);
}

function seen(sheets: readonly SheetModel[], visibleOnly: boolean): readonly SheetModel[] {
  return visibleOnly ? sheets.filter(({ visibility }) => visibility === "Visible") : sheets;
}

function used(sheet: SheetModel, valuesOnly: boolean): Opened | null {
  const area = sheet.used(valuesOnly);
  return area === undefined ? null : opened("Range", { sheet, area });
}
