import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { plantedCopy, type PlantedCopy } from "./copy.js";

/** What is refused, where it is planted, its text, and the rule that speaks. */
const PLANTED: readonly (readonly [string, string, string, string])[] = [
  ["a library reference that lets the page into the engine", "src/engine/numerics/p1.ts", '/// <reference lib="dom" />\nexport const title = (): string => document.title;\n', "@typescript-eslint/triple-slash-reference"],
  ["chance inside the engine", "src/engine/numerics/p2.ts", "export const chance = (): number => Math.random();\n", "no-restricted-properties"],
  ["chance taken out of Math by name", "src/engine/numerics/p3.ts", "const { random } = Math;\nexport const chance = random;\n", "no-restricted-properties"],
  ["the clock inside the engine", "src/engine/numerics/p4.ts", "export const now = (): number => Date.now();\n", "no-restricted-globals"],
  ["a new date inside the units", "src/units/p5.ts", "export const today = (): unknown => new Date();\n", "no-restricted-globals"],
  ["globals by another name inside the engine", "src/engine/numerics/p6.ts", "export const all = (): unknown => globalThis;\n", "no-restricted-globals"],
  ["the clock inside a cell function", "src/functions/p7.ts", "export const now = (): number => Date.now();\n", "no-restricted-globals"],
  ["a default export", "src/inputs/p8.ts", "export default 1;\n", "no-restricted-syntax"],
  ["an import without its ending", "src/inputs/p9.ts", 'export { InputError } from "./input-error";\n', "no-restricted-syntax"],
  ["Excel outside the host", "src/pane/p10.ts", "export const run = (): unknown => Excel.run;\n", "no-restricted-globals"],
  ["a dialog in the pane", "src/pane/p11.ts", 'export const shout = (): void => alert("!");\n', "no-restricted-globals"],
  ["text that becomes HTML", "src/pane/p12.ts", "export const show = (where: Element, text: string): void => { where.innerHTML = text; };\n", "no-restricted-properties"],
  ["a promise that nobody waits for", "src/host/p13.ts", "export const lost = (work: () => Promise<void>): void => { work(); };\n", "@typescript-eslint/no-floating-promises"],
  ["a silenced type error", "src/inputs/p14.ts", '// @ts-ignore\nexport const wrong: number = "1";\n', "@typescript-eslint/ban-ts-comment"],
  ["a property read before it was loaded", "src/host/p15.ts", 'export const first = (context: Excel.RequestContext): string => { const sheet = context.workbook.worksheets.getFirst(); return sheet.name; };\n', "office-addins/load-object-before-read"],
  ["a file that is too long", "src/engine/numerics/p16.ts", `${Array.from({ length: 181 }, (_, k) => `export const line${k} = ${k};`).join("\n")}\n`, "max-lines"],
  ["a skipped test", "test/units/p17.test.ts", 'import { it } from "vitest";\nit.skip("later", () => undefined);\n', "no-restricted-syntax"],
  ["a test that runs alone", "test/units/p18.test.ts", 'import { it } from "vitest";\nit.only("me", () => undefined);\n', "no-restricted-syntax"],
  ["a logarithm as the engine that runs it has it", "src/engine/numerics/p19.ts", "export const ln = (x: number): number => Math.log(x);\n", "no-restricted-properties"],
  ["a sine taken out of Math by name", "src/units/p20.ts", "const { sin } = Math;\nexport const sine = sin;\n", "no-restricted-properties"],
  ["an exponential in the pane", "src/pane/p21.ts", "export const e = (x: number): number => Math.exp(x);\n", "no-restricted-properties"],
  ["a hypotenuse in the inputs", "src/inputs/p22.ts", "export const far = (x: number, y: number): number => Math.hypot(x, y);\n", "no-restricted-properties"],
  ["a cube as a power", "src/engine/numerics/p23.ts", "export const cube = (x: number): number => x ** 3;\n", "no-restricted-syntax"],
  ["a power that is not known", "src/results/p24.ts", "export const power = (x: number, n: number): number => x ** n;\n", "no-restricted-syntax"],
  ["a power in place", "src/jobs/p25.ts", "export const power = (x: number): number => { x **= 2; return x; };\n", "no-restricted-syntax"],
  ["a number in the machine's language", "src/results/p26.ts", "export const text = (x: number): string => x.toLocaleString();\n", "no-restricted-properties"],
];

interface FileReport {
  filePath: string;
  messages: { ruleId: string | null; message: string }[];
}

describe("lint", () => {
  let copy: PlantedCopy;
  let reports: FileReport[];
  beforeAll(() => {
    const silenced = { "src/inputs/silenced.ts": "/* eslint-disable no-restricted-syntax */\nexport default 1;\n" };
    copy = plantedCopy({ ...Object.fromEntries(PLANTED.map(([, path, content]) => [path, content])), ...silenced });
    const { said } = copy.run("eslint/bin/eslint.js", "--config", "test/guards/eslint.config.js", "--format", "json", ...PLANTED.map(([, path]) => path), ...Object.keys(silenced));
    reports = JSON.parse(said) as FileReport[];
  });
  afterAll(() => copy.remove());

  const rulesAt = (path: string): (string | null)[] => reports.filter(({ filePath }) => filePath.endsWith(path)).flatMap(({ messages }) => messages.map(({ ruleId }) => ruleId));

  it.each(PLANTED)("refuses %s", (_, path, __, rule) => {
    expect(rulesAt(path)).toContain(rule);
  });

  it("does not let a comment switch a rule off", () => {
    expect(rulesAt("src/inputs/silenced.ts")).toContain("no-restricted-syntax");
  });
});
