import { checkSite } from "../inputs/index.js";
import { checkTable, groundKindTable, methodTable, PRODUCT_VERSION, tableCells } from "../results/index.js";
import { answer } from "./answer.js";
import { cellsFrom, pairsFrom } from "./site-argument.js";

/**
 * Table of the kinds of investigation with the published errors of each and where they come from.
 * @customfunction METHODS
 * @source Each row names its own; mostly Kulhawy & Trautmann (1996), Estimation of in-situ test uncertainty, ASCE GSP 58, and Phoon & Kulhawy (1999), from memory.
 */
export function methods(): any[][] {
  return answer(() => tableCells(methodTable()));
}

/**
 * Table of typical published means, variations and scales by kind of ground with their sources, to start from without data.
 * @customfunction GROUNDKINDS
 * @source Each row names its own; mostly Phoon & Kulhawy (1999), from memory.
 */
export function groundKinds(): any[][] {
  return answer(() => tableCells(groundKindTable()));
}

/**
 * How the site block was understood: one row an input with the value used, its unit and a verdict in words.
 * @customfunction CHECK
 * @param site Site block: label, value and unit columns; the range named Site.
 * @param [pairs] Label, value, label, value ... that replace inputs of the site block for this cell.
 * @source Reads the site block; no published method.
 */
export function check(site: any[][], pairs?: any[]): any[][] {
  return answer(() => tableCells(checkTable(checkSite(cellsFrom(site), pairsFrom(pairs)))));
}

/**
 * Name and release of the add-in.
 * @customfunction VERSION
 * @source No published method.
 */
export function version(): string {
  return answer(() => `Probeworth ${PRODUCT_VERSION}`);
}
