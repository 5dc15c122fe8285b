import { describe, expect, it } from "vitest";
import { DomainError, estimate, investigationCost, lengthPercentiles, outcomeColumns, prepareSimulation, simulateForm, type SimulationTable, type SimulationTask } from "../../../src/engine/index.js";
import { percentile } from "../../../src/engine/numerics/percentile.js";
import { stream } from "../../../src/engine/random/stream.js";
import { ninePiles } from "../decision/example-problem.js";

// Rules that leave some damage to see: forty realisations of a cost that is nearly always nothing have no honest interval.
const task: SimulationTask = { variants: [{ name: "geometric", problem: ninePiles({ foundShare: 0.5 }) }, { name: "harmonic", problem: ninePiles({ rule: "harmonic", foundShare: 0.5 }) }], counts: [1, 4], seed: "estimate" };
const width = outcomeColumns.length;
const rows = 4;

// The cheap models stand for the dear ones: the second-order form for finite elements, and a first-order form for the control.
const second = prepareSimulation(task);
const first = { ...second, ground: { ...second.ground, forms: second.ground.forms.map((form) => ({ ...form, slope: 1, rest: 0, values: form.values.map(() => 0) })) } };
const size = 600;
const truth = Array.from({ length: size }, (_, k) => simulateForm(second, k));
const control = Array.from({ length: size }, (_, k) => simulateForm(first, k));
const both = truth.map((row, k) => Float64Array.of(...row, ...control[k]));
const columnMean = (list: readonly Float64Array[], row: number, column: number): number => list.reduce((sum, values) => sum + values[row * width + column], 0) / list.length;

describe("the errors of a table", () => {
  // Independent: repetition. Each experiment draws its realisations anew, with replacement, from a population of 600 whose means are known.
  const experiments = 500;
  const numbers = stream("coverage", 1);
  const pick = <T>(list: readonly T[], n: number): T[] => Array.from({ length: n }, () => list[Math.floor(numbers.uniform() * list.length)]);
  // The control's own mean is that of its population, whose difference from the truth's the elements must find.
  const tables = Array.from({ length: experiments }, () => estimate(task, pick(both, 40), pick(control, 400)));
  const total = Array.from({ length: rows }, (_, r) => columnMean(truth, r, 0) + columnMean(truth, r, 1) + columnMean(truth, r, 2));

  const covered = (of: (table: SimulationTable) => { value: number; error: number; true: number }): { share: number; worth: number } => {
    const all = tables.map(of);
    return {
      share: all.filter((x) => Math.abs(x.value - x.true) <= 1.96 * x.error).length / experiments,
      worth: all.reduce((sum, x) => sum + (x.value - x.true) ** 2, 0) / all.reduce((sum, x) => sum + x.error ** 2, 0),
    };
  };
  // 500 experiments at 95 % scatter by 1 %; costs that are mostly nothing and sometimes much lean to the low side of it. The interval
  // from 90 to 99 % fails by chance less than once in a million where the errors are right.
  const right = ({ share, worth }: { share: number; worth: number }): void => {
    expect(share).toBeGreaterThan(0.9);
    expect(share).toBeLessThan(0.99);
    expect(worth).toBeGreaterThan(0.7);
    expect(worth).toBeLessThan(1.3);
  };

  it.each([0, 1, 2, 3])("cover the total of row %d", (r) => {
    right(covered(({ rows: found }) => ({ value: found[r].total - found[r].investigation, error: found[r].standardError, true: total[r] })));
  });
  it.each([["failure", 1], ["delay", 2]] as const)("cover the %s cost", (part, column) => {
    right(covered(({ rows: [found] }) => ({ value: found[part], error: found.errors[part], true: columnMean(truth, 0, column) })));
  });
  it("cover the chance of failure", () => {
    right(covered(({ rows: [, found] }) => ({ value: found.failureChance, error: found.failureChanceError, true: columnMean(truth, 1, 6) })));
  });

  // Calibration: a cheapest row that is named with some chance must be right about as often as it says. 500 experiments, mean of
  // the chances against the share of hits, five standard deviations of which are 0.11.
  it("name the cheapest count as often rightly as they say", () => {
    const best = total[2] + investigationCost(task.variants[1].problem, 1) < total[3] + investigationCost(task.variants[1].problem, 4) ? 2 : 3;
    const said = tables.reduce((sum, { rows: found }) => sum + found[best].chanceWithin, 0) / experiments;
    const hits = tables.filter(({ rows: found }) => found[best].total < found[5 - best].total).length / experiments;
    expect(Math.abs(said - hits)).toBeLessThan(0.15);
    expect(said).toBeGreaterThan(0.5);
  });

  it("fall below those of plain sampling", () => {
    const plain = estimate(task, both.slice(0, 40), []);
    const controlled = estimate(task, both.slice(0, 40), control);
    plain.rows.forEach((row, r) => expect(controlled.rows[r].standardError).toBeLessThan(0.6 * row.standardError));
  });
});

describe("a table", () => {
  const table = estimate(task, both.slice(0, 50), control.slice(50));

  it("adds its parts up, prices the investigation and sorts its rows by variant", () => {
    table.rows.forEach((row, r) => {
      expect(row.total).toBeCloseTo(row.investigation + row.foundation + row.failure + row.delay, 6);
      expect(row.variant).toBe(r < 2 ? 0 : 1);
      expect(row.name).toBe(task.variants[row.variant].name);
      expect(row.count).toBe(task.counts[r % 2]);
      expect(row.investigation).toBe(investigationCost(task.variants[row.variant].problem, row.count));
    });
    expect([table.elements, table.form]).toEqual([50, 550]);
  });

  // Independent: the plain means and percentiles of all realisations, where both models agree.
  it("takes lengths and metres from all realisations", () => {
    table.rows.forEach((row, r) => {
      const metres = Float64Array.from({ length: size }, (_, k) => control[k][r * width + 5]);
      expect(row.totalMetres).toBeCloseTo(metres.reduce((sum, m) => sum + m, 0) / size, 6);
      expect(row.meanLengths).toEqual(lengthPercentiles.map((p) => percentile(metres, p) / 9));
      expect(row.foundation).toBeCloseTo(300 * row.totalMetres, 4);
    });
  });

  it("shares chances to 1, and regrets nothing less than the cheapest", () => {
    expect(table.rows.reduce((sum, row) => sum + row.chanceCheapest, 0)).toBeCloseTo(1, 9);
    for (const v of [0, 1]) expect(table.rows.filter((row) => row.variant === v).reduce((sum, row) => sum + row.chanceWithin, 0)).toBeCloseTo(1, 9);
    const cheapest = table.rows[table.cheapest];
    for (const row of table.rows) {
      expect(row.total).toBeGreaterThanOrEqual(cheapest.total);
      expect(row.regret).toBeGreaterThanOrEqual(table.expectedRegret - 1e-9);
    }
    expect(table.expectedRegret).toBe(cheapest.regret);
    expect(cheapest.notDistinguishable).toBe(true);
  });

  it("is the same however its realisations were gathered, and plain data", () => {
    expect(estimate(structuredClone(task), [...both.slice(0, 20), ...both.slice(20, 50)], [...control.slice(50, 51), ...control.slice(51)])).toEqual(table);
    expect(structuredClone(table)).toEqual(table);
    expect(JSON.stringify(table)).not.toMatch(/null/); // what JSON makes of a number that is none
  });

  it("rests on the form alone while there is no second one by elements, and on elements alone without the form", () => {
    const form = estimate(task, both.slice(0, 1), control);
    expect(form.rows[0].failure).toBeCloseTo(columnMean(control, 0, 1), 6);
    expect(form.rows[0].correlation).toBeUndefined();
    expect(estimate(task, both.slice(0, 9), []).rows[0].failure).toBeCloseTo(columnMean(truth.slice(0, 9), 0, 1), 6);
    for (const few of [estimate(task, both.slice(0, 2), []), estimate(task, both.slice(0, 2), control.slice(0, 2)), estimate(task, [], control.slice(0, 2))]) {
      for (const row of few.rows) for (const value of Object.values(row)) if (typeof value === "number") expect(Number.isFinite(value)).toBe(true);
    }
  });

  // By hand: the rule of three, for 95 % confidence: (1 - 3 / n)^n = 0.05.
  it("says what is known where no damage was seen", () => {
    const unhurt = (list: readonly Float64Array[]): Float64Array[] => list.map((row) => row.map((value, at) => (at % width === 1 || at % width === 6 ? 0 : value)));
    const { rows: found } = estimate(task, unhurt(both.slice(0, 30)), unhurt(control.slice(0, 270)));
    for (const row of found) {
      expect(row).toMatchObject({ failure: 0, failureChance: 0, damageSeen: { elements: 0, form: 0 }, failureChanceAtMost: 0.01 });
      expect(row.standardError).toBeGreaterThan(0);
    }
    expect(table.rows[0].failureChanceAtMost).toBeUndefined();
    expect(table.rows[0].damageSeen.elements).toBe(truth.slice(0, 50).filter((row) => row[6] > 0).length);
  });

  it("refuses too few realisations and those of another task", () => {
    expect(() => estimate(task, both.slice(0, 1), control.slice(0, 1))).toThrow(DomainError);
    expect(() => estimate({ ...task, counts: [1] }, both, control)).toThrow(/another task/);
    expect(() => estimate(task, control, control)).toThrow(/another task/);
  });
});
