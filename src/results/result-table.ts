/** One column of a result: what it holds and in which unit. */
export interface ResultColumn {
  readonly label: string;
  /** as it is written behind the label; "" where the label says it all, or the money is nobody's in particular */
  readonly unit: string;
}

/** A result as plain data: the one form behind the cells, the terminal and the pane. */
export interface ResultTable {
  readonly title: string;
  readonly columns: readonly ResultColumn[];
  /** one value a column, not rounded */
  readonly rows: readonly (readonly (string | number)[])[];
  /** sentences that belong under the table */
  readonly notes: readonly string[];
}

/** The column's head line: "Carbon (kg CO2e)". */
function columnHead(column: ResultColumn): string {
  return column.unit === "" ? column.label : `${column.label} (${column.unit})`;
}

/** The table as a range of cells: the head line, then the rows. */
export function tableCells(table: ResultTable): (string | number)[][] {
  return [table.columns.map(columnHead), ...table.rows.map((row) => [...row])];
}
