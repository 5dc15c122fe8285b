import { describe, expect, it } from "vitest";
import { DomainError } from "../../src/engine/numerics/domain-error.js";
import { moments } from "../../src/engine/numerics/moments.js";

// Source: NIST/ITL Statistical Reference Datasets, univariate summary statistics; certified mean, standard deviation (n - 1) and
// lag-one autocorrelation. NumAcc1 to 4 are generated; the data of Michelso and Mavro are from memory, and the
// certified values, which depend on every value and its place, confirm them.

/** c once, then c - 0.1 and c + 0.1 five hundred times each. */
const numAcc = (c: string, below: string, above: string) => [Number(c), ...Array.from({ length: 1000 }, (_, k) => Number(k % 2 === 0 ? below : above))];

// Michelson (1879), speed of light in air, km/s less 299,000, in the order of the experiments.
const michelso = [
  850, 740, 900, 1070, 930, 850, 950, 980, 980, 880, 1000, 980, 930, 650, 760, 810, 1000, 1000, 960, 960, 960, 940, 960, 940, 880, 800, 850, 880, 900, 840,
  830, 790, 810, 880, 880, 830, 800, 790, 760, 800, 880, 880, 880, 860, 720, 720, 620, 860, 970, 950, 880, 910, 850, 870, 840, 840, 850, 840, 840, 840,
  890, 810, 810, 820, 800, 770, 760, 740, 750, 760, 910, 920, 890, 860, 880, 720, 840, 850, 850, 780, 890, 840, 780, 810, 760, 810, 790, 810, 820, 850,
  870, 870, 810, 740, 810, 940, 950, 800, 810, 870,
].map((speed) => 299 + speed / 1000);

// Mavrodineanu, filter transmittance.
const mavro = [
  180, 170, 180, 190, 180, 170, 150, 140, 150, 150, 170, 180, 180, 190, 190, 210, 200, 160, 140, 130, 130, 150, 150, 160, 150,
  140, 130, 140, 150, 140, 150, 160, 150, 160, 190, 200, 200, 210, 220, 230, 240, 250, 270, 260, 260, 260, 270, 260, 250, 240,
].map((part) => Number(`2.00${part}`));

const SETS: { name: string; data: number[]; mean: number; sd: number; lagOne: number; sdTolerance: number }[] = [
  { name: "NumAcc1", data: [10000001, 10000003, 10000002], mean: 10000002, sd: 1, lagOne: -0.5, sdTolerance: 1e-15 },
  { name: "NumAcc2", data: numAcc("1.2", "1.1", "1.3"), mean: 1.2, sd: 0.1, lagOne: -0.999, sdTolerance: 1e-14 },
  // Storing the data in binary alone moves the last two standard deviations, by 4e-9 of themselves in NumAcc4.
  { name: "NumAcc3", data: numAcc("1000000.2", "1000000.1", "1000000.3"), mean: 1000000.2, sd: 0.1, lagOne: -0.999, sdTolerance: 1e-9 },
  { name: "NumAcc4", data: numAcc("10000000.2", "10000000.1", "10000000.3"), mean: 10000000.2, sd: 0.1, lagOne: -0.999, sdTolerance: 1e-8 },
  { name: "Michelso", data: michelso, mean: 299.8524, sd: 0.0790105478190518, lagOne: 0.535199668621283, sdTolerance: 1e-12 },
  { name: "Mavro", data: mavro, mean: 2.001856, sd: 0.000429123454003053, lagOne: 0.937989183438248, sdTolerance: 1e-11 },
];

describe("moments", () => {
  it.each(SETS)("meet the certified values of $name", ({ data, mean, sd, lagOne, sdTolerance }) => {
    const found = moments(data);
    expect(Math.abs(found.mean / mean - 1)).toBeLessThan(1e-14);
    expect(Math.abs(found.sd / sd - 1)).toBeLessThan(sdTolerance);
    expect(Math.abs(found.lagOneCorrelation - lagOne)).toBeLessThan(Math.max(sdTolerance, 1e-13));
  });

  it("take a single value and a constant series, and refuse none", () => {
    expect(moments([3])).toEqual({ mean: 3, sd: 0, lagOneCorrelation: 0 });
    expect(moments([0.1, 0.1, 0.1])).toEqual({ mean: 0.1, sd: 0, lagOneCorrelation: 0 });
    expect(() => moments([])).toThrow(DomainError);
  });
});
