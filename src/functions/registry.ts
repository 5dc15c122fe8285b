import type { CellValue } from "./answer.js";
import { costsByCount, optimalCount } from "./counts.js";
import { carbon, contingencySum, delayCost, failureChance, failureCost, foundationCost, investigationCost, saving, totalCost } from "./expected-costs.js";
import { correlationAt, varianceFactor } from "./field-theory.js";
import { layout, lengthsByPercentile, pileLength } from "./pile-lengths.js";
import { check, groundKinds, methods, version } from "./reference.js";
import { sheetError } from "./sheet-error.js";
import { pileSettlement, settlementLength } from "./single-pile.js";

type SheetFunction = (...args: any[]) => CellValue | CellValue[][];

interface Entry {
  readonly run: SheetFunction;
  /** arguments before the trailing label, value pairs; undefined for a function without pairs */
  readonly beforePairs?: number;
}

const ENTRIES: Readonly<Record<string, Entry>> = {
  CARBON: { run: carbon, beforePairs: 2 },
  CHECK: { run: check, beforePairs: 1 },
  CONTINGENCY: { run: contingencySum, beforePairs: 3 },
  CORRELATION: { run: correlationAt },
  COSTTABLE: { run: costsByCount, beforePairs: 2 },
  DELAYCOST: { run: delayCost, beforePairs: 2 },
  DESIGNLENGTH: { run: settlementLength },
  FAILURECHANCE: { run: failureChance, beforePairs: 2 },
  FAILURECOST: { run: failureCost, beforePairs: 2 },
  FOUNDATIONCOST: { run: foundationCost, beforePairs: 2 },
  GROUNDKINDS: { run: groundKinds },
  INVESTIGATIONCOST: { run: investigationCost, beforePairs: 2 },
  LAYOUT: { run: layout },
  LENGTHTABLE: { run: lengthsByPercentile, beforePairs: 2 },
  METHODS: { run: methods },
  OPTIMALCOUNT: { run: optimalCount, beforePairs: 2 },
  PILELENGTH: { run: pileLength, beforePairs: 3 },
  SAVING: { run: saving, beforePairs: 3 },
  SETTLEMENT: { run: pileSettlement },
  TOTALCOST: { run: totalCost, beforePairs: 2 },
  VARIANCEFACTOR: { run: varianceFactor },
  VERSION: { run: version },
};

/** Every function by its id in the form in which Excel calls it: the trailing pairs arrive as one array. */
export const FUNCTIONS: ReadonlyMap<string, SheetFunction> = new Map(Object.entries(ENTRIES).map(([id, { run }]) => [id, run]));

/**
 * Calls a function as a worksheet writes it, for hosts that do not gather repeating arguments themselves.
 *
 * @param id    the function's id, in any case, without the namespace
 * @param args  the formula's arguments one by one: a range as rows of cells, one cell bare or as [[v]], an omitted one as
 *              null or undefined, an error value as its name ("#N/A")
 * @returns     a value, or rows of values to spill
 * @throws {SheetError} with the reason in words; Excel's own error class where that exists
 */
export function callFunction(id: string, args: readonly unknown[]): CellValue | CellValue[][] {
  const entry = Object.hasOwn(ENTRIES, id.toUpperCase()) ? ENTRIES[id.toUpperCase()] : undefined;
  if (entry === undefined) throw sheetError("#VALUE!", `PROBE has no function ${id}.`);
  if (entry.beforePairs !== undefined) return entry.run(...padded(args, entry.beforePairs), args.slice(entry.beforePairs));
  const most = entry.run.length;
  if (args.length > most) throw sheetError("#VALUE!", `${id.toUpperCase()} takes ${most === 1 ? "1 argument" : `${most} arguments`}; ${args.length} were given.`);
  return entry.run(...args);
}

function padded(args: readonly unknown[], length: number): unknown[] {
  return Array.from({ length }, (_, k) => args[k] ?? null);
}
