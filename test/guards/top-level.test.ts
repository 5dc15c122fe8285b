import { readdirSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { plantedCopy } from "./copy.js";
import { ROOT } from "./files.js";

const NAMED = ["DEVELOPERS.md", "LICENSE", "README.md", "assets", "manifest.xml", "package-lock.json", "package.json", "src", "test", "tsconfig.json", "webpack.config.js"];
/** Made by commands and never committed; .gitignore names the same. */
const MADE = ["dist", "node_modules"];

const stray = (root: string): string[] => readdirSync(root).filter((name) => !name.startsWith(".") && !NAMED.includes(name) && !MADE.includes(name));

describe("the top level", () => {
  it("holds the named files and folders, all of them", () => {
    expect(readdirSync(ROOT)).toEqual(expect.arrayContaining(NAMED));
  });
  it("holds nothing else", () => {
    expect(stray(ROOT)).toEqual([]);
  });
  it("refuses a stray file and a stray folder", () => {
    const copy = plantedCopy({ "vitest.config.ts": "export const planted = 1;\n", "scripts/planted.ts": "export const planted = 1;\n" }, ["package.json"]);
    expect(stray(copy.root)).toEqual(["scripts", "vitest.config.ts"]);
    copy.remove();
  });
});
