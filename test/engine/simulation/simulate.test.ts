import { describe, expect, it } from "vitest";
import { DomainError, outcomeColumns, prepareSimulation, simulateElements, simulateForm, type SimulationTask } from "../../../src/engine/index.js";
import { kilopascals, metres } from "../../../src/units/quantities.js";
import { ninePiles } from "../decision/example-problem.js";

const base = ninePiles({ regionalCov: 0.3, foundShare: 0.5 });
const coarse = { ...base, investigation: { ...base.investigation, readingSpacing: metres(2), readingCov: 0.4, designRule: { name: "quartile" as const, deviations: 1, update: false } } };
const task: SimulationTask = { variants: [{ name: "fine", problem: base }, { name: "coarse", problem: coarse }], counts: [0, 1, 4], seed: "simulate" };
const width = outcomeColumns.length;
const simulation = prepareSimulation(task);

describe("a realisation", () => {
  // Identity: nothing but task, kind and index may decide.
  it("is the same whatever was simulated before, in whatever simulation", () => {
    const elements = simulateElements(simulation, 3);
    const form = simulateForm(simulation, 3);
    simulateForm(simulation, 8);
    simulateElements(simulation, 0);
    expect(simulateForm(simulation, 3)).toEqual(form);
    const another = prepareSimulation(structuredClone(task));
    simulateForm(another, 1);
    expect(simulateElements(another, 3)).toEqual(elements);
    expect(simulateForm(another, 3)).toEqual(form);
  });

  it("has its own numbers for each index, kind and seed", () => {
    const [a, b] = [simulateForm(simulation, 0), simulateForm(simulation, 1)];
    const beside = simulateElements(simulation, 0).subarray(a.length);
    const other = simulateForm(prepareSimulation({ ...task, seed: "other" }), 0);
    for (const values of [b, beside, other]) expect(values.filter((value, k) => value !== a[k]).length).toBeGreaterThan(8);
  });

  it("has elements first and the form in the same ground second", () => {
    const both = simulateElements(simulation, 5);
    const size = task.variants.length * task.counts.length * width;
    expect(both.length).toBe(2 * size);
    expect(simulateForm(simulation, 5).length).toBe(size);
    for (let row = 0; row < 6; row++) {
      // what is built does not depend on how piles are analysed
      for (const column of [0, 5, 7]) expect(both[row * width + column]).toBe(both[size + row * width + column]);
    }
    expect([...both].every(Number.isFinite)).toBe(true);
    expect([...both.subarray(0, size)]).not.toEqual([...both.subarray(size)]);
  });

  // Identity: the ground is there before anybody drills, and what a count or variant costs does not depend on what it is compared with.
  it("prices no holes the same beside other counts and variants", () => {
    const alone = prepareSimulation({ ...task, variants: [task.variants[1]], counts: [0] });
    for (const index of [0, 1, 2]) expect(simulateForm(alone, index)).toEqual(simulateForm(simulation, index).subarray(3 * width, 4 * width));
  });

  it("gives two variants of one problem the same figures", () => {
    const twice = prepareSimulation({ ...task, variants: [task.variants[0], { name: "again", problem: base }] });
    const row = simulateForm(twice, 2);
    expect(row.subarray(0, 3 * width)).toEqual(row.subarray(3 * width));
  });
});

// Identity: settlement is load over stiffness, so one factor on loads, ground and pile moduli cancels.
it("one factor on loads and stiffnesses changes nothing", () => {
  const scaled = {
    ...base,
    ground: { ...base.ground, layers: base.ground.layers.map((l) => ({ ...l, mean: kilopascals(l.mean * 2.5) })) },
    piles: { ...base.piles, modulus: kilopascals(base.piles.modulus * 2.5) },
    building: { ...base.building, piles: base.building.piles.map((p) => ({ ...p, load: (p.load * 2.5) as typeof p.load })) },
  };
  const other = prepareSimulation({ ...task, variants: [{ name: "scaled", problem: scaled }] });
  for (const index of [0, 4]) {
    const [a, b] = [simulateElements(simulation, index), simulateElements(other, index)];
    for (let k = 0; k < 3 * width; k++) expect(Math.abs(b[k] - a[k])).toBeLessThanOrEqual(1e-6 * Math.abs(a[k]) + 1e-6);
  }
});

// Common sense of elasticity: neighbours' loads only add settlement, and most to the piles in the middle, which carry most.
it("group interaction changes damage and nothing that is built", () => {
  const group = prepareSimulation({ ...task, variants: task.variants.map(({ name, problem }) => ({ name, problem: { ...problem, piles: { ...problem.piles, groupInteraction: true } } })) });
  let changed = 0;
  for (let index = 0; index < 4; index++) {
    const [alone, together] = [simulateForm(simulation, index), simulateForm(group, index)];
    for (let row = 0; row < 6; row++) {
      for (let column = 0; column < width; column++) {
        const at = row * width + column;
        if (column === 1 || column === 6) changed += together[at] === alone[at] ? 0 : 1;
        else expect(together[at]).toBe(alone[at]);
      }
    }
  }
  expect(changed).toBeGreaterThan(5);
  expect(simulation.interaction).toBeUndefined();
  expect(group.interaction).toBeDefined();
});

describe("refusals", () => {
  const refused = (change: Partial<SimulationTask>, sentence: RegExp): void => {
    expect(() => prepareSimulation({ ...task, ...change })).toThrow(DomainError);
    expect(() => prepareSimulation({ ...task, ...change })).toThrow(sentence);
  };
  it("no variants, no counts, counts that are none or named twice", () => {
    refused({ variants: [] }, /Number of variants is 0/);
    refused({ counts: [] }, /Number of counts is 0/);
    refused({ counts: [1.5] }, /Number of holes is 1.5/);
    refused({ counts: [2, 2] }, /each named once/);
  });
  it("variants of another ground, building or pile", () => {
    for (const problem of [ninePiles({ cov: 0.5, regionalCov: 0.3 }), { ...base, piles: { ...base.piles, diameter: metres(0.6) } }, { ...base, building: { ...base.building, value: 1 } }]) {
      refused({ variants: [task.variants[0], { name: "other", problem }] }, /"other"/);
    }
  });
  it("a hole list that is too short, and readings deeper than the hole", () => {
    refused({ variants: [{ name: "", problem: ninePiles({ holes: [[0, 0]] }) }], counts: [2] }, /length of the hole list/);
    refused({ variants: [{ name: "", problem: { ...base, investigation: { ...base.investigation, readingSpacing: metres(40) } } }] }, /Reading spacing/);
  });
  it("an index that is none", () => {
    expect(() => simulateForm(simulation, -1)).toThrow(DomainError);
    expect(() => simulateElements(simulation, 0.5)).toThrow(DomainError);
  });
});
