import { describe, expect, it } from "vitest";
import type { BatchProgress } from "../../src/jobs/batch.js";
import type { SimulationTable } from "../../src/engine/index.js";
import { agreementInWords } from "../../src/pane/model/agreement.js";
import { numberWriter } from "../../src/pane/model/numbers.js";
import { bestInWords, progressInWords, standingInWords, surenessInWords } from "../../src/pane/model/run-words.js";
import { rowsOfWay, waysOf } from "../../src/pane/model/ways.js";
import type { RunState } from "../../src/pane/run-store.js";
import { simulatedRow, simulatedTable } from "./simulated-rows.js";
import { countRow } from "./tables.js";

const writer = numberWriter("en-GB");
const progress = (change: Partial<BatchProgress<SimulationTable>>): BatchProgress<SimulationTable> => ({
  phase: "computing", done: { elements: 34, form: 1200 }, wanted: { elements: 120, form: 6000 }, share: 0.3, secondsLeft: 185, table: undefined, threads: 2, notice: "", ...change,
});
const state = (change: Partial<RunState>): RunState => ({
  phase: "ended", order: undefined, inputs: "", progress: undefined, end: "cancelled", message: "", table: undefined,
  used: { elements: 1, form: 400 }, before: { elements: 0, form: 0 }, note: "", isKept: true, changed: false, ...change,
});

describe("a run in words", () => {
  it("says how far it is and how long it will take", () => {
    expect(progressInWords(progress({}), writer)).toBe("34 of about 120 grounds by finite elements, 1,200 of about 6,000 by the short form. About 3 minutes left.");
    expect(progressInWords(progress({ secondsLeft: undefined }), writer)).toMatch(/not known yet\.$/);
    expect(progressInWords(progress({ secondsLeft: 0.4 }), writer)).toMatch(/Nearly done\.$/);
    expect(progressInWords(progress({ wanted: { elements: 34, form: 1200 } }), writer)).toMatch(/^34 grounds by finite elements, 1,200 by/);
    expect(progressInWords(progress({ phase: "preparing", done: { elements: 0, form: 0 } }), writer)).toMatch(/^Preparing/);
  });

  it("says the best estimate with its error, and the way only where there are several", () => {
    const rows = [simulatedRow(0, 5000), simulatedRow(2, 4000, { chanceCheapest: 0.84 })];
    expect(bestInWords(simulatedTable(rows), "EUR", writer)).toBe("Two holes cost least: 4,000\u00a0EUR expected, give or take 20.");
    const two = [...rows, ...rows.map((row) => ({ ...row, variant: 1, name: "Vane", total: row.total - 500 }))];
    expect(bestInWords(simulatedTable(two), "", writer)).toBe("Two holes by Vane cost least: 3,500 expected, give or take 20.");
    expect(surenessInWords(simulatedTable(rows), "EUR", writer)).toBe("Its chance of being the cheapest is 84\u00a0%. Choosing it is expected to cost 120\u00a0EUR more than the unknown best.");
    expect(waysOf(simulatedTable(two))).toEqual([{ variant: 0, name: "Cone" }, { variant: 1, name: "Vane" }]);
    expect(rowsOfWay(simulatedTable(two), 1)).toMatchObject({ cheapest: 2, rows: [{ count: 0, name: "Vane" }, { count: 2, name: "Vane" }] });
  });

  it("says how it stands after its end", () => {
    expect(standingInWords(state({}), writer)).toBe("Cancelled. 1 ground by finite elements and 400 by the short form are there and kept on this machine.");
    expect(standingInWords(state({ isKept: false }), writer)).toBe("Cancelled. 1 ground by finite elements and 400 by the short form are there and stay until the pane closes.");
    expect(standingInWords(state({ end: "kept" }), writer)).toMatch(/^A run was left on this machine: 1 ground/);
    expect(standingInWords(state({ end: "done" }), writer)).toBe("Finished: 1 ground by finite elements and 400 by the short form.");
    expect(standingInWords(state({ end: "failed", message: "No thread can be kept at work: gone." }), writer)).toMatch(/^No thread can be kept at work: gone\. 1 ground .* kept on this machine\.$/);
    expect(standingInWords(state({ end: "refused", message: "Not so.", used: { elements: 0, form: 0 } }), writer)).toBe("Not so.");
  });
});

describe("the agreement of quick and simulated figures", () => {
  const simulated = [simulatedRow(0, 1000), simulatedRow(2, 900), simulatedRow(4, 950)];

  it("says when both name the same count, how many totals agree, and the widest gap", () => {
    // errors 10 and 10 give two standard errors of 28; gaps are 0, 20 and 100
    const quick = [countRow(0, 1000), countRow(2, 920), countRow(4, 1050)];
    expect(agreementInWords(quick, simulated, 2, writer)).toBe("Both name the same cheapest count. The totals lie within two standard errors of each other at 2 of 3 counts; the widest gap is 11\u00a0% at four holes.");
  });

  it("prices what another choice would cost by the simulation", () => {
    const quick = [countRow(0, 1000), countRow(2, 920), countRow(4, 910)];
    expect(agreementInWords(quick, simulated, 2, writer)).toMatch(/^The quick figures name four holes as the cheapest; by the simulation that costs 50 more than its own cheapest\./);
  });

  it("says nothing where no count is in both", () => {
    expect(agreementInWords([countRow(7, 1)], simulated, 2, writer)).toBe("");
  });
});
