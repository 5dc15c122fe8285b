import type { CellStyle, NumberLook } from "../../host/workbook.js";
import type { CellLook } from "./added-styles.js";

const MAIN = "http://schemas.openxmlformats.org/spreadsheetml/2006/main";
const INK = "FF0B4A53";
const WASH = "FFE2EEEC";

/** The first number that the format leaves to each workbook. */
const FIRST_FORMAT = 164;

const FORMATS: Readonly<Record<NumberLook, string>> = { money: "#,##0", ratio: "0.00", metres: "0.0", percent: "0.0%" };
const LOOKS = Object.keys(FORMATS) as NumberLook[];

// within a font the format wants bold, italic, size, colour, name, family in this order
const FONTS = [
  '<font><sz val="11"/><name val="Calibri"/><family val="2"/></font>',
  `<font><b/><sz val="15"/><color rgb="${INK}"/><name val="Calibri"/><family val="2"/></font>`,
  `<font><b/><sz val="11"/><color rgb="${INK}"/><name val="Calibri"/><family val="2"/></font>`,
  '<font><b/><sz val="11"/><name val="Calibri"/><family val="2"/></font>',
  '<font><sz val="11"/><color rgb="FF1C3F9E"/><name val="Calibri"/><family val="2"/></font>',
  '<font><sz val="10"/><color rgb="FF5C6670"/><name val="Calibri"/><family val="2"/></font>',
] as const;

// the first two are the format's own
const FILLS = ['<patternFill patternType="none"/>', '<patternFill patternType="gray125"/>', ...[WASH, "FFFFF6D6", "FFF0F5EF"].map((colour) => `<patternFill patternType="solid"><fgColor rgb="${colour}"/><bgColor indexed="64"/></patternFill>`)];

const RULE = '<color rgb="FFC8CCD2"/>';
const BORDERS = [
  "<left/><right/><top/><bottom/><diagonal/>",
  ["left", "right", "top", "bottom"].map((side) => `<${side} style="thin">${RULE}</${side}>`).join("") + "<diagonal/>",
  `<left/><right/><top/><bottom style="thin"><color rgb="${INK}"/></bottom><diagonal/>`,
];

interface Form {
  readonly font: number;
  readonly fill?: number;
  readonly border?: number;
  readonly alignment?: string;
  /** stays open for writing when a person protects the sheet */
  readonly isOpen?: boolean;
}

const USUAL: Form = { font: 0 };
const FORM: Readonly<Record<CellStyle, Form>> = {
  title: { font: 1, alignment: 'vertical="center"' },
  section: { font: 2, fill: 2 },
  label: USUAL,
  input: { font: 4, fill: 3, border: 1, isOpen: true },
  result: { font: 0, fill: 4, border: 1 },
  note: { font: 5 },
  head: { font: 3, fill: 2, border: 2 },
  numberhead: { font: 3, fill: 2, border: 2, alignment: 'horizontal="right"' },
};

/**
 * The styles part of a new workbook.
 *
 * @param looks  those that its cells have; the number of each is its place in the list plus 1, as 0 is the usual look
 */
export function workbookStyles(looks: readonly CellLook[]): string {
  const list = (name: string, items: readonly string[]): string => `<${name} count="${items.length}">${items.join("")}</${name}>`;
  const plain = '<xf numFmtId="0" fontId="0" fillId="0" borderId="0" xfId="0"/>';
  return `<?xml version="1.0" encoding="UTF-8" standalone="yes"?>
<styleSheet xmlns="${MAIN}">${list("numFmts", LOOKS.map((look, k) => `<numFmt numFmtId="${FIRST_FORMAT + k}" formatCode="${FORMATS[look]}"/>`))}${list("fonts", FONTS)}${list("fills", FILLS.map((fill) => `<fill>${fill}</fill>`))}${list("borders", BORDERS.map((border) => `<border>${border}</border>`))}${list("cellStyleXfs", [plain.replace(' xfId="0"', "")])}${list("cellXfs", [plain, ...looks.map(styled)])}${list("cellStyles", ['<cellStyle name="Normal" xfId="0" builtinId="0"/>'])}</styleSheet>`;
}

function styled({ style, look }: CellLook): string {
  const { font, fill = 0, border = 0, alignment, isOpen } = style === undefined ? USUAL : FORM[style];
  const format = look === undefined ? 0 : FIRST_FORMAT + LOOKS.indexOf(look);
  const marks = [["NumberFormat", format > 0], ["Font", font > 0], ["Fill", fill > 0], ["Border", border > 0], ["Alignment", alignment !== undefined], ["Protection", isOpen === true]] as const;
  const applied = marks.filter(([, is]) => is).map(([what]) => ` apply${what}="1"`).join("");
  const children = `${alignment === undefined ? "" : `<alignment ${alignment}/>`}${isOpen === true ? '<protection locked="0"/>' : ""}`;
  const head = `<xf numFmtId="${format}" fontId="${font}" fillId="${fill}" borderId="${border}" xfId="0"${applied}`;
  return children === "" ? `${head}/>` : `${head}>${children}</xf>`;
}
