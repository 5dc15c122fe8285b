import type { CellValue } from "../../../src/host/workbook.js";

/** A defined name as a person gives it: "=Data!$A$1:$B$4". */
export interface StartingName {
  readonly name: string;
  readonly meaning: string;
}

/** What stands in the workbook before anybody asks it anything; rows of what is typed, "" for a blank cell. */
export const STARTING_SHEETS: readonly { readonly name: string; readonly rows: readonly (readonly CellValue[])[] }[] = [
  {
    name: "Data",
    rows: [
      ["Label", "Value"],
      ["depth", 1.5],
      ["", true],
      ["=1/0", "=B2*2"],
      ["", "", "", "far"],
    ],
  },
  { name: "It's other", rows: [["alone"]] },
];

export const STARTING_NAMES: readonly StartingName[] = [
  { name: "Block", meaning: "=Data!$A$1:$B$4" },
  { name: "wide", meaning: "=Data!$A:$B" },
  { name: "Alone", meaning: "='It''s other'!$A$1" },
  { name: "Several", meaning: "=Data!$A$1:$A$2,Data!$D$5" },
  { name: "Share", meaning: "=0.5" },
  { name: "Gone", meaning: "=#REF!" },
];
