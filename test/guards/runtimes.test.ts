import ts from "typescript";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { plantedCopy, type PlantedCopy } from "./copy.js";
import { filesBelow, ROOT } from "./files.js";

const PLANTED = {
  "src/engine/numerics/planted-page.ts": "export const title = (): string => document.title;\n",
  "src/units/planted-node.ts": "export const home = (): string | undefined => process.env.HOME;\n",
  "src/inputs/planted-office.ts": "export const host = (): unknown => Office.context.host;\n",
  "src/practice/planted-excel.ts": "export const excel = (): unknown => Excel.run;\n",
  "src/formula/planted-page.ts": "export const body = (): unknown => document.body;\n",
  "src/jobs/planted-page.ts": "export const body = (): unknown => document.body;\n",
};

/** Files that a runtime's own tsconfig takes in, not those that it only imports. */
function filesOf(root: string, project: string): string[] {
  const path = `${root}/${project}`;
  const { fileNames } = ts.parseJsonConfigFileContent(ts.readConfigFile(path, ts.sys.readFile).config, ts.sys, path.replace(/\/tsconfig\.json$/, ""));
  return fileNames.map((name) => name.slice(root.length + 1));
}

/** Source files that no runtime takes in, or that two do; the shapes of packages are shared. */
function withoutRuntime(root: string): string[] {
  const projects = filesBelow(root, "src").filter((path) => path.endsWith("/tsconfig.json"));
  const taken = projects.flatMap((project) => filesOf(root, project));
  return filesBelow(root, "src").filter((path) => path.endsWith(".ts") && !path.endsWith(".d.ts") && taken.filter((name) => name === path).length !== 1);
}

describe("a layer is a runtime", () => {
  let copy: PlantedCopy;
  beforeAll(() => {
    copy = plantedCopy(PLANTED);
  });
  afterAll(() => copy.remove());

  it.each([
    ["the page inside the engine", "src/engine", "src/engine/numerics/planted-page.ts", "'document'"],
    ["Node inside the units", "src/engine", "src/units/planted-node.ts", "'process'"],
    ["Office inside the inputs", "src/inputs", "src/inputs/planted-office.ts", "'Office'"],
    ["Excel inside the practice page", "src/practice", "src/practice/planted-excel.ts", "'Excel'"],
    ["the page inside the formula line", "src/formula", "src/formula/planted-page.ts", "'document'"],
    ["the page inside a worker", "src/jobs", "src/jobs/planted-page.ts", "'document'"],
  ])("refuses %s", (_, project, file, global) => {
    const { said, ended } = copy.run("typescript/bin/tsc", "-p", project, "--noEmit", "--pretty", "false");
    expect(ended).toBe(false);
    expect(said.split("\n").filter((line) => line.startsWith(file) && line.includes(global))).toHaveLength(1);
  });

  it("gives every source file exactly one runtime", () => {
    expect(withoutRuntime(ROOT)).toEqual([]);
  });

  it("refuses a file that no runtime takes in", () => {
    const stray = plantedCopy({ "src/helpers/planted.ts": "export const stray = 1;\n" }, ["tsconfig.json", "src"]);
    expect(withoutRuntime(stray.root)).toEqual(["src/helpers/planted.ts"]);
    stray.remove();
  });
});
