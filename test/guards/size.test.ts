import { randomBytes } from "node:crypto";
import { expect, it } from "vitest";
import { plantedCopy } from "./copy.js";

const run = (bytes: number): { said: string; ended: boolean } => {
  const copy = plantedCopy({ "dist/functions.js": randomBytes(bytes).toString("latin1") }, ["package.json"]);
  const answer = copy.run("size-limit/bin.js");
  copy.remove();
  return answer;
};

it("refuses add-in bundles above 400 kB gzip and takes smaller ones", () => {
  // random bytes do not compress; written as UTF-8 they take one and a half bytes each
  expect(run(100_000).ended).toBe(true);
  const { said, ended } = run(400_000);
  expect(ended).toBe(false);
  expect(said).toContain("exceeded");
});
