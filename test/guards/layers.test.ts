import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { plantedCopy, type PlantedCopy } from "./copy.js";
import { filesBelow, ROOT } from "./files.js";
import { rows } from "./rows.cjs";

const PLANTED = {
  "src/engine/numerics/planted-upward.ts": 'import type { Problem } from "../decision/problem.js";\nexport const upward = (problem: Problem): string => problem.seed;\n',
  "src/engine/decision/planted-simulation.ts": 'import { simulated } from "../simulation/planted-simulated.js";\nexport const decided = simulated;\n',
  "src/engine/simulation/planted-simulated.ts": 'import type { Problem } from "../decision/problem.js";\nexport const simulated = (problem: Problem): string => problem.seed;\n',
  "src/engine/random/planted-circle-a.ts": 'import { b } from "./planted-circle-b.js";\nexport const a = (): number => b() + 1;\n',
  "src/engine/random/planted-circle-b.ts": 'import { a } from "./planted-circle-a.js";\nexport const b = (): number => a() - 1;\n',
  "src/engine/random/planted-types-a.ts": 'import type { B } from "./planted-types-b.js";\nexport interface A { b?: B }\n',
  "src/engine/random/planted-types-b.ts": 'import type { A } from "./planted-types-a.js";\nexport interface B { a?: A }\n',
  "src/engine/ground/planted-orphan.ts": "export const alone = 1;\n",
  "src/inputs/planted-window.ts": 'import { DomainError } from "../engine/numerics/domain-error.js";\nexport const door = DomainError;\n',
  "src/engine/piles/planted-door.ts": 'import { DomainError } from "../index.js";\nexport const inside = DomainError;\n',
  "src/engine/piles/planted-package.ts": 'import { range } from "d3";\nexport const ten = range(10);\n',
  "src/engine/piles/planted-kernel.ts": 'import { factor } from "../../kernels/banded.js";\nexport const kernel = factor;\n',
  "src/engine/piles/planted-node.ts": 'import { readFileSync } from "node:fs";\nexport const read = readFileSync;\n',
  "src/pane/planted-grid.ts": 'import { Univer } from "@univerjs/core";\nexport const grid = Univer;\n',
  "src/pane/planted-practice.ts": 'import { grid } from "../practice/planted-grid.js";\nexport const practice = grid;\n',
  "src/practice/planted-grid.ts": 'import { Univer } from "@univerjs/core";\nexport const grid = Univer;\n',
  "src/host/planted-workbook-file.ts": 'import ExcelJS from "exceljs";\nexport const file = ExcelJS;\n',
  "src/results/planted-test.ts": 'import { ROOT } from "../../test/guards/files.js";\nexport const root = ROOT;\n',
  "src/results/planted-nowhere.ts": 'import { nothing } from "./nowhere.js";\nexport const nowhere = nothing;\n',
};

interface Report {
  summary: { violations: { from: string; to: string; rule: { name: string } }[] };
}

describe("the rows of the house", () => {
  let copy: PlantedCopy;
  let violations: string[];
  beforeAll(() => {
    copy = plantedCopy(PLANTED);
    const { said } = copy.run("dependency-cruiser/bin/dependency-cruise.mjs", "--config", "test/guards/layers.cjs", "--output-type", "json", "src");
    violations = (JSON.parse(said) as Report).summary.violations.map(({ from, rule }) => `${from} ${rule.name}`);
  });
  afterAll(() => copy.remove());

  it.each([
    ["an import from a later row", "src/engine/numerics/planted-upward.ts row-1-stays-below"],
    ["a decision that waits for simulation", "src/engine/decision/planted-simulation.ts decision-without-simulation"],
    ["a circle", "src/engine/random/planted-circle-a.ts no-circle"],
    ["a circle of types alone", "src/engine/random/planted-types-a.ts no-circle"],
    ["an orphan", "src/engine/ground/planted-orphan.ts no-orphan"],
    ["a way into the engine past its door", "src/inputs/planted-window.ts through-the-door"],
    ["the engine using its own door", "src/engine/piles/planted-door.ts inside-without-the-door"],
    ["a kernel that is imported instead of compiled", "src/engine/piles/planted-kernel.ts kernels-are-compiled"],
    ["a package that the engine may not use", "src/engine/piles/planted-package.ts engine-packages"],
    ["Node inside the engine", "src/engine/piles/planted-node.ts no-node-in-pages"],
    ["the grid inside the pane", "src/pane/planted-grid.ts grid-in-practice-only"],
    ["the practice page inside the pane", "src/pane/planted-practice.ts row-8-stays-below"],
    ["workbook files outside the formula line", "src/host/planted-workbook-file.ts workbook-files-in-formula-only"],
    ["tests inside the house", "src/results/planted-test.ts no-tests-in-the-house"],
    ["an import that leads nowhere", "src/results/planted-nowhere.ts resolvable"],
  ])("refuses %s", (_, violation) => {
    expect(violations).toContain(violation);
  });

  it("lets the practice page have the grid", () => {
    expect(violations.filter((line) => line.startsWith("src/practice/planted-grid.ts"))).toEqual([]);
  });

  it("gives every source file its row", () => {
    expect(homeless(ROOT)).toEqual([]);
  });

  it("refuses a file without a row", () => {
    const stray = plantedCopy({ "src/helpers/planted.ts": "export const stray = 1;\n" }, ["src"]);
    expect(homeless(stray.root)).toEqual(["src/helpers/planted.ts"]);
    stray.remove();
  });
});

function homeless(root: string): string[] {
  return filesBelow(root, "src").filter((path) => path.endsWith(".ts") && rows.flat().filter((prefix) => path.startsWith(prefix)).length !== 1);
}
