import { accessDenied, invalidArgument, itemAlreadyExists, itemNotFound } from "../host-error.js";
import { opened, type Kind, type Opened } from "../kind.js";
import { isName } from "../model/name-model.js";
import type { TableModel } from "../model/table-model.js";
import type { Targets } from "../targets.js";
import { placeOn } from "./places.js";

type TablesOf = Targets["TableCollection"];

/** The tables of the workbook or of one sheet. */
export const tablesKind: Kind<TablesOf> = {
  items: (tables) => list(tables).map((table) => opened("Table", table)),
  item: (tables, key) => found(tables, key) ?? missing(key),
  open: {
    getItem: (tables, given) => found(tables, given.text(0)) ?? missing(given.text(0)),
    getItemOrNullObject: (tables, given) => found(tables, given.text(0)),
    add: ({ book, sheet }, given) => {
      const range = given.object(0, "Range") ?? placeOn(book, sheet ?? book.active, given.text(0));
      const on = range.sheet;
      if (sheet !== undefined && on !== sheet) throw invalidArgument("the table's range is on another sheet");
      if (on.protection !== undefined) throw accessDenied(`${on.name} is protected`);
      const { area } = range;
      if (on.tables.some(({ area: each }) => each.top <= area.bottom && area.top <= each.bottom && each.left <= area.right && area.left <= each.right)) throw invalidArgument("a table cannot overlap another table");
      const made = all(book).length + 1;
      const table: TableModel = { id: `{table-${made}}`, name: `Table${made}`, sheet: on, area, hasHeaders: given.truth(1, false), style: "TableStyleMedium2" };
      on.tables.push(table);
      return opened("Table", table);
    },
  },
  call: { getCount: (tables) => list(tables).length },
};

/** One table. */
export const tableKind: Kind<TableModel> = {
  id: ({ id }) => id,
  get: { id: ({ id }) => id, name: ({ name }) => name, style: ({ style }) => style, showHeaders: ({ hasHeaders }) => hasHeaders },
  set: {
    name: (table, value, { book }) => {
      if (typeof value !== "string" || !isName(value)) throw invalidArgument(`Table.name ${JSON.stringify(value)}`);
      const isTaken = [...all(book), ...book.names].some((each) => each !== table && each.name.toLowerCase() === value.toLowerCase());
      if (isTaken) throw itemAlreadyExists(value);
      table.name = value;
    },
    style: (table, value) => {
      if (typeof value !== "string" || !/^TableStyle(?:Light|Medium|Dark)\d{1,2}$/.test(value)) throw invalidArgument(`Table.style ${JSON.stringify(value)}`);
      table.style = value;
    },
  },
  open: { getRange: ({ sheet, area }) => opened("Range", { sheet, area }), worksheet: ({ sheet }) => opened("Worksheet", sheet) },
};

function all(book: TablesOf["book"]): readonly TableModel[] {
  return book.sheets.flatMap(({ tables }) => tables);
}

function list({ book, sheet }: TablesOf): readonly TableModel[] {
  return sheet?.tables ?? all(book);
}

function found(tables: TablesOf, key: unknown): Opened | null {
  const table = list(tables).find(({ id, name }) => typeof key === "string" && (id === key || name.toLowerCase() === key.toLowerCase()));
  return table === undefined ? null : opened("Table", table);
}

function missing(key: unknown): never {
  throw itemNotFound(`the table ${String(key)}`);
}
