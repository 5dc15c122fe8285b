import { describe, expect, it } from "vitest";
import { functionsMetadata } from "../../src/build/metadata.js";
import { plantedCopy } from "./copy.js";
import committed from "./function-ids.json" with { type: "json" };
import { functionFaults } from "./function-ids.js";

async function faultsAfter(change: (source: string) => string): Promise<string> {
  const copy = plantedCopy({}, ["src/functions"]);
  const { filesBelow } = await import("./files.js");
  for (const path of filesBelow(copy.root, "src/functions").filter((name) => name.endsWith(".ts"))) copy.write(path, change(copy.read(path)));
  try {
    return functionFaults(await functionsMetadata(undefined, `${copy.root}/src/functions`), committed).join(" ");
  } finally {
    copy.remove();
  }
}

describe("function ids", () => {
  it("are those of the committed list, each described and with a help address", async () => {
    expect(functionFaults(await functionsMetadata(), committed)).toEqual([]);
  });
  it("refuses a changed id", async () => {
    const faults = await faultsAfter((source) => source.replace(/@customfunction TOTALCOST\b/, "@customfunction WHOLECOST"));
    expect(faults).toContain("TOTALCOST is gone");
    expect(faults).toContain("WHOLECOST is not in the committed list");
  });
  it("refuses a lost function", async () => {
    expect(await faultsAfter((source) => source.replace(/@customfunction CARBON\b/, ""))).toContain("CARBON is gone");
  });
  it("refuses an id that Excel would not take", async () => {
    expect(await faultsAfter((source) => source.replace(/@customfunction SAVING\b/, "@customfunction SAVING_UP"))).toContain("SAVING_UP is not a name");
  });
  it("refuses an argument without words", async () => {
    expect(await faultsAfter((source) => source.replace(/@param count .*/g, "@param count"))).toContain("count has no description");
  });
  it("refuses two functions of one id", async () => {
    await expect(faultsAfter((source) => source.replace(/@customfunction SAVING\b/, "@customfunction CARBON"))).rejects.toThrow(/CARBON/);
  });
});
