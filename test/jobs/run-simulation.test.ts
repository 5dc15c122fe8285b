import { beforeAll, describe, expect, it } from "vitest";
import { estimate, nextBatch, prepareSimulation, simulateElements, simulateForm, type SimulationTable, type SimulationTarget } from "../../src/engine/index.js";
import { simulationThreads } from "../../src/formula/simulation/simulate.js";
import type { BatchEnd, BatchProgress, BatchSettings, KeptRows } from "../../src/jobs/batch.js";
import { runPart, runSimulation, TargetError } from "../../src/jobs/run-simulation.js";
import { loadState, saveState } from "../../src/jobs/simulation-state.js";
import { stateOfText, stateText } from "../../src/jobs/state-text.js";
import { quickThreads } from "./quick-threads.js";
import { smallTask } from "./small-site.js";

const TASK = smallTask();
/** So large a sum that the fewest realisations are enough. */
const SOON: SimulationTarget = { regret: 1e7 };
const LABELS = { units: "SI", money: "EUR" } as const;

/** The same run in a plain loop without threads, runner, clerk or state. */
function straight(target: SimulationTarget): SimulationTable {
  const simulation = prepareSimulation(TASK);
  const elements: Float64Array[] = [];
  const form: Float64Array[] = [];
  for (let next = nextBatch(TASK, target, elements, form); next !== "enough" && next !== "full"; next = nextBatch(TASK, target, elements, form)) {
    while (elements.length < next.elements) elements.push(simulateElements(simulation, elements.length));
    while (form.length < next.form) form.push(simulateForm(simulation, form.length));
  }
  return estimate(TASK, elements, form);
}

interface Heard {
  readonly end: BatchEnd<SimulationTable>;
  readonly rows: KeptRows;
}

async function run(workers: number, target: SimulationTarget, settings: BatchSettings = {}, until?: (progress: BatchProgress<SimulationTable>) => boolean, threads = quickThreads): Promise<Heard> {
  const going = runSimulation(TASK, target, settings, threads(workers), (progress) => {
    if (until?.(progress) === true) going.cancel();
  });
  return { end: await going.end, rows: going.rows() };
}

// Expected tables come from the plain loop above, which shares nothing with the runner but the engine.
describe("the engine's own table comes out to the last digit", () => {
  let expected: SimulationTable;
  beforeAll(() => {
    expected = straight(SOON);
  }, 60_000);

  it("with one thread and with two", async () => {
    expect(expected.elements).toBeGreaterThanOrEqual(24);
    for (const workers of [1, 2]) expect((await run(workers, SOON, {}, undefined, simulationThreads)).end).toMatchObject({ kind: "done", table: expected });
  }, 120_000);

  it("after cancelling, saving as text, and going on", async () => {
    const first = await run(2, SOON, {}, ({ done }) => done.elements >= 5);
    expect(first.end.kind).toBe("cancelled");
    const kept = loadState(stateOfText(stateText(saveState(TASK, first.rows, LABELS))), TASK);
    const begun = kept.elements.reduce((sum, { count }) => sum + count, 0);
    expect(begun).toBeGreaterThanOrEqual(5);
    expect(begun).toBeLessThan(expected.elements);
    const second = await run(1, SOON, { kept });
    expect(second.end).toMatchObject({ kind: "done", table: expected });
  }, 120_000);

  it("from parts computed apart, in the order of a merge", async () => {
    const target = { realisations: 3 };
    const parts = await Promise.all([[2, 3], [0, 2]].map(async ([from, to]) => {
      const part = runPart(TASK, from!, to!, {}, quickThreads(1), () => undefined);
      expect(await part.end).toMatchObject({ kind: "done", table: undefined });
      return part.rows();
    }));
    expect(parts.map(({ elements, form }) => [elements[0]!.from, elements[0]!.count, form[0]!.count])).toEqual([[2, 1, 4], [0, 2, 4]]);
    const joined = await run(2, target, { kept: { elements: parts.flatMap(({ elements }) => elements), form: parts[0]!.form } });
    expect(joined.end).toMatchObject({ kind: "done", table: straight(target) });
  }, 120_000);
});

it("refuses rows that another arithmetic made, before anything is added to them", async () => {
  const simulation = prepareSimulation(TASK);
  const values = simulateForm(simulation, 0);
  const k = values.findIndex((value) => value !== 0);
  values[k] *= 1 + 2 ** -52;
  const { end } = await run(1, SOON, { kept: { elements: [], form: [{ from: 0, count: 1, values }] } });
  expect(end.kind).toBe("refused");
  expect(end.message).toMatch(/^The realisations that were kept come out otherwise here: .* Go on where they were made, or start anew\.$/);
}, 60_000);

it("says of an absurd precision how long it would take", async () => {
  const { end } = await run(2, { regret: 1e-6 });
  expect(end.kind).toBe("too long");
  expect(end.message).toMatch(/about [\d,]+ (days|years) on this machine; accept a larger sum, or stop after a number of grounds\.$/);
  expect(end.table!.elements).toBeGreaterThanOrEqual(16);
}, 120_000);

it.each([
  [{ regret: 0 }, "The precision is 0; it must be a sum of money above 0"],
  [{ regret: -5 }, "The precision is -5;"],
  [{ regret: Number.NaN }, "The precision is NaN;"],
  [{ regret: Infinity }, "The precision is Infinity;"],
  [{ realisations: 0 }, "The number of realisations is 0; it must be a whole number from 2 to 100,000."],
  [{ realisations: 1 }, "The number of realisations is 1;"],
  [{ realisations: 2.5 }, "The number of realisations is 2.5;"],
  [{ realisations: 1e9 }, "The number of realisations is 1000000000;"],
])("refuses the target %o before a thread is started", (target, words) => {
  const never = { size: 1, start: () => { throw new Error("a thread was started"); } };
  expect(() => runSimulation(TASK, target, {}, never, () => undefined)).toThrow(TargetError);
  expect(() => runSimulation(TASK, target, {}, never, () => undefined)).toThrow(words);
});

it("ends with the engine's sentence where the task cannot be simulated", async () => {
  const going = runSimulation({ ...TASK, counts: [1, 1] }, SOON, {}, quickThreads(1), () => undefined);
  expect(await going.end).toMatchObject({ kind: "refused", message: "Counts is 1, 1; it must be each named once." });
}, 60_000);
