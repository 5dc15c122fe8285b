import { describe, expect, it } from "vitest";
import { DomainError, estimate, growthWanted, mostRealisations, nextBatch, outcomeColumns, usualRegret, type SimulationTask, type Totals } from "../../../src/engine/index.js";
import { stream } from "../../../src/engine/random/stream.js";
import { ninePiles } from "../decision/example-problem.js";

const task: SimulationTask = { variants: [{ name: "", problem: ninePiles() }], counts: [1, 2, 3], seed: "next" };
const width = outcomeColumns.length;

/** Price of a hole of the nine-pile building. */
const hole = 1500 + 120 * 15.6;

/** Made-up outcomes: each count's total scatters by 1000 about its mean, and the form misses elements by so much. */
function rows(seed: number, n: number, missing: number, means: readonly number[] = [0, 15, 2000], scatter = 1000): { elements: Float64Array[]; form: Float64Array[] } {
  const numbers = stream("made up", seed);
  const outcome = (): Float64Array => {
    const row = new Float64Array(3 * width);
    means.forEach((mean, c) => {
      row[c * width + 1] = 50_000 + mean - hole * c + scatter * numbers.normal();
      row[c * width + 5] = 90;
    });
    return row;
  };
  const form = Array.from({ length: 40_000 }, outcome);
  const elements = Array.from({ length: n }, () => {
    const beside = outcome();
    return Float64Array.of(...beside.map((value, at) => value + (at % width === 1 ? missing * numbers.normal() : 0)), ...beside);
  });
  return { elements, form };
}
const made = rows(1, 3000, 100);
const run = (target: Parameters<typeof nextBatch>[1], list = made, most?: Totals): Totals[] => {
  const steps: Totals[] = [{ elements: 0, form: 0 }];
  for (;;) {
    const { elements, form } = steps[steps.length - 1];
    const next = nextBatch(task, target, list.elements.slice(0, elements), list.form.slice(0, form), most);
    if (next === "full") expect(most).toBeDefined();
    if (next === "enough" || next === "full") return steps;
    expect(next.elements).toBeGreaterThanOrEqual(elements);
    expect(next.form).toBeGreaterThanOrEqual(form);
    expect(next.elements + next.form).toBeGreaterThan(elements + form);
    steps.push(next);
  }
};
const last = (steps: Totals[]): Totals => steps[steps.length - 1];

describe("nextBatch to a precision", () => {
  it("ends where the expected regret is below the sum, and not before", () => {
    const steps = run({ regret: 8 });
    const tables = steps.slice(1).map(({ elements, form }) => estimate(task, made.elements.slice(0, elements), made.form.slice(0, form)));
    expect(tables[tables.length - 1].expectedRegret).toBeLessThanOrEqual(8);
    tables.slice(0, -1).forEach((table) => expect(table.expectedRegret > 8 || table.elements < 24).toBe(true));
    expect(steps.length).toBeGreaterThan(2);
  });

  it("wants more for less regret, and never fewer than a variance can be told from", () => {
    const [rough, fine] = [last(run({ regret: 1e9 })), last(run({ regret: 2 }))];
    expect(rough.elements).toBeGreaterThanOrEqual(24);
    expect(fine.form).toBeGreaterThan(rough.form);
  });

  // Optimum by hand: N / n = root(b / (a w)): a form that misses four times as much wants four times as many elements for each form.
  it("splits the work by what the form leaves and what it explains", () => {
    const ratio = (missing: number): number => {
      const { elements, form } = rows(2, 800, missing);
      const next = nextBatch(task, { realisations: 500 }, elements.slice(0, 16), form.slice(0, 512));
      return typeof next === "string" ? 0 : next.form / next.elements;
    };
    const [near, far] = [ratio(60), ratio(240)];
    expect(near / far).toBeGreaterThan(3);
    expect(near / far).toBeLessThan(5);
    expect(far).toBeGreaterThan(4);
  });
});

describe("nextBatch to a number", () => {
  // Who asks for twenty realisations means the time of about twenty: the form's work stays below a few times that of the elements,
  // however well it follows them. Nine piles: a realisation by the form is about an eightieth of one by elements.
  it("does not let the form take over", () => {
    const { elements, form } = rows(3, 20, 1);
    const next = nextBatch(task, { realisations: 20 }, elements.slice(0, 16), form.slice(0, 512));
    expect(typeof next === "string" ? 0 : next.form).toBeLessThan(20 * 400);
    expect(typeof next === "string" ? 0 : next.form).toBeGreaterThan(20 * 100);
  });

  it("ends at that number", () => expect(last(run({ realisations: 40 })).elements).toBe(40));

  // Identity: a run continued to more gives what one long run would have.
  it("ends at the same totals at once or by way of fewer", () => {
    const direct = last(run({ realisations: 60 }));
    const { elements, form } = last(run({ realisations: 30 }));
    expect(nextBatch(task, { realisations: 60 }, made.elements.slice(0, elements), made.form.slice(0, form))).toEqual(direct);
    expect(nextBatch(task, { realisations: 30 }, made.elements.slice(0, 60), made.form)).toBe("enough");
  });

  it("serves fewer than the pilot has", () => expect(last(run({ realisations: 5 })).elements).toBe(5));

  it("refuses targets that are none", () => {
    for (const target of [{ realisations: 1 }, { realisations: 2.5 }, { regret: 0 }, { regret: Number.NaN }]) expect(() => nextBatch(task, target, [], [])).toThrow(DomainError);
  });
});

describe("a run that may keep so many and no more", () => {
  const at = ({ elements, form }: Totals, target: Parameters<typeof nextBatch>[1], most: Totals) => nextBatch(task, target, made.elements.slice(0, elements), made.form.slice(0, form), most);

  it("never asks for more, and says when a precision needs them", () => {
    const most = { elements: 300, form: 4000 };
    const end = last(run({ regret: 0.05 }, made, most));
    expect(end.form).toBeLessThanOrEqual(most.form);
    expect(end.elements).toBeLessThanOrEqual(most.elements);
    expect(at(end, { regret: 0.05 }, most)).toBe("full");
    expect(at(end, { regret: 1e6 }, most)).toBe("enough");
  });

  // Variances of the two parts add up: with fewer by the form, more by elements reach the same precision.
  it("lets the elements give what the form may not", () => {
    const unbound = last(run({ regret: 2 }));
    const most = { elements: 3000, form: Math.floor(0.8 * unbound.form) };
    const bound = last(run({ regret: 2 }, made, most));
    expect(bound.form).toBe(most.form);
    expect(bound.elements).toBeGreaterThan(unbound.elements);
    expect(at(bound, { regret: 2 }, most)).toBe("enough");
  });

  it("keeps to a number and caps what the form adds to it", () => {
    const end = last(run({ realisations: 60 }, made, { elements: 60, form: 1000 }));
    expect(end).toEqual({ elements: 60, form: 1000 });
  });

  // By hand: 8 columns of 8 bytes, 3 counts; by elements the form's beside them; 200 bytes about each row. 64 and 96 MiB.
  it("is told by the bytes that its rows take", () => {
    expect(mostRealisations(task)).toEqual({ elements: Math.floor((64 * 1048576) / 584), form: Math.floor((96 * 1048576) / 392) });
    const wide = { ...task, variants: Array.from({ length: 6 }, (_, k) => ({ ...task.variants[0], name: String(k) })), counts: Array.from({ length: 20 }, (_, k) => k) };
    expect(mostRealisations(wide)).toEqual({ elements: Math.floor((64 * 1048576) / 15560), form: Math.floor((96 * 1048576) / 7880) });
  });
});

// By hand: a hole costs 1500 + 120 x 15.6; where holes cost nothing a thousandth of the building.
it("usualRegret is the price of one hole more", () => {
  expect(usualRegret(task)).toBeCloseTo(hole, 9);
  const { problem } = task.variants[0];
  expect(usualRegret({ ...task, variants: [{ name: "", problem: { ...problem, prices: { ...problem.prices, perHole: 0, perHoleMetre: 0 } } }] })).toBe(2000);
});

it("growthWanted follows the square of the regret", () => {
  const table = estimate(task, made.elements.slice(0, 30), made.form.slice(0, 600));
  expect(growthWanted(table, table.expectedRegret / 3)).toBeCloseTo(9, 9);
});
