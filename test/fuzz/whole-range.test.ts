import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { callFunction } from "../../src/functions/registry.js";
import { CATALOGUE, InputError, parseSite } from "../../src/inputs/index.js";
import { randomBlock, type Row } from "./random-block.js";

/** What the functions of one count give. */
const PARTS = ["INVESTIGATIONCOST", "FOUNDATIONCOST", "FAILURECOST", "DELAYCOST"] as const;
/** Seconds of computing that one block may take; none comes near it. */
const LONGEST = 10;

const number = (id: string, rows: readonly Row[], ...rest: unknown[]): number => callFunction(id, [rows, ...rest]) as number;

/** Blocks that are accepted; the others must be refused with a sentence. */
function accepted(blocks: readonly Row[][]): Row[][] {
  return blocks.filter((rows) => {
    try {
      parseSite(rows);
      return true;
    } catch (reason) {
      expect(reason).toBeInstanceOf(InputError);
      expect((reason as InputError).message).toMatch(/^[^\n]{10,900}[.?]$/);
      return false;
    }
  });
}

const sites = (seed: number, howMany: number, mostPiles: number): Row[][] => accepted(fc.sample(randomBlock(mostPiles), { numRuns: howMany, seed }));
const largest = (rows: readonly Row[]): number => parseSite(rows).problem.investigation.holes?.length ?? 60;
const shown = (rows: readonly Row[]): string => rows.map((row) => row.slice(0, 3).join(" | ")).join("\n");

/** Everything that must hold of a block at some counts, whatever stands in it. */
function expectSound(rows: readonly Row[], counts: readonly number[]): void {
  const where = shown(rows);
  const started = process.cpuUsage();
  const table = callFunction("COSTTABLE", [rows, [counts]]) as (string | number)[][];
  let before = 0;
  counts.forEach((count) => {
    const [investigation, ...others] = PARTS.map((id) => number(id, rows, count)) as [number, ...number[]];
    const total = number("TOTALCOST", rows, count);
    const chance = number("FAILURECHANCE", rows, count);
    const figures = [investigation, ...others, total, chance, number("CARBON", rows, count), number("CONTINGENCY", rows, count, 80), number("SAVING", rows, 0, count)];
    expect(figures.every(Number.isFinite), `${figures.join(" ")}\n${where}`).toBe(true);
    expect(Math.min(investigation, ...others), where).toBeGreaterThanOrEqual(0);
    expect(Math.abs(investigation + others.reduce((sum, part) => sum + part, 0) - total), where).toBeLessThanOrEqual(1e-12 * total);
    expect(total, where).toBeGreaterThanOrEqual(Math.max(investigation, ...others));
    expect(chance >= 0 && chance <= 1, `chance ${chance}\n${where}`).toBe(true);
    expect(investigation, where).toBeGreaterThanOrEqual(before);
    if (count === 0) expect(investigation, where).toBe(0);
    before = investigation;
    const line = table.find((cells) => cells[0] === count)!;
    expect(line.slice(0, 6), where).toEqual([count, investigation, ...others, total]);
    expect(line.every((cell) => typeof cell === "number" && Number.isFinite(cell)), where).toBe(true);
    expectLengths(rows, count, where);
  });
  const chances = table.slice(1).map((row) => row[7] as number);
  expect(Math.abs(chances.reduce((sum, chance) => sum + chance, 0) - 1), where).toBeLessThan(1e-9);
  expect(process.cpuUsage(started).user / 1e6, where).toBeLessThan(LONGEST);
}

function expectLengths(rows: readonly Row[], count: number, where: string): void {
  const { shortest, longest } = parseSite(rows).problem.piles;
  const lengths = [5, 50, 95].map((percentile) => number("PILELENGTH", rows, count, percentile));
  lengths.forEach((length, k) => {
    expect(length >= shortest * (1 - 1e-9) && length <= longest * (1 + 1e-9), `lengths ${lengths.join(" ")}\n${where}`).toBe(true);
    if (k > 0) expect(length, where).toBeGreaterThanOrEqual(lengths[k - 1]! * (1 - 1e-9));
  });
}

describe("over the whole range that is accepted", () => {
  it("small sites at any count have finite figures that add up, in bounded time, alike in table and functions", { timeout: 120_000 }, () => {
    const blocks = sites(101, 48, 9);
    expect(blocks.length).toBeGreaterThan(25);
    blocks.forEach((rows, k) => expectSound(rows, [0, 1, [2, 3, 6][k % 3]!, ...(k === 7 ? [60] : [])].filter((count) => count <= largest(rows))));
  });

  it("so have sites of a hundred piles", { timeout: 120_000 }, () => {
    const blocks = sites(102, 200, 100).filter((rows) => parseSite(rows).problem.building.piles.length === 100).slice(0, 2);
    expect(blocks).toHaveLength(2);
    for (const rows of blocks) expectSound(rows, [0, 3].filter((count) => count <= largest(rows)));
  });

  it("the extremes of every number, one at a time, in a usual site", { timeout: 120_000 }, () => {
    const usual = sites(103, 40, 4)[0]!;
    let priced = 0;
    for (const { label, minimum, maximum, kind } of CATALOGUE as readonly { label: string; minimum?: number; maximum?: number; kind: string }[]) {
      if (minimum === undefined || maximum === undefined || kind === "counts" || kind === "list") continue;
      for (const value of [minimum, maximum]) {
        const rows = usual.map((row): Row => (row[0] === label ? [label, value, ...row.slice(2)] : row));
        if (rows.every((row, k) => row === usual[k]) || accepted([rows]).length === 0) continue;
        expectSound(rows, [0, 1]);
        priced++;
      }
    }
    expect(priced).toBeGreaterThan(40);
  });
});

describe("what changes nothing, over the whole range", () => {
  const blocks = sites(104, 60, 6).filter((rows) => largest(rows) >= 2).slice(0, 9);
  const figures = (rows: readonly Row[], ...pairs: unknown[]): number[] => ["TOTALCOST", "FAILURECHANCE", "CARBON"].map((id) => number(id, rows, 2, ...pairs));

  it("the order of the rows", { timeout: 60_000 }, () => {
    blocks.forEach((rows, k) => {
      const shuffled = fc.sample(fc.shuffledSubarray(pieces(rows), { minLength: pieces(rows).length }), { numRuns: 1, seed: 500 + k })[0]!.flat();
      expect(figures(shuffled), shown(rows)).toEqual(figures(rows));
    });
  });

  it("writing an input as a pair of the formula instead of in its row", { timeout: 60_000 }, () => {
    blocks.forEach((rows, k) => {
      const other = blocks[(k + 1) % blocks.length]!;
      const replaceable = rows.filter(([label, value]) => label !== "Seed" && typeof value === "number" && CATALOGUE.some((entry) => entry.label === label));
      for (const [label] of [replaceable[k % replaceable.length]!, replaceable[(7 * k + 3) % replaceable.length]!]) {
        const value = other.find((row) => row[0] === label)?.[1];
        const written = rows.map((row): Row => (row[0] === label ? [label!, value ?? "", ...row.slice(2)] : row));
        if (typeof value !== "number" || accepted([written]).length === 0) continue;
        expect(figures(rows, label, value), `${label} ${value}\n${shown(rows)}`).toEqual(figures(written));
      }
    });
  });

  // Source: exact definitions of the units, written out apart from the code under test.
  it("units: feet, pounds and kips give the same money, and results in them the same lengths and masses", { timeout: 60_000 }, () => {
    for (const rows of blocks) {
      const found = figures(customary(rows));
      figures(rows).forEach((figure, k) => expect(Math.abs(found[k]! - figure), shown(rows)).toBeLessThanOrEqual(1e-6 * Math.abs(figure) + 1e-9));
      const us: Row[] = [...rows, ["Units of results", "US customary", "", ""]];
      expect(number("TOTALCOST", us, 2), shown(rows)).toBe(number("TOTALCOST", rows, 2));
      expect(number("PILELENGTH", us, 2, 50) / (number("PILELENGTH", rows, 2, 50) / 0.3048), shown(rows)).toBeCloseTo(1, 12);
      const carbon = number("CARBON", rows, 2);
      expect(Math.abs(number("CARBON", us, 2) - carbon / 0.45359237), shown(rows)).toBeLessThanOrEqual(1e-12 * carbon / 0.45359237);
    }
  });

  // Six errors, and a millionth for damage so rare that hardly a draw sees it, whose error the draws cannot tell. With a length from the nearest hole the
  // design values are a sample too, which shows where nothing is at stake.
  it("the seed, but for the stated error", { timeout: 60_000 }, () => {
    let different = 0;
    for (const rows of blocks) for (const rule of [[], ["Length rule", "nearest hole", "Building value", "none"]]) {
      const error = (...pairs: unknown[]): number => (callFunction("COSTTABLE", [rows, 2, ...rule, ...pairs]) as number[][])[3]![6]!;
      const [one, other] = [number("TOTALCOST", rows, 2, ...rule), number("TOTALCOST", rows, 2, ...rule, "Seed", 4711)];
      expect(Math.abs(one - other), shown(rows)).toBeLessThanOrEqual(6 * Math.hypot(error(), error("Seed", 4711)) + 1e-6 * one);
      if (one !== other) different++;
    }
    expect(different).toBeGreaterThan(4);
  });
});

const CUSTOMARY: Readonly<Record<string, readonly [string, number]>> = {
  "m": ["ft", 1 / 0.3048], "mm": ["in", 1 / 25.4], "MPa": ["psf", 1e6 / (4.4482216152605 / 0.3048 ** 2)], "GPa": ["ksf", 1e6 / (4.4482216152605 / 0.3048 ** 2)], "kN": ["kip", 1 / 4.4482216152605],
  "EUR/m": ["EUR/ft", 0.3048], "MPa/m": ["psf/ft", 1e6 / (4.4482216152605 / 0.3048 ** 3)], "kg/m3": ["lb/ft3", 0.3048 ** 3 / 0.45359237],
};

/** A block with its single inputs in customary units; lists stay as they are. */
function customary(rows: readonly Row[]): Row[] {
  return rows.map((row): Row => {
    const known = CUSTOMARY[String(row[2])];
    return known === undefined || typeof row[1] !== "number" ? row : [row[0]!, row[1] * known[1], known[0], ""];
  });
}

/** The block cut into what may stand in any order: single rows, and lists with their rows and the blank one below. */
function pieces(rows: readonly Row[]): Row[][] {
  const labels = new Set(CATALOGUE.map(({ label }) => label));
  const found: Row[][] = [];
  for (const row of rows) {
    if (labels.has(String(row[0]))) found.push([row]);
    else found.at(-1)!.push(row);
  }
  return found;
}
