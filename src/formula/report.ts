import { cellAddress } from "./addresses.js";
import type { Book } from "./book.js";
import { ErrorValue } from "./cell-value.js";
import type { Calculated } from "./xlsx/write-values.js";

const FIRST = 20;

/**
 * What a calculation of the whole workbook came to: a line for each sheet, then the reasons.
 *
 * @param calculated  the formulas of each sheet
 * @param changed     how many of them show something else than the file held
 */
export function report(book: Book, calculated: readonly (readonly Calculated[])[], changed: readonly number[]): string {
  const rows = book.sheets.map(({ name }, sheet) => {
    const formulas = calculated[sheet] ?? [];
    const kept = formulas.filter(({ outcome }) => outcome.isKept).length;
    return [name, formulas.length, formulas.length - kept, changed[sheet] ?? 0, formulas.filter(isError).length, kept];
  });
  const all = calculated.flatMap((formulas, sheet) => formulas.map((entry) => ({ ...entry, place: `${book.sheets[sheet]?.name ?? ""}!${cellAddress(entry.cell.row, entry.cell.column)}` })));
  const errors = all.filter(isError).map(({ place, outcome }) => `${place}\t${errorCode(outcome.values)}\t${inOneLine(whyOf(outcome))}`);
  const kept = all.filter(({ outcome }) => outcome.isKept).map(({ place, outcome }) => `${place}\t${inOneLine(outcome.reason ?? "")}`);
  const changing = all.filter(({ outcome }) => outcome.isChanging).map(({ place }) => place);
  return [
    "Sheet\tFormulas\tCalculated\tChanged\tErrors\tKept",
    ...rows.map((row) => row.join("\t")),
    ...section("Errors", errors),
    ...section("Kept as stored, because they cannot be calculated here", kept),
    ...(changing.length === 0 ? [] : ["", `Another value at each calculation (time or chance): ${changing.slice(0, FIRST).join(", ")}${changing.length > FIRST ? ", ..." : ""}`]),
    "",
  ].join("\n");
}

/** True for a formula whose value, or a value of whose table, is an error. */
export function isError({ outcome }: Pick<Calculated, "outcome">): boolean {
  return outcome.values.some((row) => row.some((value) => value instanceof ErrorValue));
}

/** The first error value among values. */
export function errorCode(values: Calculated["outcome"]["values"]): string {
  const found = values.flat().find((value) => value instanceof ErrorValue);
  return found instanceof ErrorValue ? found.code : "";
}

/** The reason of an error, with the cell in which it began. */
export function whyOf({ reason, source }: Calculated["outcome"]): string {
  return source === undefined ? (reason ?? "") : `${source}: ${reason ?? ""}`;
}

function section(title: string, lines: readonly string[]): string[] {
  if (lines.length === 0) return [];
  const more = lines.length > FIRST ? [`and ${lines.length - FIRST} more`] : [];
  return ["", `${title}:`, ...lines.slice(0, FIRST), ...more];
}

function inOneLine(text: string): string {
  return text.replace(/[\t\r\n]+/g, " ");
}
