import { invalidArgument, HostError } from "../host-error.js";
import { opened, type Kind } from "../kind.js";
import type { WorkbookModel } from "../model/workbook-model.js";
import type { AreasOf } from "../targets.js";
import { fullAddress } from "./places.js";

const MODES = ["Automatic", "AutomaticExceptTables", "Manual"];

/** The workbook: the root of all objects. */
export const workbookKind: Kind<WorkbookModel> = {
  open: {
    application: (book) => opened("Application", book),
    worksheets: (book) => opened("WorksheetCollection", book),
    names: (book) => opened("NamedItemCollection", { book, sheet: undefined }),
    tables: (book) => opened("TableCollection", { book, sheet: undefined }),
    protection: (book) => opened("WorkbookProtection", book),
    getSelectedRange: ({ selection }) => {
      if (selection.areas.length !== 1) throw new HostError("InvalidSelection", "The current selection is invalid for this operation.");
      return opened("Range", { sheet: selection.sheet, area: selection.areas[0]! });
    },
    getSelectedRanges: ({ selection }) => {
      if (selection.areas.length === 0) throw new HostError("InvalidSelection", "The current selection is invalid for this operation.");
      return opened("RangeAreas", selection);
    },
    getActiveCell: ({ selection }) => {
      const first = selection.areas[0];
      if (first === undefined) throw new HostError("InvalidSelection", "The current selection is invalid for this operation.");
      return opened("Range", { sheet: selection.sheet, area: { ...first, bottom: first.top, right: first.left } });
    },
  },
  call: {
    _RemoveReference: (_book, given, { references }) => references.release(given.text(0)),
  },
};

/** Excel itself. */
export const applicationKind: Kind<WorkbookModel> = {
  get: { calculationMode: ({ calculationMode }) => calculationMode, calculationState: (_book, { calculator }) => calculator.state },
  set: {
    calculationMode: (book, value) => {
      if (!MODES.includes(String(value))) throw invalidArgument(`Application.calculationMode ${JSON.stringify(value)}`);
      book.calculationMode = String(value);
    },
  },
  call: {
    calculate: (_book, given, { calculator }) => {
      const type = given.choice(0, ["Recalculate", "Full", "FullRebuild"], "");
      if (type === "Recalculate") calculator.bringUpToDate(true);
      else calculator.everythingAgain();
    },
  },
};

/** Protection of the workbook's structure. */
export const workbookProtectionKind: Kind<WorkbookModel> = {
  get: { protected: ({ isStructureProtected }) => isStructureProtected },
  call: {
    protect: (book, given) => {
      given.any(0);
      book.isStructureProtected = true;
    },
    unprotect: (book, given) => {
      given.any(0);
      book.isStructureProtected = false;
    },
  },
};

/** Several rectangles, such as a selection made with the control key. */
export const rangeAreasKind: Kind<AreasOf> = {
  get: {
    address: ({ sheet, areas }) => areas.map((area) => fullAddress({ sheet, area })).join(","),
    areaCount: ({ areas }) => areas.length,
  },
  open: { areas: (areas) => opened("RangeCollection", areas), worksheet: ({ sheet }) => opened("Worksheet", sheet) },
};

/** The rectangles one by one. */
export const rangeCollectionKind: Kind<AreasOf> = {
  items: ({ sheet, areas }) => areas.map((area) => opened("Range", { sheet, area })),
  open: {
    getItemAt: ({ sheet, areas }, given) => {
      const area = areas[given.integer(0)];
      if (area === undefined) throw invalidArgument("RangeCollection.getItemAt");
      return opened("Range", { sheet, area });
    },
  },
  call: { getCount: ({ areas }) => areas.length },
};
