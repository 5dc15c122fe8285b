import { misused } from "./failure.js";

/** What the formula line is asked to do. */
export interface Call {
  readonly formula: string | undefined;
  readonly book: string | undefined;
  readonly sheet: string | undefined;
  readonly out: string | undefined;
  readonly overwrite: boolean;
}

/** How the formula line is called. */
export const USAGE = `Calculates a formula, or a whole workbook, without a spreadsheet program.

  npm run --silent formula -- '=PROBE.TOTALCOST(Site, 4)'
  npm run --silent formula -- '=SUM(Bid!E9:E14)' --book bid.xlsx
  npm run --silent formula -- --book bid.xlsx --out bid-priced.xlsx

  --book FILE    an xlsx or xlsm workbook, or a csv with a site block (named Site); without it the demonstration workbook
  --sheet NAME   the sheet on which the formula counts as standing; without it the one that the workbook opens with
  --out FILE     calculates every formula of the workbook and writes a copy of the file with the values
  --overwrite    lets --out replace a file that is there

Prints the value, a table as rows parted by tabs. Exit code 0; 1 where a value is an error or the workbook cannot be read,
with the reason on standard error; 2 for a call that cannot be carried out as given.
`;

const WITH_VALUE = ["--book", "--sheet", "--out"] as const;

/**
 * Reads the words after the command.
 *
 * @returns "help" where that was asked for
 * @throws {FormulaLineError} for a call that says something twice, something unknown or too little
 */
export function readCall(words: readonly string[]): Call | "help" {
  const values = new Map<string, string>();
  let formula: string | undefined;
  let overwrite = false;
  for (let k = 0; k < words.length; k++) {
    const word = words[k] ?? "";
    if (word === "--help" || word === "-h") return "help";
    if (word === "--overwrite") overwrite = true;
    else if (word.startsWith("--")) {
      const [name, joined] = parted(word);
      if (!WITH_VALUE.some((known) => known === name)) throw misused(`The option ${name} is not known; the options are --book, --sheet, --out and --overwrite.`);
      if (values.has(name)) throw misused(`The option ${name} is given twice.`);
      const value = joined ?? words[++k];
      if (value === undefined || value === "") throw misused(`The option ${name} needs ${name === "--sheet" ? "the name of a sheet" : "a file"} after it.`);
      values.set(name, value);
    } else if (formula !== undefined) throw misused(`Two formulas are given, ${formula} and ${word}; put one formula between quotation marks.`);
    else formula = word;
  }
  if (formula !== undefined && !formula.trim().startsWith("=")) throw misused(`A formula starts with "=", and ${formula} does not; put it between quotation marks, such as '=PROBE.VERSION()'.`);
  const call = { formula, book: values.get("--book"), sheet: values.get("--sheet"), out: values.get("--out"), overwrite };
  if (formula === undefined && call.out === undefined) throw misused("Give a formula, such as '=PROBE.TOTALCOST(Site, 4)', or --book and --out to calculate a whole workbook; --help says more.");
  if (call.out !== undefined && call.book === undefined) throw misused("--out writes values back into a copy of a workbook; say which with --book.");
  if (overwrite && call.out === undefined) throw misused("--overwrite goes with --out.");
  return call;
}

function parted(word: string): [string, string | undefined] {
  const at = word.indexOf("=");
  return at < 0 ? [word, undefined] : [word.slice(0, at), word.slice(at + 1)];
}
