import { callFunction } from "../../../src/functions/registry.js";
import { siteSheet } from "../../../src/host/site-sheet.js";
import type { PlannedCell, SheetPlan } from "../../../src/host/workbook.js";
import { templateRows } from "../../../src/inputs/index.js";
import { CellReasons } from "../../../src/practice/cell-reasons.js";
import { workbookData } from "../../../src/practice/grid-data.js";
import { startGrid } from "../../../src/practice/grid.js";

/** What the runner asks of this page. */
export interface SheetBench {
  /** writes a new mean stiffness into the site block and waits until all cells are calculated; ms */
  recalculate(stiffness: number): Promise<number>;
  /** the same 500 calls without a grid around them; ms */
  engineAlone(stiffness: number): number;
  /** largest difference between a cell and the call alone, relative */
  worstDifference(stiffness: number): number;
}

const COUNTS = 20;
const COVS = 25;
const cov = (k: number) => 0.2 + 0.02 * k;

function sensitivity(): SheetPlan {
  const column = (k: number) => (k < 26 ? String.fromCharCode(65 + k) : `A${String.fromCharCode(39 + k)}`);
  const cells: PlannedCell[] = [];
  for (let k = 0; k < COVS; k++) cells.push({ row: 0, column: k + 1, value: cov(k) });
  for (let n = 0; n < COUNTS; n++) {
    cells.push({ row: n + 1, column: 0, value: n });
    for (let k = 0; k < COVS; k++) cells.push({ row: n + 1, column: k + 1, formula: `=PROBE.TOTALCOST(Site,$A${n + 2},"Stiffness COV",${column(k + 1)}$1)` });
  }
  return { name: "Sensitivity", cells };
}

const row = templateRows().findIndex(([label]) => label === "Mean stiffness");
const container = document.getElementById("grid")!;
const { grid } = startGrid({ container, workbook: workbookData("bench", [siteSheet(), sensitivity()]), descriptions: [], reasons: new CellReasons(), dark: false });
const book = grid.getActiveWorkbook()!;

function siteWith(stiffness: number): (string | number)[][] {
  return templateRows().map((cells, k) => (k === row ? [cells[0]!, stiffness, ...cells.slice(2)] : [...cells]));
}

function* calls(site: unknown): Generator<[number, number, number]> {
  for (let n = 0; n < COUNTS; n++) for (let k = 0; k < COVS; k++) yield [n, k, callFunction("TOTALCOST", [site, n, "Stiffness COV", cov(k)]) as number];
}

const bench: SheetBench = {
  async recalculate(stiffness) {
    const applied = grid.getFormula().onCalculationResultApplied(120_000);
    const begun = performance.now();
    book.getSheetByName("Site")!.getRange(row, 1).setValue(stiffness);
    await applied;
    return performance.now() - begun;
  },
  engineAlone(stiffness) {
    const site = siteWith(stiffness);
    const begun = performance.now();
    for (const [, , cost] of calls(site)) if (!(cost > 0)) throw new Error(`A cost came out as ${cost}.`);
    return performance.now() - begun;
  },
  worstDifference(stiffness) {
    const sheet = book.getSheetByName("Sensitivity")!;
    let worst = 0;
    for (const [n, k, cost] of calls(siteWith(stiffness))) worst = Math.max(worst, Math.abs(Number(sheet.getRange(n + 1, k + 1).getValue()) / cost - 1));
    return worst;
  },
};

Object.assign(globalThis, { bench });
void grid.getFormula().onCalculationResultApplied(120_000).then(() => document.body.setAttribute("data-state", "ready"));
