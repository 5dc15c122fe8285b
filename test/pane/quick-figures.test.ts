import { describe, expect, it } from "vitest";
import type { CountRow, Problem } from "../../src/engine/index.js";
import type { PricingEnd } from "../../src/pane/pricing.js";
import { QuickFigures } from "../../src/pane/quick-figures.js";
import { countRow } from "./tables.js";

const problem = (seed: string): Problem => ({ seed }) as Problem;
const settled = (): Promise<void> => new Promise((resolve) => setTimeout(resolve, 0));

function bench(answer: () => PricingEnd<readonly CountRow[]>) {
  const asked: string[] = [];
  const figures = new QuickFigures({
    price: async ({ seed }: Problem) => {
      asked.push(seed);
      return answer();
    },
    close: () => undefined,
  });
  return { asked, figures };
}

describe("quick figures beside the simulated ones", () => {
  it("are priced once, and only while no run has the machine", async () => {
    const { asked, figures } = bench(() => ({ kind: "done", value: [countRow(0, 5)] }));
    let told = 0;
    figures.subscribe(() => told++);
    expect(figures.of(problem("a"), [0])).toBeUndefined();
    await settled();
    expect(asked).toEqual([]);
    figures.allow(true);
    expect(told).toBe(1);
    for (let k = 0; k < 3; k++) figures.of(problem("a"), [0]);
    await settled();
    expect(asked).toEqual(["a"]);
    expect(told).toBe(2);
    expect(figures.of(problem("a"), [0])).toEqual([countRow(0, 5)]);
    expect(figures.of(problem("b"), [0])).toBeUndefined();
  });

  it("stay unknown where they are refused, without asking for ever", async () => {
    const { asked, figures } = bench(() => ({ kind: "refused", message: "no" }));
    figures.allow(true);
    figures.of(problem("a"), [0]);
    await settled();
    expect(figures.of(problem("a"), [0])).toBeUndefined();
    expect(asked).toEqual(["a"]);
  });
});
