import { spawnSync } from "node:child_process";
import { chmodSync } from "node:fs";
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

it.each([
  ["a green run", 0, 0, "7 passed, 0 failed", 0],
  ["a red run, though npm has the last word", 0, 1, "7 passed, 2 failed", 1],
  ["packages that cannot be installed", 1, 0, "0 passed, 1 failed", 1],
])("the script for fresh clones ends with the count and the status of %s", (_, install, test, line, status) => {
  const npm = `#!/bin/sh\nif [ "$1" = ci ]; then exit ${install}; fi\necho "7 passed, ${test === 0 ? 0 : 2} failed"\necho "npm error" >&2\nexit ${test}\n`;
  const copy = plantedCopy({ "planted/npm": npm }, [".ci"]);
  chmodSync(`${copy.root}/planted/npm`, 0o755);
  const run = spawnSync(`${copy.root}/.ci/run`, { encoding: "utf8", env: { ...process.env, PATH: `${copy.root}/planted:${process.env["PATH"]}` } });
  copy.remove();
  expect(run.stdout.trimEnd().split("\n").at(-1)).toBe(line);
  expect(run.status).toBe(status);
});
