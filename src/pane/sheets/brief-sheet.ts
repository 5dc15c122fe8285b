import { lengthPercentiles, type SimulationRow } from "../../engine/index.js";
import { areaAddress } from "../../host/addresses.js";
import { costPicture } from "../../host/simulation-pictures.js";
import type { PlannedCell, SheetPlan } from "../../host/workbook.js";
import { IS, IS_NOT, SMALL_SUMS } from "../../results/cautions.js";
import { resultIn, resultUnit } from "../../units/result-units.js";
import { tableStep } from "../model/conclusion.js";
import { countsInWords, holesInWords, sentenceCase, shorten, type NumberWriter } from "../model/numbers.js";
import { boundInWords, rowsOfWay } from "../model/ways.js";
import { inLines, rowOf, type Content } from "./cells.js";
import { stampTable } from "../../results/index.js";
import type { SimulationReport } from "./simulation-report.js";

const COLUMNS = 9;
/** Rows that the picture covers. */
const PICTURE_ROWS = 17;
/** Characters that fit across the printed page. */
const LINE = 108;
const MIDDLE = lengthPercentiles.indexOf(50);

/**
 * One printable page for the client: the answer in a paragraph, the picture, the table, what the figures are not, and the stamp. The name
 * CostByCount stands over the table's costs; the numbers of the picture stand right of the page.
 *
 * @param report   the run
 * @param variant  index of the way that is recommended
 * @param client   count that the client has in mind; undefined: none
 * @param writer   writes the numbers in the paragraph
 */
export function briefSheet(report: SimulationReport, variant: number, client: number | undefined, writer: NumberWriter): SheetPlan {
  const { run, table } = report;
  const { rows } = rowsOfWay(table, variant);
  const cells: PlannedCell[] = [...rowOf(0, [{ value: "How many holes before the piles are priced", style: "title" }])];
  let row = 2;
  const paragraph = (text: string, style: Content["style"]): void => {
    for (const line of inLines(text, LINE)) cells.push(...rowOf(row++, [{ value: line, style: style ?? "label" }]));
  };
  for (const warning of report.warnings) {
    for (const line of inLines(warning, LINE)) cells.push(...rowOf(row++, banner(line)));
  }
  paragraph(briefInWords(report, variant, client, writer), "label");
  row++;
  const picture = costPicture(rows, { row: 0, column: COLUMNS + 1 }, areaAddress({ top: row, left: 0, bottom: row + PICTURE_ROWS - 1, right: COLUMNS - 1 }), shorten(run.money, 12));
  row += PICTURE_ROWS;
  paragraph(picture.chart.words, "note");
  row++;
  const head = row++;
  const length = resultUnit("length", run.units);
  const inMoney = run.money === "" ? "" : ` (${shorten(run.money, 12)})`;
  const heads = ["Holes", "Investigation", "Foundation", "Failure", "Delay", `Total${inMoney}`, "Give or take", "Chance cheapest", `Mean pile (${length})`];
  cells.push(...rowOf(head, heads.map((value): Content => ({ value, style: "numberhead" }))));
  for (const each of rows) cells.push(...rowOf(row++, tableRow(each, run.units)));
  const data = `A${head + 1}:F${row}`;
  paragraph("Give or take is two standard errors. Chance cheapest is among the counts of this table, given the errors. Mean pile: half of all outcomes are shorter.", "note");
  row++;
  cells.push(...rowOf(row++, banner("What this is and is not")));
  for (const caution of [IS, IS_NOT, SMALL_SUMS]) paragraph(caution, "note");
  row++;
  cells.push(...rowOf(row++, banner("Stamp")));
  paragraph(`${[...stampTable(report.stamp).rows, ["Inputs read from", run.place]].map(([label, value]) => `${String(label)}: ${String(value)}`).join("; ")}.`, "note");
  return {
    name: "Client brief",
    cells: [...cells, ...picture.cells],
    names: [{ name: "CostByCount", range: data }],
    columnWidths: [60, 112, 98, 84, 76, 112, 104, 136, 118],
    charts: [picture.chart],
    onePage: true,
    standing: true,
    printed: areaAddress({ top: 0, left: 0, bottom: row - 1, right: COLUMNS - 1 }),
  };
}

/** A line set off across the page. */
function banner(words: string): Content[] {
  return Array.from({ length: COLUMNS }, (_, column): Content => ({ value: column === 0 ? words : "", style: "section" }));
}

/** The paragraph of the brief. */
export function briefInWords({ run, table }: Pick<SimulationReport, "run" | "table">, variant: number, client: number | undefined, writer: NumberWriter): string {
  const { rows, cheapest } = rowsOfWay(table, variant);
  const best = rows.find(({ count }) => count === cheapest)!;
  const step = tableStep(rows);
  const unit = run.money === "" ? "" : `\u00a0${shorten(run.money, 12)}`;
  const amount = (value: number): string => `${writer.money(value, step)}${unit}`;
  const piles = run.task.variants[variant]!.problem.building.piles.length;
  const way = shorten(best.name, 60);
  const subject = cheapest === 0 ? "no holes at all is" : `${holesInWords(cheapest)} (${way}) ${cheapest === 1 ? "is" : "are"}`;
  const sentences = [
    `For this foundation of ${piles} ${piles === 1 ? "pile" : "piles"}, ${subject} expected to cost least: ${amount(best.total)} in all, give or take ${writer.money(2 * best.standardError, step)}, for the investigation, the foundation, repair of damage and delay together.`,
    savingInWords(rows, best, client, amount, writer),
    tiesInWords(rows, best, client),
    best.failureChanceAtMost === undefined
      ? `With ${cheapest === 0 ? "none" : "these holes"} the chance of any damage to the building is ${writer.percent(best.failureChance)}, and ${writer.plain(best.surprises, 1)} of the ${piles} piles are expected to need more length than was built.`
      : `No realised ground saw damage to the building, so its chance is below ${boundInWords(best.failureChanceAtMost, writer)}; ${writer.plain(best.surprises, 1)} of the ${piles} piles are expected to need more length than was built.`,
  ];
  return sentences.filter((sentence) => sentence !== "").join(" ");
}

function savingInWords(rows: readonly SimulationRow[], best: SimulationRow, client: number | undefined, amount: (value: number) => string, writer: NumberWriter): string {
  if (client === undefined) return `Its chance of being the cheapest of the counts compared is ${writer.percent(best.chanceWithin)}.`;
  if (client === best.count) return "That is the number proposed.";
  const theirs = rows.find(({ count }) => count === client);
  const proposal = client === 0 ? "buying none, as proposed" : `the ${holesInWords(client)} proposed`;
  if (theirs === undefined) return `${sentenceCase(holesInWords(client))}, as proposed, ${client === 1 ? "is" : "are"} not among the counts compared, so no saving is stated.`;
  const more = theirs.investigation - best.investigation;
  const price = more === 0 ? "" : more > 0 ? `, of which ${amount(more)} is saved on the investigation itself` : `, although the investigation costs ${amount(-more)} more`;
  const dearer = amount(theirs.total - best.total);
  if (theirs.notDistinguishable) return `Against ${proposal}, this is ${dearer} less in expectation, but the difference is within its own error, so at this accuracy the two cannot be told apart.`;
  return `Against ${proposal}, this saves ${dearer} in expectation${price}.`;
}

function tiesInWords(rows: readonly SimulationRow[], best: SimulationRow, client: number | undefined): string {
  // The client's own count has had its sentence.
  const others = rows.filter((row) => row.notDistinguishable && row.count !== best.count && row.count !== client).map(({ count }) => count);
  if (others.length === 0) return "";
  return `${sentenceCase(others.length === 1 ? holesInWords(others[0]!) : `${countsInWords(others)} holes`)} cannot be told from it at this accuracy.`;
}

function tableRow(row: SimulationRow, units: "SI" | "US"): readonly Content[] {
  const money = (value: number): Content => ({ value, style: "result", look: "money" });
  return [
    { value: row.count, style: "result" },
    money(row.investigation), money(row.foundation), money(row.failure), money(row.delay), money(row.total), money(2 * row.standardError),
    { value: row.chanceWithin, style: "result", look: "percent" },
    { value: resultIn(row.meanLengths[MIDDLE]!, "length", units), style: "result", look: "metres" },
  ];
}
