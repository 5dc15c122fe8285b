import { describe, expect, it } from "vitest";
import { groupChecks, summariseChecks, UNPLACED, type CheckLike } from "../../src/pane/model/checks.js";

const row = (label: string, ok: boolean, change: Partial<CheckLike> = {}): CheckLike => ({ label, value: 1, unit: "m", verdict: ok ? "used" : "refused: it is blank", ok, ...change });
const section = (label: string): string | undefined => ({ Depth: "Ground", Width: "Ground", Price: "Prices" })[label];
const write = (value: number): string => `<${value}>`;

// Expected values: by hand.
describe("the checks", () => {
  it("stand in the order of their sections, labels nobody knows first, refused lines first within each", () => {
    const groups = groupChecks([row("Price", true), row("Depth", true), row("Width", false), row("Wobble", false)], section, write);
    expect(groups.map((group) => [group.section, group.refused, group.lines.map((line) => line.label)])).toEqual([
      [UNPLACED, 1, ["Wobble"]],
      ["Prices", 0, ["Price"]],
      ["Ground", 1, ["Width", "Depth"]],
    ]);
  });

  it("show value and unit together, and neither where there is none", () => {
    const values = groupChecks([row("Depth", true), row("Depth", true, { value: "", unit: "" }), row("Depth", true, { value: "none" }), row("Depth", true, { value: "1/3" })], section, write)[0]!.lines;
    expect(values.map((line) => line.value)).toEqual(["<1>\u00a0m", "", "none", "1/3\u00a0m"]);
  });

  it("cut texts from cells to what a pane bears", () => {
    const long = "x".repeat(5000);
    const line = groupChecks([row(long, false, { value: long, verdict: long })], section, write)[0]!.lines[0]!;
    expect(line.label.length).toBe(60);
    expect(line.value.length).toBeLessThan(70);
    expect(line.verdict.length).toBe(400);
  });

  it("say no more than the mark beside them leaves open", () => {
    const lines = groupChecks([row("Depth", true), row("Depth", true, { verdict: "default: as usual" }), row("Depth", false)], section, write)[0]!.lines;
    expect(lines.map((line) => line.verdict)).toEqual(["It is blank", "", "default: as usual"]);
  });

  it("are summed up in one sentence", () => {
    expect(summariseChecks([])).toBe("These cells hold no inputs that can be read.");
    expect(summariseChecks([row("Depth", true)])).toBe("The one input can be used.");
    expect(summariseChecks([row("Depth", true), row("Price", true)])).toBe("All 2 inputs can be used.");
    expect(summariseChecks([row("Depth", true), row("Price", false)])).toBe("One of 2 inputs cannot be used: Price.");
    expect(summariseChecks(["A", "B"].map((label) => row(label, false)))).toBe("2 of 2 inputs cannot be used: A and B.");
    expect(summariseChecks(["A", "B", "C", "D", "E"].map((label) => row(label, false)))).toBe("5 of 5 inputs cannot be used: A, B, C and 2 more.");
  });
});
