import { accessDenied, invalidArgument, notModelled } from "../host-error.js";
import { opened, type Kind } from "../kind.js";
import type { SheetModel } from "../model/sheet-model.js";
import { placeOn } from "./places.js";
import { checked, type Wanted } from "./properties.js";

/** Protection of one sheet. */
export const worksheetProtectionKind: Kind<SheetModel> = {
  get: { protected: ({ protection }) => protection !== undefined },
  call: {
    protect: (sheet, given) => {
      const options = (given.any(0) ?? {}) as Record<string, unknown>;
      for (const key of Object.keys(options)) if (key !== "allowFormatCells" && key !== "allowEditObjects") throw notModelled(`the option ${key} of a sheet's protection`);
      if (sheet.protection !== undefined) throw accessDenied(`${sheet.name} is protected already`);
      sheet.protection = options;
    },
    unprotect: (sheet) => {
      if (sheet.protection === undefined) throw accessDenied(`${sheet.name} is not protected`);
      sheet.protection = undefined;
    },
  },
};

/** Rows and columns that stay in view. */
export const freezePanesKind: Kind<SheetModel> = {
  open: { getLocationOrNullObject: (sheet) => (sheet.frozen === undefined ? null : opened("Range", { sheet, area: sheet.frozen })) },
  call: {
    freezeRows: (sheet, given) => {
      sheet.frozen = { top: 0, left: 0, bottom: given.integer(0, 1) - 1, right: 16_383 };
    },
    freezeColumns: (sheet, given) => {
      sheet.frozen = { top: 0, left: 0, bottom: 1_048_575, right: given.integer(0, 1) - 1 };
    },
    unfreeze: (sheet) => {
      sheet.frozen = undefined;
    },
  },
};

const PAGE: Readonly<Record<string, Wanted>> = {
  orientation: ["Portrait", "Landscape"],
  centerHorizontally: "boolean",
  centerVertically: "boolean",
  printGridlines: "boolean",
  leftMargin: "number",
  rightMargin: "number",
  topMargin: "number",
  bottomMargin: "number",
  paperSize: ["A4", "Letter", "A3"],
};

/** How the sheet is printed. */
export const pageLayoutKind: Kind<SheetModel> = {
  get: { ...Object.fromEntries(Object.keys(PAGE).map((name) => [name, ({ page }: SheetModel) => page[name] ?? null])), zoom: ({ page }) => page.zoom ?? { scale: 100 } },
  set: {
    ...Object.fromEntries(
      Object.entries(PAGE).map(([name, wanted]) => [
        name,
        ({ page }: SheetModel, value: unknown) => {
          page[name] = checked(`PageLayout.${name}`, wanted, value);
        },
      ]),
    ),
    zoom: ({ page }, value) => {
      const { scale, horizontalFitToPages, verticalFitToPages, ...others } = (value ?? {}) as Record<string, unknown>;
      if (Object.keys(others).length > 0) throw notModelled(`PageLayout.zoom ${Object.keys(others).join(", ")}`);
      if (scale !== undefined && scale !== null && (typeof scale !== "number" || scale < 10 || scale > 400)) throw invalidArgument("PageLayout.zoom.scale");
      for (const pages of [horizontalFitToPages, verticalFitToPages]) if (pages !== undefined && pages !== null && (!Number.isInteger(pages) || Number(pages) < 1)) throw invalidArgument("PageLayout.zoom");
      page.zoom = value;
    },
  },
  open: { getPrintAreaOrNullObject: (sheet) => (sheet.printArea === undefined ? null : opened("Range", { sheet, area: sheet.printArea })) },
  call: {
    setPrintArea: (sheet, given, { book }) => {
      const range = given.object(0, "Range") ?? placeOn(book, sheet, given.text(0));
      if (range.sheet !== sheet) throw invalidArgument("the print area is on another sheet");
      sheet.printArea = range.area;
    },
  },
};
