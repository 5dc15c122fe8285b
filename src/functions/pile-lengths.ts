import { holePositions, pileLengthPercentile, pileLengthTable } from "../engine/index.js";
import { layoutTable, lengthTable, tableCells } from "../results/index.js";
import { resultIn } from "../units/result-units.js";
import { answer, NoAnswer } from "./answer.js";
import { numberFrom, PERCENTILE, type Accepted } from "./arguments.js";
import { countFrom } from "./counts-argument.js";
import { pairsFrom, siteFrom, takePair } from "./site-argument.js";

/**
 * Percentile of the mean pile length of the job, m (ft in US units): times the number of piles it gives the total length.
 * @customfunction PILELENGTH
 * @param site Site block: label, value and unit columns; the range named Site.
 * @param count Number of holes, 0 or more.
 * @param percentile Percentile of the length, above 0 and below 100; 50 is the median.
 * @param [pairs] Label, value ... that replace inputs for this cell; "Pile", 3 gives the length of the third pile alone.
 * @source Design length by Randolph & Wroth (1978), Analysis of deformation of vertically loaded piles, ASCE J. Geotech. Engng Div. 104 (GT12); design value by averages of a lognormal field, Vanmarcke (1983), Random Fields: Analysis and Synthesis.
 */
export function pileLength(site: any[][], count: any, percentile: any, pairs?: any[]): number {
  return answer(() => {
    const { value: pile, rest } = takePair(pairsFrom(pairs), "Pile");
    const parsed = siteFrom(site, rest);
    const holes = countFrom(count, parsed);
    const share = numberFrom(percentile, "Percentile", PERCENTILE);
    const one = pile === undefined ? undefined : numberFrom(pile, "Pile", pileNumber(parsed.problem.building.piles.length));
    return resultIn(pileLengthPercentile(parsed.problem, holes, share, one), "length", parsed.units);
  });
}

/**
 * Table of pile lengths at seven percentiles: one column a group of equal load, mean length, total length.
 * @customfunction LENGTHTABLE
 * @param site Site block: label, value and unit columns; the range named Site.
 * @param count Number of holes, 0 or more.
 * @param [pairs] Label, value, label, value ... that replace inputs of the site block for this cell.
 * @source Design length by Randolph & Wroth (1978), Analysis of deformation of vertically loaded piles, ASCE J. Geotech. Engng Div. 104 (GT12); design value by averages of a lognormal field, Vanmarcke (1983), Random Fields: Analysis and Synthesis.
 */
export function lengthsByPercentile(site: any[][], count: any, pairs?: any[]): any[][] {
  return answer(() => {
    const parsed = siteFrom(site, pairs);
    const holes = countFrom(count, parsed);
    return tableCells(lengthTable(pileLengthTable(parsed.problem, holes, [5, 10, 25, 50, 75, 90, 95]), parsed.units));
  });
}

/**
 * Places of the holes in plan, m (ft in US units), in the axes of the pile list.
 * @customfunction LAYOUT
 * @param site Site block: label, value and unit columns; the range named Site.
 * @param count Number of holes, 1 or more.
 * @source Our own rule: rows of equal cells, that arrangement whose farthest point of the footprint lies nearest to a hole; codes give spacings, not positions.
 */
export function layout(site: any[][], count: any): any[][] {
  return answer(() => {
    const parsed = siteFrom(site);
    const holes = countFrom(count, parsed);
    if (holes === 0) throw new NoAnswer("A count of 0 has no holes to place.");
    return tableCells(layoutTable(holePositions(parsed.problem, holes), parsed.units));
  });
}

function pileNumber(piles: number): Accepted {
  return { words: `a whole number from 1 to ${piles}, the number of piles`, holds: (value) => Number.isInteger(value) && value >= 1 && value <= piles };
}
