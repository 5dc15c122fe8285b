import { METHODS } from "../inputs/index.js";
import type { ResultTable } from "./result-table.js";

/** The kinds of investigation with the errors of their readings, one row each, as the site block's Method takes them. */
export function methodTable(): ResultTable {
  return {
    title: "Kinds of investigation",
    columns: [
      { label: "Method", unit: "" },
      { label: "Reading COV", unit: "ratio" },
      { label: "Hole COV", unit: "ratio" },
      { label: "Method COV", unit: "ratio" },
      { label: "Reading spacing", unit: "m" },
      { label: "Source", unit: "" },
    ],
    rows: METHODS.map((method) => [method.name, method.readingCov, method.holeCov, method.methodCov, method.readingSpacing, method.source]),
    notes: ["Each value may be replaced in the site block by one of your own."],
  };
}
