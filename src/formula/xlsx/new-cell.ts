import { areaAddress, cellAddress, type Area } from "../addresses.js";
import type { CellValue } from "../cell-value.js";
import { SPILLING } from "./cell-metadata.js";
import { inlineXml, typeAttribute, valueXml } from "./cell-xml.js";
import { storedFormula, type Namespace } from "./stored-formula.js";
import { escaped } from "./xml.js";

/** A cell of a new sheet. */
export interface WrittenCell {
  readonly row: number;
  readonly column: number;
  /** a formula's is what it gave when the file was made */
  readonly value: CellValue;
  /** with or without "=" */
  readonly formula?: string;
  /** the cells that the formula's table fills; absent: its own alone */
  readonly area?: Area;
  /** number of its look; undefined for the usual one */
  readonly style: number | undefined;
}

/**
 * The XML of a cell of a new sheet.
 *
 * @param namespace  of the add-in that calculates our functions
 */
export function writtenCell({ row, column, value, formula, area, style }: WrittenCell, namespace: Namespace): string {
  const address = cellAddress(row, column);
  const look = style === undefined ? "" : ` s="${style}"`;
  if (formula === undefined) {
    if (value === null) return `<c r="${address}"${look}/>`;
    if (typeof value === "string") return `<c r="${address}"${look} t="inlineStr">${inlineXml(value)}</c>`;
    return `<c r="${address}"${look}${typeAttribute(value)}>${valueXml("", value)}</c>`;
  }
  const { text, isOurs } = storedFormula(formula, namespace);
  const spills = isOurs || (area !== undefined && (area.bottom > area.top || area.right > area.left));
  const kind = spills ? ` t="array" ref="${area === undefined ? address : areaAddress(area)}"` : "";
  return `<c r="${address}"${look}${typeAttribute(value)}${spills ? ` cm="${SPILLING}"` : ""}><f${kind}>${escaped(text)}</f>${valueXml("", value)}</c>`;
}
