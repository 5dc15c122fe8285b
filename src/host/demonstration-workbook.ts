import { CATALOGUE } from "../inputs/index.js";
import { siteSheet } from "./site-sheet.js";
import type { NumberLook, PlannedCell, PlannedChart, SheetPlan } from "./workbook.js";

/** Largest number of holes that the demonstration prices. */
export const LARGEST_COUNT = 12;

/**
 * The demonstration bid as sheets of plain data: the site block, a bill of quantities fed by pile-length percentiles, the
 * cost by number of holes, a two-way sensitivity table and the check rows. Every figure is a formula of the site block.
 */
export function demonstrationWorkbook(): SheetPlan[] {
  return [siteSheet(), bid(), counts(), sensitivity(), check()];
}

function bid(): SheetPlan {
  const cells: PlannedCell[] = [
    ...line(0, [text("Bid: piled foundation", "title")]),
    ...line(2, [text("Number of holes"), formula(`=PROBE.OPTIMALCOUNT(Site,${LARGEST_COUNT})`, "input"), text(""), text("the cheapest; type a number over it to price another", "note")]),
    ...line(3, [text("Length percentile"), value(50, "input"), text("%", "note"), text("of pile length, for the metres that are priced", "note")]),
    ...line(4, [text("Contingency percentile"), value(80, "input"), text("%", "note"), text("of construction, damage and delay, above their median", "note")]),
    ...line(5, [text("Overheads and profit"), value(0.08, "input", "percent"), text(""), text("on the net sum", "note")]),
    ...line(7, [text("Item", "head"), text("Quantity", "numberhead"), text("Unit", "head"), text("Rate", "numberhead"), text("Amount", "numberhead"), text("How", "head")]),
  ];
  const items: [string, string, NumberLook, string, string, string][] = [
    ["Ground investigation", "=1", "money", "sum", "=PROBE.INVESTIGATIONCOST(Site,$B$3)", "visit, holes, readings, report and waiting"],
    ["Piling rig", "=1", "money", "sum", `=${input("Piling rig")}`, "to the site and away"],
    ["Piles", `=${input("Piles along x")}*${input("Piles along y")}`, "money", "no", `=${input("Price per pile")}`, "setting up, trimming, testing"],
    ["Metres of pile", "=B11*PROBE.PILELENGTH(Site,$B$3,$B$4)", "metres", "m", `=${input("Price per metre of pile")}`, "piles times mean length at the percentile above"],
    ["Concrete", `=B12*PI()*${input("Pile diameter")}^2/4`, "metres", "m3", "", "to order; its price is in the metre rate"],
  ];
  items.forEach(([item, quantity, look, unit, rate, how], index) => {
    const row = 8 + index;
    cells.push(...line(row, [text(item), formula(quantity, "label", look), text(unit, "note"), ...(rate === "" ? [text(""), text("")] : [formula(rate, "label", "money"), formula(`=B${row + 1}*D${row + 1}`, "result", "money")]), text(how, "note")]));
  });
  const sums: [string, string, string][] = [
    ["Contingency", "=PROBE.CONTINGENCY(Site,$B$3,$B$5)", "so that this share of outcomes is covered"],
    ["Net sum", "=SUM(E9:E14)", ""],
    ["Overheads and profit", "=E15*B6", ""],
    ["Bid sum", "=E15+E16", ""],
  ];
  sums.forEach(([item, sum, how], index) => {
    const row = 13 + index;
    const style = item.endsWith("sum") ? "section" : "label";
    cells.push(...line(row, [text(item, style), text("", style), text("", style), text("", style), formula(sum, "result", "money"), text(how, "note")]));
  });
  cells.push(
    ...line(18, [...["Behind the contingency", "", "", "", "", ""].map((word) => text(word, "section"))]),
    ...line(19, [text("Expected damage"), text(""), text(""), text(""), formula("=PROBE.FAILURECOST(Site,$B$3)", "result", "money"), text("repair of the building after uneven settlement", "note")]),
    ...line(20, [text("Expected delay"), text(""), text(""), text(""), formula("=PROBE.DELAYCOST(Site,$B$3)", "result", "money"), text("piles that turn out too short while piling", "note")]),
    ...line(21, [text("Chance of damage"), text(""), text(""), text(""), formula("=PROBE.FAILURECHANCE(Site,$B$3)", "result", "percent"), text("of any repair at all", "note")]),
    ...line(22, [text("Saving against no holes"), text(""), text(""), text(""), formula("=PROBE.SAVING(Site,0,$B$3)", "result", "money"), text("expected total cost, net of the investigation", "note")]),
    ...line(23, [text("Carbon of the piles"), formula("=PROBE.CARBON(Site,$B$3)", "label", "money"), text("kg", "note"), text(""), text(""), text("CO2 equivalent", "note")]),
  );
  return { name: "Bid", cells, columnWidths: [190, 90, 60, 100, 120, 380] };
}

function counts(): SheetPlan {
  const columns: [string, string][] = [
    ["Investigation", "INVESTIGATIONCOST"],
    ["Foundation", "FOUNDATIONCOST"],
    ["Failure", "FAILURECOST"],
    ["Delay", "DELAYCOST"],
    ["Total", "TOTALCOST"],
  ];
  const first = 4;
  const last = first + LARGEST_COUNT;
  const cells: PlannedCell[] = [
    ...line(0, [text("Cost by number of holes", "title")]),
    ...line(1, [text("Cheapest number of holes"), text(""), formula(`=PROBE.OPTIMALCOUNT(Site,${LARGEST_COUNT})`, "result")]),
    ...line(3, [text("Holes", "numberhead"), ...columns.map(([word]) => text(word, "numberhead"))]),
  ];
  for (let row = first; row <= last; row++) {
    cells.push(...line(row, [value(row - first, "input"), ...columns.map(([, id]) => formula(`=PROBE.${id}(Site,$A${row + 1})`, "result", "money"))]));
  }
  // the looks of the cells that the table spills into: its head, then count, five costs, standard error, chance and carbon
  const looks: (NumberLook | undefined)[] = [undefined, "money", "money", "money", "money", "money", "money", "percent", "money"];
  cells.push(
    ...looks.slice(1).map((_, k): PlannedCell => ({ row: last + 3, column: k + 1, style: "numberhead" })),
    ...Array.from({ length: LARGEST_COUNT + 1 }, (_, k) => looks.map((look, column): PlannedCell => ({ row: last + 4 + k, column, style: "label", look }))).flat(),
    ...line(last + 2, [text("The same in one formula, with standard error and the chance of being the cheapest", "section"), ...Array.from({ length: 8 }, () => text("", "section"))]),
    ...line(last + 3, [formula(`=PROBE.COSTTABLE(Site,${LARGEST_COUNT})`, "numberhead")]),
  );
  const column = (letter: string): string => `${letter}${first + 1}:${letter}${last + 1}`;
  const chart: PlannedChart = {
    title: "Expected cost by number of holes",
    words: "Expected cost against the number of holes: foundation, failure, delay and investigation stacked, the total as a line.",
    place: "H1:N18",
    categories: column("A"),
    categoryTitle: "Number of holes",
    valueTitle: "Expected cost",
    valueLook: "money",
    series: [
      ...([["Foundation", "C"], ["Failure", "D"], ["Delay", "E"], ["Investigation", "B"]] as const).map(([name, letter]) => ({ kind: "part" as const, name, values: column(letter) })),
      { kind: "line", name: "Total", values: column("F") },
    ],
  };
  return { name: "Counts", frozenRows: first, charts: [chart], cells, names: [{ name: "CostByCount", range: `A${first}:F${last + 1}` }, { name: "Cheapest", range: "C2" }], columnWidths: [130, 150, 140, 120, 120, 120, 170, 190, 120] };
}

function sensitivity(): SheetPlan {
  const covs = [0.2, 0.3, 0.4, 0.5, 0.65, 0.8];
  const first = 4;
  const letters = "BCDEFG";
  const cells: PlannedCell[] = [
    ...line(0, [text("Expected total cost: number of holes against stiffness COV", "title")]),
    ...line(1, [text("One formula, filled down and across; change a count or a COV in the margins", "note")]),
    ...line(3, [text("Holes", "numberhead"), ...covs.map((cov) => value(cov, "input", "ratio"))]),
  ];
  for (let count = 0; count <= LARGEST_COUNT; count++) {
    const row = first + count;
    cells.push(...line(row, [value(count, "input"), ...covs.map((_, k) => formula(`=PROBE.TOTALCOST(Site,$A${row + 1},"Stiffness COV",${letters[k]}$${first})`, "result", "money"))]));
  }
  const row = first + LARGEST_COUNT + 2;
  cells.push(...line(row, [text("Cheapest"), ...covs.map((_, k) => formula(`=PROBE.OPTIMALCOUNT(Site,${LARGEST_COUNT},"Stiffness COV",${letters[k]}$${first})`, "result"))]));
  return { name: "Sensitivity", frozenRows: first, cells, columnWidths: [120, 110, 110, 110, 110, 110, 110] };
}

function check(): SheetPlan {
  // the looks of the cells that the rows spill into: a head, one row an input, and one on the whole block
  const looks = Array.from({ length: CATALOGUE.length + 2 }, (_, k) =>
    [0, 1, 2, 3].map((column): PlannedCell => ({ row: 2 + k, column, style: k > 0 ? "label" : column === 1 ? "numberhead" : "head" })),
  ).flat();
  return {
    name: "Check",
    frozenRows: 3,
    cells: [...line(0, [text("Every input as it is read", "title")]), ...line(2, [formula("=PROBE.CHECK(Site)", "head")]), ...looks.slice(1)],
    columnWidths: [190, 160, 90, 620],
  };
}

type Content = Omit<PlannedCell, "row" | "column">;

function line(row: number, contents: readonly Content[]): PlannedCell[] {
  return contents.map((content, column) => ({ row, column, ...content })).filter((cell) => cell.formula !== undefined || cell.value !== "" || cell.style === "section");
}

function text(words: string, style: NonNullable<Content["style"]> = "label"): Content {
  return { value: words, style };
}

function value(number: number, style: NonNullable<Content["style"]>, look?: NumberLook): Content {
  return { value: number, style, ...(look === undefined ? {} : { look }) };
}

function formula(words: string, style: NonNullable<Content["style"]>, look?: NumberLook): Content {
  return { formula: words, style, ...(look === undefined ? {} : { look }) };
}

/** The value of an input of the site block, whatever row it stands in. */
function input(label: string): string {
  return `VLOOKUP("${label}",Site,2,FALSE)`;
}
