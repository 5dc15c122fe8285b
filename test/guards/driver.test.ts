import { expect, it } from "vitest";
import { plantedCopy } from "./copy.js";

// The counts that people and machines read must be those of the run: planted tests of every kind, and the line they give.
it("counts what ran, takes a skipped test and a broken file for failures, and ends with the count", () => {
  const copy = plantedCopy(
    {
      "test/units/planted.test.ts": 'import { expect, it } from "vitest";\nit("holds", () => expect(1).toBe(1));\nit("breaks", () => expect(1).toBe(2));\nit.skip("sleeps", () => undefined);\n',
      "test/units/unloadable.test.ts": 'import "./nowhere.js";\n',
    },
    ["package.json", "tsconfig.json", "test/run.ts", "test/vitest.config.ts"],
  );
  const { out, ended } = copy.run("tsx/dist/cli.mjs", "test/run.ts", "units");
  copy.remove();
  expect(ended).toBe(false);
  expect(out.trimEnd().split("\n").at(-1)).toBe("1 passed, 3 failed");
});
