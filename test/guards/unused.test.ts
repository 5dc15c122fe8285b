import { expect, it } from "vitest";
import { plantedCopy } from "./copy.js";

interface Report {
  issues: { file: string; files?: { name: string }[]; exports?: { name: string }[]; dependencies?: { name: string }[] }[];
}

it("refuses an unused export, an unused file and an unused package", () => {
  const copy = plantedCopy({
    "src/units/planted-used.ts": "export const used = 1;\nexport const plantedExport = 2;\n",
    "test/units/planted.test.ts": 'import { used } from "../../src/units/planted-used.js";\nexport const twice = used * 2;\n',
    "src/units/planted-alone.ts": "export const plantedAlone = 3;\n",
  });
  const packages = JSON.parse(copy.read("package.json")) as { dependencies: Record<string, string> };
  copy.write("package.json", JSON.stringify({ ...packages, dependencies: { ...packages.dependencies, "left-over": "1.0.0" } }));
  const { said, ended } = copy.run("knip/bin/knip.js", "--config", "test/guards/knip.json", "--reporter", "json");
  copy.remove();
  const { issues } = JSON.parse(said) as Report;
  expect(ended).toBe(false);
  expect(issues.find(({ file }) => file === "src/units/planted-used.ts")?.exports?.map(({ name }) => name)).toEqual(["plantedExport"]);
  expect(issues.flatMap(({ files }) => files ?? []).map(({ name }) => name)).toContain("src/units/planted-alone.ts");
  expect(issues.find(({ file }) => file === "package.json")?.dependencies?.map(({ name }) => name)).toContain("left-over");
});
