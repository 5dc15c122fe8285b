import { expect, it } from "vitest";
import { mostRealisations, type SimulationTask } from "../../src/engine/index.js";
import { stream } from "../../src/engine/random/stream.js";
import { simulate } from "../../src/formula/simulation/simulate.js";
import type { Trade } from "../../src/jobs/answer-thread.js";
import { runBatches } from "../../src/jobs/run-batches.js";
import { runPart, runSimulation, TargetError } from "../../src/jobs/run-simulation.js";
import { scriptedThreads } from "./scripted-threads.js";
import { smallTask } from "./small-site.js";

const never = { size: 1, start: () => { throw new Error("a thread was started"); } };
const wide: SimulationTask = { ...smallTask(), counts: Array.from({ length: 61 }, (_, k) => k) };

it("refuses more realisations than fit into memory before a thread is started, and says how many do", () => {
  const most = mostRealisations(wide).elements;
  const words = `The number of realisations is ${(most + 1).toLocaleString("en-US")}; of 61 counts at most ${most.toLocaleString("en-US")} fit into memory at once. Ask for fewer, or name fewer counts or ways.`;
  for (const begin of [() => runSimulation(wide, { realisations: most + 1 }, {}, never, () => undefined), () => runPart(wide, 500, 501 + most, {}, never, () => undefined)]) {
    expect(begin).toThrow(TargetError);
    expect(begin).toThrow(words);
  }
  const pair = { ...wide, variants: [wide.variants[0]!, { ...wide.variants[0]!, name: "other" }] };
  expect(() => runSimulation(pair, { realisations: 90_000 }, {}, never, () => undefined)).toThrow(/is 90,000; of 2 ways with 61 counts each at most 4,\d{3} fit/);
});

it("lets what fits begin", async () => {
  const idle = { size: 1, start: () => ({ post: () => undefined, end: () => undefined }) };
  const run = runSimulation(wide, { realisations: mostRealisations(wide).elements }, {}, idle, () => undefined);
  run.cancel();
  expect((await run.end).kind).toBe("cancelled");
});

it("ends a run to a precision in words where no more may be kept, with its table", async () => {
  const trade: Trade = {
    prepare: () => (_, index) => Float64Array.of(index),
    lookAt: () => (elements) => ({ table: elements.length, next: elements.length >= 6 ? "full" : { elements: elements.length + 3, form: 0 }, projected: undefined }),
  };
  const run = runBatches({ task: undefined, target: undefined, first: 0, most: Infinity }, {}, scriptedThreads(trade, 2, stream("full", 1)), () => undefined);
  expect(await run.end).toMatchObject({
    kind: "too long", table: 6,
    message: "This run has as many grounds as fit into its memory, and a wrong choice may still cost more than the sum that was asked for. Accept a larger sum, or name fewer counts or ways: each takes its share of the memory.",
  });
});

it("is refused in the terminal as a call that cannot be carried out", async () => {
  let said = "";
  const terminal = { isLive: false, out: () => undefined, err: (text: string) => void (said += text), onInterrupt: () => () => undefined };
  expect(await simulate(["--counts", "0-60", "--realisations", "99999"], terminal, () => never)).toBe(2);
  expect(said).toMatch(/^The number of realisations is 99,999; of 61 counts at most 8,\d{3} fit into memory at once\. Ask for fewer, or name fewer counts or ways\.\n$/);
});
