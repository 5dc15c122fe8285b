import { readFileSync } from "node:fs";
import { expect, it } from "vitest";
import { PRODUCT_VERSION } from "../../src/results/index.js";

it("the release that people see is the one of package.json", () => {
  const manifest = JSON.parse(readFileSync(new URL("../../package.json", import.meta.url), "utf8")) as { version: string };
  expect(PRODUCT_VERSION).toBe(manifest.version);
});
