import { assessCounts, cheapestCount, type CountRow } from "../engine/index.js";
import { costTable, tableCells } from "../results/index.js";
import { answer } from "./answer.js";
import { countFrom, countsFrom } from "./counts-argument.js";
import { siteFrom } from "./site-argument.js";

/**
 * The number of holes that costs least in all, from 0 up to the largest that you would buy.
 * @customfunction OPTIMALCOUNT
 * @param site Site block: label, value and unit columns; the range named Site.
 * @param largest_count Largest number of holes to consider.
 * @param [pairs] Label, value, label, value ... that replace inputs of the site block for this cell.
 * @source Least expected cost among the choices: Raiffa & Schlaifer (1961), Applied Statistical Decision Theory; costs as TOTALCOST.
 */
export function optimalCount(site: any[][], largest_count: any, pairs?: any[]): number {
  return answer(() => {
    const parsed = siteFrom(site, pairs);
    const largest = countFrom(largest_count, parsed, "Largest count");
    return cheapestCount(assessCounts(parsed.problem, Array.from({ length: largest + 1 }, (_, count) => count)));
  });
}

/**
 * Table of what each number of holes costs: parts, total, standard error, chance to be the cheapest, carbon.
 * @customfunction COSTTABLE
 * @param site Site block: label, value and unit columns; the range named Site.
 * @param [counts_or_largest] One number N for 0 to N holes, or a range of counts; left out: the counts of the site block.
 * @param [pairs] Label, value, label, value ... that replace inputs of the site block for this cell.
 * @source Costs as TOTALCOST; their standard error and the chance to be cheapest from scrambled Sobol draws, Joe & Kuo (2008), SIAM J. Sci. Comput. 30(5), and Owen (1995).
 */
export function costsByCount(site: any[][], counts_or_largest?: any[][], pairs?: any[]): any[][] {
  return answer(() => {
    const parsed = siteFrom(site, pairs);
    const counts = countsFrom(counts_or_largest, parsed);
    // priced once each, so that a count written twice does not halve its chance to be the cheapest
    const priced = new Map(assessCounts(parsed.problem, [...new Set(counts)]).map((row) => [row.count, row]));
    const rows = counts.map((count) => priced.get(count) as CountRow);
    return tableCells(costTable(rows, parsed.units, parsed.money));
  });
}
