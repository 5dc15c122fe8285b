import { describe, expect, it } from "vitest";
import { checkTable, tableCells } from "../../src/results/index.js";

const good = { label: "Stiffness COV", value: 0.6, unit: "", verdict: "ok", ok: true, row: 4 };
const bad = { label: "Per hole", value: 0, unit: "EUR", verdict: "Per hole in row 31 is blank or zero.", ok: false, row: 31 };

describe("the check of a site block as cells", () => {
  it("ends with the verdict on the whole block", () => {
    expect(tableCells(checkTable([good]))).toEqual([
      ["Input", "Value used", "Unit", "Verdict"],
      ["Stiffness COV", 0.6, "", "ok"],
      ["Site block", "", "", "ok: every input can be used"],
    ]);
  });

  it("counts what needs attention and keeps each sentence", () => {
    const cells = tableCells(checkTable([good, bad]));
    expect(cells[2]?.[3]).toBe("Per hole in row 31 is blank or zero.");
    expect(cells[3]?.[3]).toBe("1 input needs attention");
    expect(tableCells(checkTable([bad, bad]))[3]?.[3]).toBe("2 inputs need attention");
  });
});
