import { mostRealisations, usualRegret } from "../../engine/index.js";
import { rangeText, usualCounts } from "../../inputs/count.js";
import { CATALOGUE, InputError, METHODS, parseSite, type Site } from "../../inputs/index.js";
import { inputsHash } from "../../jobs/inputs-hash.js";
import type { RunOrder, RunTarget } from "../run-order.js";
import { holesInWords, sentenceCase, shorten } from "./numbers.js";

/** What the person has chosen for a run; numbers as typed. */
export interface RunChoices {
  readonly counts: string;
  /** names of the method table, or the block's own word */
  readonly methods: readonly string[];
  /** price per hole of a method where it is not the block's, as typed; "" for the block's */
  readonly prices: Readonly<Record<string, string>>;
  /** values of the design rule's choices */
  readonly rules: readonly string[];
  readonly stop: "precision" | "number";
  readonly sum: string;
  readonly realisations: string;
  /** whether piles settle their neighbours */
  readonly interaction: boolean;
}

/** A choice with a sentence about what is wrong with it. */
export interface Refusal {
  readonly part: "counts" | "methods" | "rules" | "target";
  readonly sentence: string;
}

/** Ways to investigate side by side beyond which no picture helps. */
const MOST_WAYS = 6;
/** Ways times counts. */
const MOST_ROWS = 120;
const MOST_REALISATIONS = 100_000;
const LEAST_REALISATIONS = 2;
const USUAL_REALISATIONS = 60;

/** The design rules with their words. */
export const RULES: readonly { readonly value: string; readonly text: string }[] = CATALOGUE.flatMap((entry) => (entry.id === "designRule" ? (entry.choices ?? []).map(({ value, text }) => ({ value, text })) : []));

/**
 * The methods that may stand side by side: the table's, and the block's own word where it is none of them.
 *
 * @param site  the site block
 */
export function offeredMethods(site: Site): readonly string[] {
  const names = METHODS.map(({ name }) => name);
  return names.includes(site.method) ? names : [site.method, ...names];
}

/**
 * What the block itself asks for, stopping when a wrong choice costs no more than a hole.
 *
 * @param site  the site block
 */
export function usualChoices(site: Site): RunChoices {
  const counts = site.counts ?? usualCounts(site);
  return {
    counts: rangeText(counts),
    methods: [site.method],
    prices: {},
    rules: [site.problem.investigation.designRule.name],
    stop: "precision",
    sum: String(priceOfHole(site, counts)),
    realisations: String(USUAL_REALISATIONS),
    interaction: site.problem.piles.groupInteraction,
  };
}

/** What one hole costs, money; at least a cent, because nothing is ever known to nothing. */
function priceOfHole({ problem }: Site, counts: readonly number[]): number {
  const price = usualRegret({ variants: [{ name: "", problem }], counts, seed: problem.seed });
  return price > 0 ? Number(price.toPrecision(3)) : 0.01;
}

/**
 * Makes the order of a run out of the choices.
 *
 * @param site     the site block as read
 * @param cells    its cells
 * @param choices  what the person has chosen
 * @param place    where the block stands
 * @param now      milliseconds since 1970
 * @returns        the order, or what is wrong with the choices
 */
export function orderOf(site: Site, cells: readonly (readonly unknown[])[], choices: RunChoices, place: string, now: number): RunOrder | Refusal {
  const target = targetOf(choices);
  if ("part" in target) return target;
  if (choices.methods.length === 0) return { part: "methods", sentence: "Choose at least one method." };
  if (choices.rules.length === 0) return { part: "rules", sentence: "Choose at least one design rule." };
  const ways = choices.methods.flatMap((method) => choices.rules.map((rule) => ({ method, rule })));
  if (ways.length > MOST_WAYS) return { part: "methods", sentence: `${choices.methods.length} methods with ${choices.rules.length} design rules are ${ways.length} ways; at most ${MOST_WAYS} stand side by side.` };
  let counts: readonly number[];
  try {
    counts = parseSite(cells, ["Counts", choices.counts]).counts ?? usualCounts(site);
  } catch (reason) {
    if (reason instanceof InputError) return { part: "counts", sentence: reason.message };
    throw reason;
  }
  if (ways.length * counts.length > MOST_ROWS) return { part: "counts", sentence: `${ways.length} ways with ${counts.length} counts are ${ways.length * counts.length} cases; at most ${MOST_ROWS} are run at once. Name fewer counts, such as 0, 2, 4, 8.` };
  const variants = [];
  for (const way of ways) {
    const made = variantOf(site, cells, way, choices);
    if ("part" in made) return made;
    variants.push(made);
  }
  const task = { variants, counts, seed: site.problem.seed };
  const room = mostRealisations(task).elements;
  if ("realisations" in target && target.realisations > room) {
    return { part: "target", sentence: `With ${ways.length * counts.length} cases (ways times counts) at most ${room.toLocaleString("en-US")} grounds fit into memory. Ask for fewer, or name fewer counts or ways.` };
  }
  return {
    task, target, units: site.units, money: site.money, block: inputsHash(site.problem), place, at: now,
  };
}

/**
 * What a run is called in a list: its ways and counts.
 *
 * @param order  the run
 */
export function orderInWords(order: RunOrder): string {
  const ways = order.task.variants.map(({ name }) => shorten(name, 60)).join("; ");
  return `${ways}; ${order.task.counts.length === 1 ? holesInWords(order.task.counts[0]!) : `${rangeText(order.task.counts)} holes`}`;
}

function targetOf({ stop, sum, realisations }: RunChoices): RunTarget | Refusal {
  if (stop === "precision") {
    const regret = Number(sum);
    if (sum.trim() === "" || !Number.isFinite(regret) || regret <= 0) return { part: "target", sentence: "State the sum that a wrong choice may cost, above 0; the price of one hole is usual." };
    return { regret };
  }
  const number = Number(realisations);
  const isUsable = realisations.trim() !== "" && Number.isInteger(number) && number >= LEAST_REALISATIONS && number <= MOST_REALISATIONS;
  if (!isUsable) return { part: "target", sentence: `The number of grounds must be a whole number from ${LEAST_REALISATIONS} to ${MOST_REALISATIONS.toLocaleString("en-US")}.` };
  return { realisations: number };
}

function variantOf(site: Site, cells: readonly (readonly unknown[])[], { method, rule }: { method: string; rule: string }, choices: RunChoices): RunOrder["task"]["variants"][number] | Refusal {
  const price = choices.prices[method]?.trim() ?? "";
  const words = RULES.find(({ value }) => value === rule)?.text ?? rule;
  const name = [method, ...(choices.rules.length > 1 ? [words] : [])].join(", ");
  const isPrice = price === "" || (Number.isFinite(Number(price)) && Number(price) > 0);
  if (!isPrice) return { part: "methods", sentence: `The price per hole of ${method} must be above 0; leave it blank for the block's.` };
  // The block's own method is not named again: naming it could set its own COVs aside.
  const pairs = [
    ...(method === site.method ? [] : ["Method", method]),
    ...(rule === site.problem.investigation.designRule.name ? [] : ["Design rule", words]),
    ...(price === "" ? [] : ["Price per hole", Number(price)]),
    ...(choices.interaction === site.problem.piles.groupInteraction ? [] : ["Group interaction", choices.interaction ? "on" : "off"]),
  ];
  try {
    return { name, problem: parseSite(cells, pairs).problem };
  } catch (reason) {
    if (reason instanceof InputError) return { part: "methods", sentence: `${sentenceCase(name)}: ${reason.message}` };
    throw reason;
  }
}
