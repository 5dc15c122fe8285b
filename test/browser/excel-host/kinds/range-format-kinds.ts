import { COLUMNS, ROWS } from "../../../../src/formula/addresses.js";
import { invalidArgument, notModelled } from "../host-error.js";
import { opened, type Kind, type Opened } from "../kind.js";
import type { Place } from "../model/chart-model.js";
import type { Targets } from "../targets.js";
import { looks, paint, refuseLook, type Look } from "./looks.js";

const USUAL_WIDTH = 48;
const USUAL_HEIGHT = 15;
const LARGEST = { columns: 1_790, rows: 409.5 } as const;
const EDGES: readonly string[] = ["EdgeTop", "EdgeBottom", "EdgeLeft", "EdgeRight", "InsideVertical", "InsideHorizontal", "DiagonalDown", "DiagonalUp"];

const FONT: Readonly<Record<string, Look>> = {
  bold: ["boolean", false],
  italic: ["boolean", false],
  color: ["colour", "#000000"],
  name: ["text", "Calibri"],
  size: ["number", 11],
  strikethrough: ["boolean", false],
  underline: [["None", "Single", "Double", "SingleAccountant", "DoubleAccountant"], "None"],
};
const FORMAT: Readonly<Record<string, Look>> = {
  horizontalAlignment: [["General", "Left", "Center", "Right", "Fill", "Justify", "CenterAcrossSelection", "Distributed"], "General"],
  verticalAlignment: [["Top", "Center", "Bottom", "Justify", "Distributed"], "Bottom"],
  wrapText: ["boolean", false],
  indentLevel: ["number", 0],
  shrinkToFit: ["boolean", false],
};
const BORDER: Readonly<Record<string, Look>> = {
  style: [["None", "Continuous", "Dash", "DashDot", "DashDotDot", "Dot", "Double", "SlantDashDot"], "None"],
  weight: [["Hairline", "Thin", "Medium", "Thick"], "Thin"],
  color: ["colour", "#000000"],
};
const itself = (place: Place): Place => place;

/** Type. */
export const rangeFontKind: Kind<Place> = looks("RangeFont", itself, () => "font/", FONT);

/** Colour behind. */
export const rangeFillKind: Kind<Place> = {
  ...looks("RangeFill", itself, () => "fill/", { color: ["colour", "#FFFFFF"] }),
  call: { clear: (place) => paint(place, "fill/color", undefined) },
};

/** What a protected sheet keeps from being changed. */
export const formatProtectionKind: Kind<Place> = looks("FormatProtection", itself, () => "protection/", { locked: ["boolean", true], formulaHidden: ["boolean", false] });

/** A line at one side of each cell, or of the range. */
export const rangeBorderKind: Kind<Targets["RangeBorder"]> = {
  id: ({ edge }) => edge,
  ...looks<Targets["RangeBorder"]>("RangeBorder", ({ place }) => place, ({ edge }) => `borders/${edge}/`, BORDER),
};

/** The lines of a range. */
export const rangeBordersKind: Kind<Place> = {
  item: (place, edge) => border(place, edge),
  open: { getItem: (place, given) => border(place, given.text(0)) },
};

const painted = looks("RangeFormat", itself, () => "", FORMAT);

/** How the cells of a range look. */
export const rangeFormatKind: Kind<Place> = {
  get: { ...painted.get, columnWidth: (place) => size(place, "columns"), rowHeight: (place) => size(place, "rows") },
  set: { ...painted.set, columnWidth: (place, value) => resize(place, "columns", value), rowHeight: (place, value) => resize(place, "rows", value) },
  open: {
    font: (place) => opened("RangeFont", place),
    fill: (place) => opened("RangeFill", place),
    protection: (place) => opened("FormatProtection", place),
    borders: (place) => opened("RangeBorderCollection", place),
  },
};

function border(place: Place, key: unknown): Opened {
  const edge = EDGES.find((each) => each === key);
  if (edge === undefined) throw invalidArgument(`the border ${JSON.stringify(key)}`);
  return opened("RangeBorder", { place, edge });
}

function span({ sheet, area }: Place, what: "columns" | "rows"): { from: number; to: number; sizes: Map<number, number>; usual: number; all: number } {
  return what === "columns"
    ? { from: area.left, to: area.right, sizes: sheet.columnWidths, usual: USUAL_WIDTH, all: COLUMNS }
    : { from: area.top, to: area.bottom, sizes: sheet.rowHeights, usual: USUAL_HEIGHT, all: ROWS };
}

function size(place: Place, what: "columns" | "rows"): number | null {
  const { from, to, sizes, usual } = span(place, what);
  const first = sizes.get(from) ?? usual;
  const others = [...sizes].filter(([k]) => k > from && k <= to);
  const isUniform = others.every(([, each]) => each === first) && (first === usual || others.length === to - from);
  return isUniform ? first : null;
}

function resize(place: Place, what: "columns" | "rows", value: unknown): void {
  refuseLook(place);
  if (typeof value !== "number" || !(value >= 0) || value > LARGEST[what]) throw invalidArgument(`a ${what === "columns" ? "width" : "height"} of ${JSON.stringify(value)}`);
  const { from, to, sizes, all } = span(place, what);
  if (to - from + 1 === all) throw notModelled(`one size for all ${what}`);
  for (let k = from; k <= to; k++) sizes.set(k, value);
}
