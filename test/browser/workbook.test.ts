import { afterAll, beforeAll, expect, it } from "vitest";
import { checkSite, templateRows } from "../../src/inputs/index.js";
import { PracticePage, startPractice } from "./harness/practice-page.js";
import type { ServedSite } from "./harness/served-site.js";

// Source: the Markov variance function at T = 2 theta, as tabulated
const TWO_SCALES = 0.377289;

let practice: ServedSite;
let sheet: PracticePage;

beforeAll(async () => {
  practice = await startPractice();
  sheet = await PracticePage.open(practice);
});

afterAll(async () => {
  await sheet?.close();
  await practice?.close();
});

// Source: Vanmarcke (1983), Markov correlation at T = theta: (1 + e^-2)/2
it("shows the number of a formula typed into a cell, in capitals or not", async () => {
  await sheet.showSheet("Site");
  await sheet.type("F2", "=PROBE.VARIANCEFACTOR(3,3)");
  await sheet.type("F3", "=probe.variancefactor(3,3)");
  expect(await sheet.number("F2")).toBeCloseTo((1 + Math.exp(-2)) / 2, 9);
  expect(await sheet.number("F3")).toBeCloseTo((1 + Math.exp(-2)) / 2, 9);
});

// The grid's list of names follows a pause of 300 ms: whoever types on faster must still get what was typed.
it("keeps a formula as typed, though the list of suggestions is of an earlier letter", async () => {
  await sheet.showSheet("Site");
  await sheet.select("G3");
  await sheet.page.keyboard.type("=P");
  await sheet.page.getByText("PDURATION").waitFor();
  await sheet.calculated(async () => {
    await sheet.page.keyboard.type("ROBE.VARIANCEFACTOR(6,3)");
    await sheet.page.keyboard.press("Enter");
  });
  expect(await sheet.number("G3")).toBeCloseTo(TWO_SCALES, 6);
});

it("completes a name from the list that fits it", async () => {
  await sheet.showSheet("Site");
  await sheet.select("G2");
  await sheet.page.keyboard.type("=probe.variancef");
  await sheet.page.getByText("PROBE.VARIANCEFACTOR").waitFor();
  await sheet.page.keyboard.press("Enter");
  // the name is in place when the grid explains its arguments, out of the metadata that Excel gets
  await sheet.page.getByText("scale_m").first().waitFor();
  await sheet.calculated(async () => {
    await sheet.page.keyboard.type("6,3)");
    await sheet.page.keyboard.press("Enter");
  });
  expect(await sheet.number("G2")).toBeCloseTo(TWO_SCALES, 6);
});

// Identity: a hole's price enters the total once for each hole.
it("moves the total by two hole prices when an input of the site block changes", async () => {
  await sheet.showSheet("Site");
  const row = rowOf("Price per hole");
  const price = await sheet.number(`B${row}`);
  await sheet.type("F4", "=PROBE.TOTALCOST(Site,2)");
  const before = await sheet.number("F4");
  await sheet.type(`B${row}`, String(price + 500));
  expect((await sheet.number("F4")) - before).toBeCloseTo(1000, 4);
  await sheet.type(`B${row}`, String(price));
  expect(await sheet.number("F4")).toBe(before);
});

// Identity: a pair in the formula stands for the same value in the block.
it("takes a label and value after the count in place of the block's input", async () => {
  await sheet.showSheet("Site");
  const row = rowOf("Price per hole");
  const price = await sheet.number(`B${row}`);
  await sheet.type("F5", `=PROBE.TOTALCOST(Site,2,"Price per hole",${price + 500})-PROBE.TOTALCOST(Site,2)`);
  expect(await sheet.number("F5")).toBeCloseTo(1000, 4);
});

// Identity: table and single functions come from one assessment.
it("spills a table of costs that agrees with the single cells", async () => {
  await sheet.showSheet("Counts");
  const totals = [];
  for (const row of [5, 8, 17]) totals.push(await sheet.number(`F${row}`));
  const head = [];
  for (const column of "ABCDEF") head.push((await sheet.read(`${column}20`)).value);
  expect(head[0]).toMatch(/holes|count/i);
  const column = "ABCDEF"[head.findIndex((word) => /total/i.test(word))];
  for (const [index, row] of [21, 24, 33].entries()) expect(await sheet.number(`${column}${row}`)).toBeCloseTo(totals[index]!, -1);
});

// The whole table is emptied and made again from its first cell, as a person does it. Identity: a cell of the table is
// the same formula typed alone, and at the block's own COV the column of the Counts sheet.
it("fills a two-way sensitivity table down and across from one formula", async () => {
  await sheet.showSheet("Sensitivity");
  await sheet.clear("B5:G17");
  expect((await sheet.read("D9")).value).toBe("");
  await sheet.type("B5", '=PROBE.TOTALCOST(Site,$A5,"Stiffness COV",B$4)');
  await sheet.fill("B5", "B5:G17");
  const alone = await sheet.number("D9");
  expect(alone).toBeGreaterThan(0);
  await sheet.type("J5", '=PROBE.TOTALCOST(Site,4,"Stiffness COV",0.4)');
  expect(Math.round(await sheet.number("J5"))).toBe(Math.round(alone));
  const corner = await sheet.number("G17");
  await sheet.type("J6", '=PROBE.TOTALCOST(Site,12,"Stiffness COV",0.8)');
  expect(Math.round(await sheet.number("J6"))).toBe(Math.round(corner));
  expect(Math.round(corner)).not.toBe(Math.round(alone));
});

// Identity: blank cells beside and below the block hold no input.
it("reads whole columns as it reads the block in them", async () => {
  await sheet.showSheet("Site");
  await sheet.type("F7", "=PROBE.TOTALCOST(A:D,2)-PROBE.TOTALCOST(Site,2)");
  expect((await sheet.read("F7")).value).toBe("0");
});

it("says in a sentence why a cell cannot be priced, and passes it on to the cells behind", async () => {
  await sheet.showSheet("Site");
  const row = rowOf("Price per hole");
  const price = await sheet.number(`B${row}`);
  await sheet.type("F10", "=PROBE.TOTALCOST(Site,2)");
  await sheet.type("F11", "=F10*2");
  await sheet.clear(`B${row}`);
  const own = await sheet.read("F10");
  expect(own.value).toBe("#VALUE!");
  expect(own.reason).toMatch(/Price per hole.*blank/i);
  expect(own.reason).toContain(String(row));
  const behind = await sheet.read("F11");
  expect(behind.value).toBe("#VALUE!");
  expect(behind.reason).toContain("From F10:");
  await sheet.picture("error-sentence");
  await sheet.showSheet("Bid");
  expect((await sheet.read("E17")).reason).toMatch(/Price per hole/);
  const grid = (await sheet.page.locator("#grid").boundingBox())!;
  // row 17 of the unscrolled Bid sheet, column E: past the formula line, the heads, one title row and 15 rows of 22
  await sheet.page.mouse.move(grid.x + 546, grid.y + 424, { steps: 4 });
  await sheet.page.getByText(/E17, from D9/).waitFor();
  expect(await sheet.page.getByText(/Price per hole \(row/).last().isVisible()).toBe(true);
  await sheet.picture("error-hover");
  await sheet.showSheet("Check");
  const checked = checkSite(templateRows()).findIndex(({ label }) => label === "Price per hole") + 4;
  expect((await sheet.read(`A${checked}`)).value).toBe("Price per hole");
  expect((await sheet.read(`D${checked}`)).value).toMatch(/blank/i);
  await sheet.showSheet("Site");
  await sheet.type(`B${row}`, String(price));
  expect(await sheet.read("F10")).toMatchObject({ reason: "" });
});

it.each([
  ["=PROBE.TOTALCOST(Site)", /count/i],
  ["=PROBE.TOTALCOST(Site,-1)", /-1/],
  ["=PROBE.TOTALCOST(Site,1.5)", /1\.5/],
  ['=PROBE.TOTALCOST(Site,2,"Stifness COV",0.3)', /Stiffness COV/],
  ['=PROBE.TOTALCOST(Site,2,"Stiffness COV")', /needs one value|no value/i],
  ["=PROBE.TOTALCOST(NA(),2)", /one cell|#N\/A/],
  ["=PROBE.TOTALCOST(H1,2)", /./],
  ["=PROBE.TOTALCOST(A:D,2.5)", /2\.5/],
  ["=PROBE.SETTLEMENT(1000,10)", /diameter/i],
  ["=PROBE.NOSUCH(1)", /name/],
  ["=1/0", /zero/],
])("gives %s an error value with a sentence", async (formula, words) => {
  await sheet.showSheet("Site");
  await sheet.type("F8", formula);
  const { value, reason } = await sheet.read("F8");
  expect(value).toMatch(/^#(VALUE!|N\/A|NAME\?|DIV\/0!)$/);
  expect(reason).toMatch(words);
  expect(reason).toMatch(/[a-z]{3}.*[.?]$/);
});

it("forgets a cell's sentence when its next formula fails for another reason", async () => {
  await sheet.showSheet("Site");
  await sheet.type("F9", "=PROBE.TOTALCOST(Site,-1)");
  expect((await sheet.read("F9")).reason).toContain("-1");
  await sheet.type("F9", "=PROBE.TOTALCOST(Site,1.5)");
  expect((await sheet.read("F9")).reason).not.toContain("-1");
});

it("never wrote to the console and never asked anything of another machine", () => {
  expect(sheet.log.complaints).toEqual([]);
  expect(sheet.log.requests.length).toBeGreaterThan(2);
  expect(sheet.log.requests.filter((address) => !address.startsWith(practice.address) && !/^(data|blob):/.test(address))).toEqual([]);
});

/** The sheet begins with the block, so a row of the template is a row of the sheet. */
function rowOf(label: string): number {
  return templateRows().findIndex(([name]) => name === label) + 1;
}
