import { readReference } from "../../../../src/formula/addresses.js";
import { invalidArgument, itemNotFound } from "../host-error.js";
import { opened, type Kind, type Opened } from "../kind.js";
import type { NameModel } from "../model/name-model.js";
import type { WorkbookModel } from "../model/workbook-model.js";
import type { NamesOf } from "../targets.js";
import { fixedFormula } from "./places.js";

/** One name. */
export const nameKind: Kind<NameModel> = {
  id: ({ name }) => name,
  get: {
    name: ({ name }) => name,
    // the formula follows a sheet that is renamed
    value: (name) => (name.range === undefined ? name.formula : fixedFormula(name.range)),
    formula: (name) => (name.range === undefined ? name.formula : fixedFormula(name.range)),
    type: ({ range, formula }) => (range !== undefined ? "Range" : formula === "=#REF!" ? "Error" : /^="/.test(formula) ? "String" : /^=[-+\d.]+$/.test(formula) ? "Double" : "String"),
    scope: ({ sheet }) => (sheet === undefined ? "Workbook" : "Worksheet"),
    visible: ({ visible }) => visible,
    comment: ({ comment }) => comment,
  },
  set: {
    visible: (name, value) => {
      if (typeof value !== "boolean") throw invalidArgument("NamedItem.visible");
      name.visible = value;
    },
  },
  open: {
    getRange: (name) => rangeOf(name) ?? fail(name),
    getRangeOrNullObject: (name) => rangeOf(name),
    worksheetOrNullObject: ({ sheet }) => (sheet === undefined ? null : opened("Worksheet", sheet)),
  },
  call: { delete: (name, _given, host) => host.book.deleteName(name) },
};

/** A collection of names. */
export const namesKind: Kind<NamesOf> = {
  items: (names) => list(names).map((name) => opened("NamedItem", name)),
  item: (names, key) => found(names, key) ?? missing(key),
  open: {
    getItem: (names, given) => found(names, given.text(0)) ?? missing(given.text(0)),
    getItemOrNullObject: (names, given) => found(names, given.text(0)),
    add: (names, given, { book }) => {
      const name = given.text(0);
      const range = given.object(1, "Range");
      const comment = given.optionalText(2);
      if (range !== undefined) return opened("NamedItem", book.addName(name, range, "", names.sheet, comment));
      const written = given.any(1);
      if (typeof written !== "string" && typeof written !== "number" && typeof written !== "boolean") throw invalidArgument(`the meaning of the name ${name}`);
      const formula = typeof written === "string" && written.startsWith("=") ? written : typeof written === "string" ? `="${written}"` : `=${String(written)}`;
      return opened("NamedItem", book.addName(name, rangeNamed(book, formula), formula, names.sheet, comment));
    },
  },
  call: { getCount: (names) => list(names).length },
};

function list({ book, sheet }: NamesOf): readonly NameModel[] {
  return sheet?.names ?? book.names;
}

function found(names: NamesOf, key: unknown): Opened | null {
  const name = list(names).find((each) => typeof key === "string" && each.name.toLowerCase() === key.toLowerCase());
  return name === undefined ? null : opened("NamedItem", name);
}

function missing(key: unknown): never {
  throw itemNotFound(`the name ${String(key)}`);
}

function rangeOf({ range }: NameModel): Opened | null {
  return range === undefined ? null : opened("Range", { sheet: range.sheet, area: range.area });
}

function fail({ name }: NameModel): never {
  throw invalidArgument(`the name ${name} stands for no range`);
}

function rangeNamed(book: WorkbookModel, formula: string): NameModel["range"] {
  const match = /^=(?:'((?:[^']|'')+)'|([^'!]+))!(\$?[A-Z]+\$?\d+(?::\$?[A-Z]+\$?\d+)?)$/i.exec(formula);
  const sheet = match === null ? undefined : book.findSheet((match[1] ?? match[2] ?? "").replaceAll("''", "'"));
  const area = match === null ? undefined : readReference(match[3] ?? "");
  return sheet === undefined || area === undefined ? undefined : { sheet, area };
}
