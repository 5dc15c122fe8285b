/** A cell as the worksheet may hand it over. */
export type Cell = string | number | boolean | null;

/**
 * A cell made plain: what is not a number, text or a truth value becomes the text of its error.
 *
 * @param cell  anything at all
 * @returns     a finite number, text, truth value, or null for nothing
 */
export function plainCell(cell: unknown): Cell {
  switch (typeof cell) {
    case "string":
    case "boolean":
      return cell;
    case "number":
      return Number.isFinite(cell) ? cell : "#NUM!";
    case "undefined":
      return null;
    case "object":
      return cell === null ? null : errorText(cell);
    default:
      return "#VALUE!";
  }
}

/**
 * Whether a cell holds nothing that can be told from nothing; 0 is asked for apart.
 *
 * @param cell  a plain cell
 * @returns     true for null and for text of spaces alone
 */
export function isEmpty(cell: Cell): boolean {
  return cell === null || (typeof cell === "string" && cell.trim() === "");
}

/**
 * Whether a cell may be blank: on some machines a blank cell arrives as 0.
 *
 * @param cell  a plain cell
 * @returns     true for nothing and for 0
 */
export function isBlankOrZero(cell: Cell): boolean {
  return cell === 0 || isEmpty(cell);
}

/**
 * Whether a cell holds an error value.
 *
 * @param cell  a plain cell
 * @returns     true for "#N/A", "#DIV/0!" and their like
 */
export function isError(cell: Cell): boolean {
  return typeof cell === "string" && /^#(?:N\/A|GETTING_DATA|[A-Z][A-Z0-9_/]{0,20}[!?])$/.test(cell.trim());
}

/**
 * Whether a text would be a number if it were not text: "8", "8,5", "1 000", "60 %".
 *
 * @param text  the cell's text
 * @returns     true where a person sees a number
 */
export function looksLikeNumber(text: string): boolean {
  const clean = text.trim();
  return clean.length <= 40 && /^[+\-\u2212]?(?:\d+(?:[ \u00a0\u202f,.'\u2019]\d+)*|[.,]\d+)(?:e[+-]?\d+)?\s*%?$/i.test(clean);
}

/**
 * Text for a message: short, on one line, without control characters.
 *
 * @param cell  what was found
 * @returns     at most about 40 characters, in quotation marks where it is text
 */
export function found(cell: Cell): string {
  if (typeof cell === "number") return amount(cell);
  if (typeof cell === "boolean") return cell ? "TRUE" : "FALSE";
  if (cell === null) return "nothing";
  const clean = cell.slice(0, 200).replace(/[\p{C}\s]+/gu, " ").trim();
  return `"${clean.length > 40 ? `${[...clean].slice(0, 38).join("")}...` : clean}"`;
}

/**
 * A number for a message or a check row: at most six figures.
 *
 * @param value  finite
 * @returns      plain digits
 */
export function amount(value: number): string {
  return String(Number(value.toPrecision(6)));
}

/** Rich cells of errors carry their text under one of these names. */
function errorText(cell: object): string {
  for (const name of ["basicValue", "errorCode", "code"]) {
    const text = (cell as Record<string, unknown>)[name];
    if (typeof text === "string" && isError(text)) return text;
  }
  return "#VALUE!";
}
