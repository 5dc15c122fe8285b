import { mkdirSync, rmSync, writeFileSync } from "node:fs";
import { afterAll, expect, it } from "vitest";
import { licences, packageOf } from "../../src/build/licences.js";
import { ROOT } from "../guards/files.js";

// a package that stands where packages stand; no other may be touched
const planted = `${ROOT}/node_modules/@probeworth-test`;
afterAll(() => rmSync(planted, { recursive: true, force: true }));

function plant(license: string | undefined, words?: string): string {
  mkdirSync(`${planted}/odd`, { recursive: true });
  writeFileSync(`${planted}/odd/package.json`, JSON.stringify({ name: "@probeworth-test/odd", version: "1.2.3", ...(license === undefined ? {} : { license }), author: { name: "Nobody" } }));
  rmSync(`${planted}/odd/LICENSE`, { force: true });
  if (words !== undefined) writeFileSync(`${planted}/odd/LICENSE`, words);
  return "@probeworth-test/odd";
}

it("knows the package that a file belongs to, the innermost one, and none for a file of ours", () => {
  expect(packageOf("/x/node_modules/d3-array/src/bin.js")).toBe("d3-array");
  expect(packageOf("../node_modules/@fluentui/tokens/lib/index.js")).toBe("@fluentui/tokens");
  expect(packageOf("C:\\x\\node_modules\\@fluentui\\tokens\\lib\\index.js")).toBe("@fluentui/tokens");
  expect(packageOf("/x/node_modules/a/node_modules/b/c.js")).toBe("b");
  expect(packageOf("/x/src/pane/main.ts")).toBeUndefined();
});

it("gives each package's words once, in the order of the alphabet", () => {
  const text = licences(["d3-array", "@observablehq/plot", "d3-array"]);
  expect(text.match(/^d3-array [\d.]+, ISC, by Mike Bostock$/gm)).toHaveLength(1);
  expect(text.indexOf("@observablehq/plot")).toBeLessThan(text.indexOf("d3-array"));
  expect(text).toContain("Permission to use, copy, modify, and/or distribute this software");
});

it("takes a licence from the package's own file where it states none", () => {
  expect(licences([plant(undefined, "Apache License\nVersion 2.0, January 2004\n")])).toContain("@probeworth-test/odd 1.2.3, Apache-2.0, by Nobody");
});

it.each([["SEE LICENSE IN LICENSE"], ["GPL-3.0"], ["UNLICENSED"], ["AGPL-3.0-only OR MIT"], [undefined]])("refuses a package under %s", (license) => {
  expect(() => licences([plant(license)])).toThrow("@probeworth-test/odd 1.2.3 is under");
});
