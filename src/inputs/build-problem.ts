import type { Delay, LengthRule, PileSpecification, Prices, Problem } from "../engine/index.js";
import { kilopascals, metres } from "../units/quantities.js";
import { buildBuilding, buildPiles } from "./build-building.js";
import { buildGround } from "./build-ground.js";
import { buildInvestigation } from "./build-investigation.js";
import { CATALOGUE, type InputId } from "./catalogue.js";
import { amount } from "./cells.js";
import { attempt, type Fault } from "./fault.js";
import { InputError } from "./input-error.js";
import { refusal } from "./place.js";
import { whereAvailable, type Values } from "./values.js";

/**
 * The whole question, with every check that needs more than one input.
 *
 * @param values  the values in force
 * @param faults  where refusals are noted
 * @returns       the problem, or undefined where a part of it was refused
 */
export function buildProblem(values: Values, faults: Fault[]): Problem | undefined {
  const part = <T>(id: InputId, label: string, build: () => T): T | undefined =>
    attempt(faults, { id, label, row: values.block.rows.get(id) }, () => whereAvailable(build));
  part("buildingValue", "Building value", () => requireOneCurrency(values));
  const ground = part(values.hasList("layerList") ? "layerList" : "meanStiffness", "Ground", () => buildGround(values));
  const specification = part("longestLength", "Longest length", () => buildSpecification(values));
  const piles = part(values.hasList("pileList") ? "pileList" : "pilesAlongX", "Piles", () => buildPiles(values));
  const building = piles && part("damageList", "Damage list", () => buildBuilding(values, piles));
  const regionalCov = whereAvailable(() => values.number("regionalCov")) ?? 0;
  const investigation = part(values.hasList("holeList") ? "holeList" : "holeDepth", "Investigation", () => buildInvestigation(values, regionalCov, piles));
  const prices = whereAvailable(() => buildPrices(values));
  const delay = whereAvailable(() => buildDelay(values));
  const seed = whereAvailable(() => values.text("seed"));
  if (!ground || !specification || !building || !investigation || !prices || !delay || seed === undefined) return undefined;
  return { ground, building, piles: specification, investigation, prices, delay, seed };
}

function buildSpecification(values: Values): PileSpecification {
  const diameter = values.number("pileDiameter");
  const shortest = values.number("shortestLength");
  const longest = values.number("longestLength");
  const step = values.number("lengthStep");
  if (shortest < 2 * diameter * (1 - 1e-9)) throw refusal(values.place("shortestLength"), `is ${amount(shortest)} m, less than twice ${values.named("pileDiameter")} of ${amount(diameter)} m: that is a footing, not a pile`);
  if (longest < shortest) throw refusal(values.place("longestLength"), `is ${amount(longest)} m, less than ${values.named("shortestLength")} of ${amount(shortest)} m`);
  if (longest < 1.1 * shortest * (1 - 1e-9)) throw refusal(values.place("longestLength"), `is ${amount(longest)} m and ${values.named("shortestLength")} is ${amount(shortest)} m; the longest must be at least a tenth longer, or there is no length to choose`);
  if (step > longest - shortest) throw refusal(values.place("lengthStep"), `is ${amount(step)} m, more than the ${amount(longest - shortest)} m between the shortest and the longest length`);
  return {
    diameter: metres(diameter), modulus: kilopascals(values.number("pileModulus")), shortest: metres(shortest), longest: metres(longest),
    lengthStep: metres(step), lengthRule: values.text("lengthRule") as LengthRule, groupInteraction: values.text("groupInteraction") === "on",
  };
}

function buildPrices(values: Values): Prices {
  return {
    mobilisation: values.number("mobilisation"), perHole: values.number("pricePerHole"), perHoleMetre: values.number("pricePerMetreOfHole"),
    perReading: values.number("pricePerReading"), report: values.number("report"), daysPerHole: values.number("daysPerHole"),
    waitingDay: values.number("waitingDayPrice"), rig: values.number("rig"), perPile: values.number("pricePerPile"),
    perPileMetre: values.number("pricePerMetreOfPile"), carbonPerCubicMetre: values.number("concreteCarbon"),
  };
}

function buildDelay(values: Values): Delay {
  return {
    dayCost: values.number("delayDayPrice"), daysPerSurprise: values.number("daysPerSurprise"),
    surpriseTolerance: values.number("surpriseTolerance"), foundShare: values.number("foundShare"),
  };
}

/**
 * Whose money the block speaks of. Money is free text, so that two rows agree is all that can be checked: it also catches thousands.
 *
 * @param values  the values in force
 * @returns       as written in the first row that says so, or ""
 * @throws {InputError} two rows name different money
 */
export function requireOneCurrency(values: Values): string {
  let first: { id: InputId; currency: string } | undefined;
  for (const { id, kind } of CATALOGUE) {
    if (kind !== "money" && kind !== "moneyPerLength") continue;
    const currency = values.block.inputs.get(id)?.unit.currency ?? "";
    if (currency === "") continue;
    if (first === undefined) first = { id, currency };
    else if (plain(currency) !== plain(first.currency)) {
      throw new InputError(`${values.named(id)} is in ${currency}, but ${values.named(first.id)} is in ${first.currency}; all prices must be in the same money.`);
    }
  }
  return first?.currency ?? "";
}

function plain(currency: string): string {
  return currency.toUpperCase().replace(/[\s.]/g, "");
}
