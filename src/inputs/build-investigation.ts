import { hypotenuse, type DesignRule, type DesignRuleName, type Investigation, type PilePoint, type Point } from "../engine/index.js";
import { metres } from "../units/quantities.js";
import { amount } from "./cells.js";
import { InputError } from "./input-error.js";
import { MOST_READINGS } from "./limits.js";
import { METHODS, OWN_METHOD, OWN_READING_SPACING } from "./methods.js";
import { refusal } from "./place.js";
import type { Values } from "./values.js";

/** A hole farther than this from the middle of the piles, beside their own extent, is in other coordinates than the piles, m. */
const FARTHEST_HOLE = 1000;

/** What belongs to a method: set aside where a formula puts another method in the block's place. */
const OF_THE_METHOD = ["readingCov", "holeCov", "methodCov", "readingSpacing"] as const;

/**
 * Sets aside the block's own COVs and reading spacing where a pair of the formula replaces the method by another one of the table:
 * otherwise a table that compares methods would show the same error for each.
 *
 * @param values  the values in force; changed
 */
export function setMethodAside(values: Values): void {
  const replaced = values.replacements.get("method")?.given?.value;
  const own = values.block.inputs.get("method")?.given?.value ?? METHODS[0]!.name;
  if (replaced === undefined || replaced === own || replaced === OWN_METHOD) return;
  for (const id of OF_THE_METHOD) {
    if (!values.replacements.has(id) && values.block.inputs.get(id)?.given !== undefined) values.setAside.set(id, "set aside: the formula puts another method in place of the block's");
  }
}

/**
 * Errors and reading spacing in force: own ones before those of the method.
 *
 * @param values  the values in force
 * @returns       COVs as ratios, spacing in m
 * @throws {InputError} an own method without its COVs
 */
export function methodInForce(values: Values): Pick<Investigation, "readingCov" | "holeCov" | "methodCov"> & { readonly spacing: number; readonly name: string } {
  const name = values.text("method");
  const method = METHODS.find((row) => row.name === name);
  const cov = (id: "readingCov" | "holeCov" | "methodCov", label: string): number => {
    const value = values.optional(id) ?? method?.[id];
    if (value === undefined) throw new InputError(`${label} is missing: ${values.named("method")} is own, so the section Investigation needs a row "${label}" with a number, or the word none.`);
    return value;
  };
  return {
    name,
    readingCov: cov("readingCov", "Reading COV"),
    holeCov: cov("holeCov", "Hole COV"),
    methodCov: cov("methodCov", "Method COV"),
    spacing: values.optional("readingSpacing") ?? method?.readingSpacing ?? OWN_READING_SPACING,
  };
}

/**
 * The investigation of the problem.
 *
 * @param values       the values in force
 * @param regionalCov  of the ground, a ratio
 * @param piles        for the check that holes and piles share their coordinates
 * @returns            errors, spacing, depth, holes and design rule, SI
 * @throws {InputError} holes without a reading or with too many, two holes in one place, holes far away
 */
export function buildInvestigation(values: Values, regionalCov: number, piles: readonly PilePoint[] | undefined): Investigation {
  const { readingCov, holeCov, methodCov, spacing } = methodInForce(values);
  const depth = values.number("holeDepth");
  if (depth < spacing) throw refusal(values.place("holeDepth"), `is ${amount(depth)} m, less than ${values.named("readingSpacing")} of ${amount(spacing)} m: no hole would have a reading`);
  if (depth / spacing > MOST_READINGS) {
    throw refusal(values.place("readingSpacing"), `is ${amount(spacing)} m, which makes ${Math.floor(depth / spacing)} readings in a hole of ${amount(depth)} m; at most ${MOST_READINGS} are used, so average nearer readings and write the distance of the averages`);
  }
  const designRule = buildDesignRule(values, regionalCov);
  // a table begins with few holes, and one reading has no standard deviation
  if (designRule.name === "lessdeviations" && depth < 2 * spacing * (1 - 1e-9)) {
    throw refusal(values.place("holeDepth"), `is ${amount(depth)} m, which gives a hole one reading at ${values.named("readingSpacing")} of ${amount(spacing)} m; the design rule mean less deviations needs at least two, so read more closely or drill deeper`);
  }
  return { readingCov, holeCov, methodCov, readingSpacing: metres(spacing), holeDepth: metres(depth), holes: buildHoles(values, piles), designRule };
}

function buildHoles(values: Values, piles: readonly PilePoint[] | undefined): Point[] | undefined {
  const list = values.list("holeList");
  if (list === undefined) return undefined;
  const holes = list.rows.map(({ values: [, x, y] }) => ({ x: metres(x!), y: metres(y!) }));
  const row = (index: number) => `row ${list.rows[index]!.row} of the site block`;
  const reach = piles === undefined ? undefined : middleAndReach(piles);
  holes.forEach((hole, i) => {
    const twin = holes.findIndex((other, j) => j < i && other.x === hole.x && other.y === hole.y);
    if (twin >= 0) throw new InputError(`Holes ${twin + 1} and ${i + 1} of the hole list (rows ${list.rows[twin]!.row} and ${list.rows[i]!.row} of the site block) stand in one place; give each hole its own.`);
    if (reach === undefined) return;
    const away = hypotenuse(hole.x - reach.x, hole.y - reach.y);
    if (away > reach.radius + FARTHEST_HOLE) throw new InputError(`Hole ${i + 1} of the hole list (${row(i)}) stands ${amount(Math.round(away))} m from the middle of the piles; holes and piles need the same coordinates.`);
  });
  return holes;
}

function middleAndReach(piles: readonly PilePoint[]): { x: number; y: number; radius: number } {
  const xs = piles.map(({ x }) => x);
  const ys = piles.map(({ y }) => y);
  const [left, right, low, high] = [Math.min(...xs), Math.max(...xs), Math.min(...ys), Math.max(...ys)];
  return { x: (left + right) / 2, y: (low + high) / 2, radius: hypotenuse(right - left, high - low) / 2 };
}

function buildDesignRule(values: Values, regionalCov: number): DesignRule {
  const name = values.text("designRule") as DesignRuleName;
  const deviations = values.number("deviationsBelowMean");
  if (name !== "lessdeviations" && values.replacements.has("deviationsBelowMean")) {
    throw refusal(values.place("deviationsBelowMean"), "changes nothing: it belongs to the design rule mean less deviations, which is not in force");
  }
  // without regional knowledge there is nothing to weigh the readings against
  return { name, deviations, update: regionalCov > 0 && values.text("regionalUpdate") === "yes" };
}
