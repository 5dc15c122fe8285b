import { assess, contingency, investigationCost as priceOfHoles, type Assessment } from "../engine/index.js";
import { resultIn } from "../units/result-units.js";
import type { Site } from "../inputs/index.js";
import { answer } from "./answer.js";
import { numberFrom, PERCENTILE } from "./arguments.js";
import { countFrom } from "./counts-argument.js";
import { siteFrom } from "./site-argument.js";

// Arguments are `any`, not `number`: Excel answers a text for a number with a bare #VALUE! before our sentence could be made.

/**
 * Expected cost of a number of holes in all: investigation, foundation, failure and delay, in the currency of the prices.
 * @customfunction TOTALCOST
 * @param site Site block: label, value and unit columns; the range named Site.
 * @param count Number of holes, 0 or more.
 * @param [pairs] Label, value, label, value ... that replace inputs of the site block for this cell.
 * @source Sum of the four parts, each with its own source on this page; the ground is a lognormal random field, Vanmarcke (1983), Random Fields: Analysis and Synthesis.
 */
export function totalCost(site: any[][], count: any, pairs?: any[]): number {
  return answer(() => assessed(site, count, pairs).total);
}

/**
 * Price of the investigation for a number of holes: mobilisation, holes, metres, readings, report and days of waiting.
 * @customfunction INVESTIGATIONCOST
 * @param site Site block: label, value and unit columns; the range named Site.
 * @param count Number of holes, 0 or more.
 * @param [pairs] Label, value, label, value ... that replace inputs of the site block for this cell.
 * @source Your own prices times numbers of holes, metres, readings and days; no published method.
 */
export function investigationCost(site: any[][], count: any, pairs?: any[]): number {
  return answer(() => {
    const { problem, holes } = counted(site, count, pairs);
    return priceOfHoles(problem, holes);
  });
}

/**
 * Expected price of the piles that the design from a number of holes asks for: rig, piles and metres.
 * @customfunction FOUNDATIONCOST
 * @param site Site block: label, value and unit columns; the range named Site.
 * @param count Number of holes, 0 or more.
 * @param [pairs] Label, value, label, value ... that replace inputs of the site block for this cell.
 * @source Design length by Randolph & Wroth (1978), Analysis of deformation of vertically loaded piles, ASCE J. Geotech. Engng Div. 104 (GT12); design value by averages of a lognormal field, Vanmarcke (1983), Random Fields: Analysis and Synthesis, and Fenton (1960), IRE Trans. CS-8.
 */
export function foundationCost(site: any[][], count: any, pairs?: any[]): number {
  return answer(() => assessed(site, count, pairs).foundation);
}

/**
 * Expected cost of damage by uneven settlement; below 1 % of the building value it may be off by a fifth.
 * @customfunction FAILURECOST
 * @param site Site block: label, value and unit columns; the range named Site.
 * @param count Number of holes, 0 or more.
 * @param [pairs] Label, value, label, value ... that replace inputs of the site block for this cell.
 * @source Settlements by axisymmetric finite elements, Zienkiewicz & Taylor, The Finite Element Method, carried to second order in the log stiffness (the expansion is our own; lemma of Stein 1981, Ann. Statist. 9); neighbouring piles by Gabriel & Sokal (1969); damage by Skempton & MacDonald (1956), The allowable settlements of buildings, Proc. ICE (limits from memory), unless the site block has its own damage list.
 */
export function failureCost(site: any[][], count: any, pairs?: any[]): number {
  return answer(() => assessed(site, count, pairs).failure);
}

/**
 * Expected cost of delay on site from piles that turn out too short.
 * @customfunction DELAYCOST
 * @param site Site block: label, value and unit columns; the range named Site.
 * @param count Number of holes, 0 or more.
 * @param [pairs] Label, value, label, value ... that replace inputs of the site block for this cell.
 * @source Length that each pile would have needed by axisymmetric finite elements, Zienkiewicz & Taylor, The Finite Element Method, carried to second order in the log stiffness (the expansion is our own; lemma of Stein 1981, Ann. Statist. 9), against the design length by Randolph & Wroth (1978); days and prices are yours.
 */
export function delayCost(site: any[][], count: any, pairs?: any[]): number {
  return answer(() => assessed(site, count, pairs).delay);
}

/**
 * Chance from 0 to 1 that uneven settlement does any damage at all.
 * @customfunction FAILURECHANCE
 * @param site Site block: label, value and unit columns; the range named Site.
 * @param count Number of holes, 0 or more.
 * @param [pairs] Label, value, label, value ... that replace inputs of the site block for this cell.
 * @source As FAILURECOST: settlements by axisymmetric finite elements, Zienkiewicz & Taylor, The Finite Element Method, carried to second order in the log stiffness (the expansion is our own; lemma of Stein 1981, Ann. Statist. 9); damage by Skempton & MacDonald (1956), The allowable settlements of buildings, Proc. ICE (limits from memory), unless the site block has its own damage list.
 */
export function failureChance(site: any[][], count: any, pairs?: any[]): number {
  return answer(() => assessed(site, count, pairs).failureChance);
}

/**
 * Expected carbon of the pile concrete, kg CO2e (lb where the site asks for US units).
 * @customfunction CARBON
 * @param site Site block: label, value and unit columns; the range named Site.
 * @param count Number of holes, 0 or more.
 * @param [pairs] Label, value, label, value ... that replace inputs of the site block for this cell.
 * @source Volume of the piles times the carbon of a cubic metre in your site block; lengths by Randolph & Wroth (1978), Analysis of deformation of vertically loaded piles, ASCE J. Geotech. Engng Div. 104 (GT12).
 */
export function carbon(site: any[][], count: any, pairs?: any[]): number {
  return answer(() => {
    const { problem, holes, units } = counted(site, count, pairs);
    return resultIn(assess(problem, holes).carbon, "mass", units);
  });
}

/**
 * Money saved in all by going from one number of holes to another; negative when the change costs more than it saves.
 * @customfunction SAVING
 * @param site Site block: label, value and unit columns; the range named Site.
 * @param from Number of holes now intended.
 * @param to Number of holes instead.
 * @param [pairs] Label, value, label, value ... that replace inputs of the site block for this cell.
 * @source Difference of two total costs: see TOTALCOST.
 */
export function saving(site: any[][], from: any, to: any, pairs?: any[]): number {
  return answer(() => {
    const parsed = siteFrom(site, pairs);
    const before = countFrom(from, parsed, "From");
    const after = countFrom(to, parsed, "To");
    return assess(parsed.problem, before).total - assess(parsed.problem, after).total;
  });
}

/**
 * Sum to hold above the median of foundation, failure and delay cost so that it suffices with the given percentile.
 * @customfunction CONTINGENCY
 * @param site Site block: label, value and unit columns; the range named Site.
 * @param count Number of holes, 0 or more.
 * @param percentile Percentile of the cost, above 0 and below 100; 80 is common for a bid.
 * @param [pairs] Label, value, label, value ... that replace inputs of the site block for this cell.
 * @source Percentiles of the costs behind FOUNDATIONCOST, FAILURECOST and DELAYCOST, drawn by Joe & Kuo (2008), SIAM J. Sci. Comput. 30(5), scrambled after Owen (1995).
 */
export function contingencySum(site: any[][], count: any, percentile: any, pairs?: any[]): number {
  return answer(() => {
    const { problem, holes } = counted(site, count, pairs);
    return contingency(problem, holes, numberFrom(percentile, "Percentile", PERCENTILE));
  });
}

function assessed(site: unknown, count: unknown, pairs: unknown): Assessment {
  const { problem, holes } = counted(site, count, pairs);
  return assess(problem, holes);
}

function counted(site: unknown, count: unknown, pairs: unknown): Site & { holes: number } {
  const parsed = siteFrom(site, pairs);
  return { ...parsed, holes: countFrom(count, parsed) };
}
