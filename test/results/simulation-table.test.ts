import { describe, expect, it } from "vitest";
import { lengthPercentiles, type SimulationRow, type SimulationTable } from "../../src/engine/index.js";
import { simulationLengthTable, simulationTable, simulationText, stampTable, tableCells, type SimulationStamp } from "../../src/results/index.js";

// Made-up figures whose every cell can be told from the others.
function row(count: number, total: number, more: Partial<SimulationRow> = {}): SimulationRow {
  return {
    variant: 0, name: "Cone", count, investigation: 1000 * count, foundation: 20_000 + count, failure: total - 21_000 - 1001 * count, delay: 1000, total,
    errors: { foundation: 1, failure: 2, delay: 3 }, standardError: 1234.5, failureChance: 0.125, failureChanceError: 0.01, damageSeen: { elements: 3, form: 40 },
    failureChanceAtMost: undefined, carbon: 4535.9237, surprises: 1.25, overDesign: 3.048, totalMetres: 60.96, tooShortChance: 0,
    meanLengths: lengthPercentiles.map((percentile) => 3.048 * (percentile / 10)), chanceCheapest: 0.25, chanceWithin: 0.25, notDistinguishable: false,
    regret: 50 + count, correlation: 0.99, varianceCut: 640, ...more,
  };
}

function table(rows: readonly SimulationRow[], cheapest: number): SimulationTable {
  return { rows, cheapest, expectedRegret: rows[cheapest].regret, elements: 200, form: 34_000 };
}

const ONE = table([row(0, 98_000), row(1, 51_000, { chanceCheapest: 0.7, notDistinguishable: true }), row(3, 52_000, { notDistinguishable: true, varianceCut: undefined })], 1);
const TWO = table([row(1, 51_000, { notDistinguishable: true }), row(2, 60_000), row(1, 55_000, { variant: 1, name: "Borehole", notDistinguishable: true }), row(2, 55_500, { variant: 1, name: "Borehole", notDistinguishable: true })], 0);
const STAMP: SimulationStamp = { version: "0.1.0", seed: "7", inputs: "00ff00ff00ff00ff", elements: 200, form: 34_000, date: new Date(Date.UTC(2026, 11, 1, 6, 5, 59)) };

describe("the simulated table", () => {
  it("holds every figure under its label and unit, unrounded", () => {
    const [head, , second, third] = tableCells(simulationTable(ONE, "SI", "EUR"));
    expect(head).toEqual([
      "Count (holes)", "Investigation (EUR)", "Foundation (EUR)", "Failure (EUR)", "Delay (EUR)", "Total (EUR)", "Standard error (EUR)", "Chance cheapest (0 to 1)", "Expected regret (EUR)",
      "Against the cheapest", "Chance of damage (0 to 1)", "Surprises (piles)", "Over-design (m)", "Total length (m)", "Carbon (kg CO2e)", "Variance cut (times)",
    ]);
    expect(second).toEqual([1, 1000, 20_001, 28_999, 1000, 51_000, 1234.5, 0.7, 51, "cheapest", 0.125, 1.25, 3.048, 60.96, 4535.9237, 640]);
    expect(third!.slice(9)).toEqual(["cannot be told from the cheapest", 0.125, 1.25, 3.048, 60.96, 4535.9237, ""]);
  });

  // 3.048 m are 10 ft, 60.96 m are 200 ft and 4535.9237 kg are 10,000 lb by definition of foot and pound
  it("is in feet and pounds where the person reads those", () => {
    const { columns, rows } = simulationTable(ONE, "US");
    expect(columns.slice(-4).map(({ label, unit }) => [label, unit])).toEqual([["Over-design", "ft"], ["Total length", "ft"], ["Carbon", "lb CO2e"], ["Variance cut", "times"]]);
    expect((rows[0]!.slice(-4, -1) as number[]).map((value) => Math.round(value * 1e9) / 1e9)).toEqual([10, 200, 10_000]);
    expect(simulationLengthTable(ONE, "US").rows[9]).toEqual([50, 50, 50, 50].map((value) => expect.closeTo(value, 9)));
  });

  it("names the methods where there are several, and compares within each", () => {
    const cells = tableCells(simulationTable(TWO, "SI"));
    expect(cells.map((line) => [line[0], line[1], line[10]])).toEqual([
      ["Method", "Count (holes)", "Against the cheapest"], ["Cone", 1, "cheapest"], ["Cone", 2, "dearer"], ["Borehole", 1, "cheapest of its method"], ["Borehole", 2, "cannot be told from the cheapest of its method"],
    ]);
    expect(tableCells(simulationLengthTable(TWO, "SI"))[0]).toEqual(["Percentile (%)", "Cone, 1 hole (m)", "Cone, 2 holes (m)", "Borehole, 1 hole (m)", "Borehole, 2 holes (m)"]);
  });

  it("says what unseen damage, a short pile and a missing reference mean", () => {
    const unseen = { failureChanceAtMost: 0.00123 };
    const notes = (rows: SimulationRow[], elements = 200): string => simulationTable({ ...table(rows, 0), elements }, "SI").notes.join(" ");
    expect(notes([row(2, 5), row(3, 6, unseen), row(4, 7, { failureChanceAtMost: 0.001 })])).toContain("No damage was seen with 3 holes and 4 holes: with 95 % confidence its chance is below 0.12 %");
    expect(notes([row(1, 5, { tooShortChance: 0.3 }), row(2, 6, { tooShortChance: 0.1 })])).toContain("in up to 30 % of outcomes (1 hole); allow longer piles");
    expect(notes([row(1, 5)], 1)).toContain("rests on the second-order form alone");
    expect(notes([row(1, 5, { tooShortChance: 0.005 })])).not.toMatch(/No damage|allow longer|form alone:/);
  });

  it("has a stamp that says where it comes from", () => {
    expect(stampTable(STAMP).rows).toEqual([
      ["Version", "0.1.0"], ["Seed", "7"], ["Realisations by finite elements", 200], ["Realisations by the second-order form alone", 34_000], ["Hash of the inputs", "00ff00ff00ff00ff"], ["Date", "2026-12-01 06:05 UTC"],
    ]);
  });
});

describe("the simulated table as text", () => {
  it("rounds money to what a bid can use and closes with the cheapest and its ties", () => {
    expect(simulationText(ONE, STAMP, "SI", "EUR")).toBe(
      [
        "Holes  Investigation  Foundation  Failure  Delay   Total    +/-  Cheapest  Surprises  Over-design, m  Mean length 5/50/95 %, m",
        "    0              0      20,000   77,000  1,000  98,000  1,200      25 %       1.25             3.0             1.5/15.2/29.0",
        "    1          1,000      20,000   29,000  1,000  51,000  1,200      70 %       1.25             3.0             1.5/15.2/29.0  cheapest",
        "    3          3,000      20,000   28,000  1,000  52,000  1,200      25 %       1.25             3.0             1.5/15.2/29.0  cannot be told from the cheapest",
        "",
        "Cheapest: 1 hole, total EUR 51,000; 3 cannot be told from it. Expected regret of choosing it: 51.",
        "Realisations: 200 by finite elements, 34,000 by the second-order form alone. Version 0.1.0, seed 7, inputs 00ff00ff00ff00ff.",
      ].join("\n"),
    );
  });

  it("names methods and feet", () => {
    const text = simulationText(TWO, STAMP, "US");
    expect(text.split("\n")[0]).toMatch(/^Method {4}Holes .*Over-design, ft {2}Mean length 5\/50\/95 %, ft$/);
    expect(text).toContain("Cheapest: Cone, 1 hole, total 51,000. Expected regret");
  });
});
