import type { CellStyle, NumberLook } from "./workbook.js";

/** How numbers show; the sheet's own signs for thousands and decimals take the place of these. */
export const FORMATS: Readonly<Record<NumberLook, string>> = { money: "#,##0", ratio: "0.00", metres: "0.0", percent: "0.0%" };

const DEEP = "#0B4A53";
const PALE = "#E2EEEC";
const RULE = "#C8CCD2";
type Edge = "EdgeTop" | "EdgeBottom" | "EdgeLeft" | "EdgeRight" | "InsideHorizontal" | "InsideVertical";
const FRAME: readonly Edge[] = ["EdgeTop", "EdgeBottom", "EdgeLeft", "EdgeRight"];

interface Look {
  readonly font?: Partial<Pick<Excel.RangeFont, "bold" | "color" | "size">>;
  readonly fill?: string;
  readonly rules?: { readonly edges: readonly Edge[]; readonly colour: string };
  readonly align?: "Left" | "Right";
  /** points */
  readonly height?: number;
}

// The paper is white and so are most workbooks: the shades are pale, the words dark, and every purpose differs by more than its colour.
const LOOKS: Readonly<Record<CellStyle, Look>> = {
  title: { font: { bold: true, size: 15, color: DEEP }, height: 26 },
  section: { font: { bold: true, color: DEEP }, fill: PALE },
  label: {},
  input: { font: { color: "#1C3F9E" }, fill: "#FFF6D6", rules: { edges: FRAME, colour: RULE } },
  result: { fill: "#F0F5EF", rules: { edges: FRAME, colour: RULE } },
  note: { font: { color: "#5C6670", size: 10 } },
  head: { font: { bold: true }, fill: PALE, rules: { edges: ["EdgeBottom"], colour: DEEP } },
  numberhead: { font: { bold: true }, fill: PALE, rules: { edges: ["EdgeBottom"], colour: DEEP }, align: "Right" },
};

/**
 * Gives cells of one purpose their look. Only what differs from a plain cell is set, so that the person's own theme and font stay.
 *
 * @param range   the cells
 * @param isMany  whether there are lines between them, below and beside each other
 */
export function applyLook(range: Excel.Range, style: CellStyle | undefined, look: NumberLook | undefined, isMany: { readonly rows: boolean; readonly columns: boolean }): void {
  if (look !== undefined) (range as { numberFormat: unknown }).numberFormat = FORMATS[look];
  if (style === undefined) return;
  const { font, fill, rules, align, height } = LOOKS[style];
  if (font !== undefined) range.format.font.set(font);
  if (fill !== undefined) range.format.fill.color = fill;
  if (align !== undefined) range.format.horizontalAlignment = align;
  if (height !== undefined) range.format.rowHeight = height;
  if (rules === undefined) return;
  const between: Edge[] = rules.edges.length < FRAME.length ? [] : [...(isMany.rows ? (["InsideHorizontal"] as const) : []), ...(isMany.columns ? (["InsideVertical"] as const) : [])];
  for (const edge of [...rules.edges, ...between]) {
    const line = range.format.borders.getItem(edge);
    line.style = "Continuous";
    line.color = rules.colour;
  }
}
