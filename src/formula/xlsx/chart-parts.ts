import type { SheetPlan } from "../../host/workbook.js";
import { COLUMNS } from "../addresses.js";
import { chartXml } from "./chart-xml.js";
import { drawingXml } from "./drawing-xml.js";
import { relationsPart } from "./relations.js";
import { writtenCells, type SheetSurroundings } from "./sheet-xml.js";

/** A part of a workbook as it is written. */
export interface WrittenPart {
  readonly name: string;
  readonly xml: string;
  /** its kind of content; "" for relations, whose ending says it */
  readonly content: string;
}

const OFFICE = "http://schemas.openxmlformats.org/officeDocument/2006/relationships";
const PACKAGE = "http://schemas.openxmlformats.org/package/2006";
const TYPE = "application/vnd.openxmlformats-officedocument";

/** The relation of a sheet to the part that draws its charts. */
export const DRAWING_RELATION = "rId1";

/**
 * The parts that draw a sheet's charts, with their relations.
 *
 * @param plan   the sheet
 * @param sheet  the name under which it stands in the workbook
 * @param part   its own part
 * @param own    what gives its cells their values
 * @param free   a name for a part that begins so; a new one at each call
 * @returns      none where the plan has no chart
 */
export function chartParts(plan: SheetPlan, sheet: string, part: string, own: Pick<SheetSurroundings, "styleOf" | "valuesOf">, free: (beginning: string) => string): WrittenPart[] {
  const { charts = [] } = plan;
  if (charts.length === 0) return [];
  const values = new Map(writtenCells(plan, own).map(({ row, column, value }) => [row * COLUMNS + column, value]));
  const drawing = free("xl/drawings/drawing");
  const drawn = charts.map((chart): WrittenPart => ({ name: free("xl/charts/chart"), xml: chartXml(chart, sheet, (row, column) => values.get(row * COLUMNS + column) ?? null), content: `${TYPE}.drawingml.chart+xml` }));
  return [
    relationsOf(part, [relation(DRAWING_RELATION, "drawing", `/${drawing}`)]),
    { name: drawing, xml: drawingXml(charts, (chart) => `rId${chart + 1}`), content: `${TYPE}.drawing+xml` },
    relationsOf(drawing, drawn.map(({ name }, k) => relation(`rId${k + 1}`, "chart", `/${name}`))),
    ...drawn,
  ];
}

/** One relation of a part to another. */
export function relation(id: string, kind: string, target: string): string {
  return `<Relationship Id="${id}" Type="${OFFICE}/${kind}" Target="${target}"/>`;
}

/** The part that holds the relations of a part; "" for those of the package. */
export function relationsOf(part: string, relations: readonly string[]): WrittenPart {
  return { name: relationsPart(part), xml: `<?xml version="1.0" encoding="UTF-8" standalone="yes"?>\n<Relationships xmlns="${PACKAGE}/relationships">${relations.join("")}</Relationships>`, content: "" };
}
