import type { Problem } from "../engine/index.js";
import { CATALOGUE, type CatalogueEntry, type InputId } from "./catalogue.js";
import { amount } from "./cells.js";
import type { Fault } from "./fault.js";
import { methodInForce } from "./build-investigation.js";
import { rangeText } from "./count.js";
import { whyUnused } from "./presence.js";
import { choiceText, defaultInWords } from "./read-input.js";
import { catalogueUnit, whereAvailable, type Values } from "./values.js";

/** One input of the site block in words: what is used, and why. */
export interface CheckRow {
  readonly label: string;
  /** value used, in `unit`; "" where there is none */
  readonly value: string | number;
  readonly unit: string;
  /** "used", "default", "replaced by the formula", "not used: ...", "refused: ..." and the like */
  readonly verdict: string;
  readonly ok: boolean;
  /** row of the site block, 1 for its first; undefined where the block has none */
  readonly row: number | undefined;
}

const LIST_NOUNS: Partial<Record<InputId, readonly [string, string]>> = {
  layerList: ["layer", "layers"], pileList: ["pile", "piles"], damageList: ["row", "rows"], holeList: ["hole", "holes"],
};

/**
 * One row for each input, after those that no input is known for.
 *
 * @param values   the values in force; undefined where the block could not be read at all
 * @param faults   everything refused
 * @param problem  the problem, where it could be made, for values found automatically
 * @param counts   numbers of holes in force
 * @returns        rows in the order of the catalogue
 */
export function checkRows(values: Values | undefined, faults: readonly Fault[], problem: Problem | undefined, counts: readonly number[] | undefined): CheckRow[] {
  const strangers = faults.filter(({ id }) => id === undefined).map(({ label, row, sentence }) => refused(label, "", "", sentence, row));
  if (values === undefined) return strangers;
  const rows = CATALOGUE.flatMap((entry) => {
    const own = faults.filter(({ id }) => id === entry.id);
    if (own.length > 0) return own.map(({ sentence, row }) => refused(entry.label, "", "", sentence, row ?? values.block.rows.get(entry.id)));
    return [inputRow(entry, values, problem, counts)];
  });
  return [...strangers, ...rows];
}

function refused(label: string, value: string | number, unit: string, sentence: string, row: number | undefined): CheckRow {
  return { label, value, unit, verdict: `refused: ${sentence}`, ok: false, row };
}

function inputRow(entry: CatalogueEntry, values: Values, problem: Problem | undefined, counts: readonly number[] | undefined): CheckRow {
  const { id, label } = entry;
  const row = values.block.rows.get(id);
  const line = (value: string | number, unit: string, verdict: string): CheckRow => ({ label, value, unit, verdict, ok: true, row });
  const unused = whyUnused(values, id);
  if (entry.kind === "list") {
    const list = values.block.lists.get(id);
    if (list !== undefined) return line(`${list.rows.length} ${LIST_NOUNS[id]![list.rows.length === 1 ? 0 : 1]}`, "", "used");
    if (unused !== undefined) return line("", "", unused);
    return id === "damageList" ? line(entry.automatic!, "", "default") : line("automatic", "", `default: ${entry.automatic}`);
  }
  const given = values.given(id);
  if (unused !== undefined) return line(given?.shown ?? "", given?.unit.symbol ?? "", unused);
  if (entry.insteadOf !== undefined && values.hasList(entry.insteadOf as InputId) && given === undefined) return line("", "", `not used: the ${entry.insteadOf === "layerList" ? "layer" : "pile"} list takes its place`);
  if (given !== undefined) {
    const replaced = values.replacements.has(id);
    const before = values.block.inputs.get(id)?.given;
    const from = replaced && before !== undefined ? ` (the block says ${before.shown})` : "";
    const assumed = given.unit.assumed && typeof given.value === "number" ? `; no ${given.unit.currency === "" ? "unit" : "length"} given, so read as ${given.unit.symbol}` : "";
    return line(given.shown, given.unit.symbol, `${replaced ? "replaced by the formula" : "used"}${from}${assumed}`);
  }
  const unit = catalogueUnit(id);
  if (entry.automatic !== undefined) {
    const found = automaticValue(id, values, problem, counts);
    const value = typeof found === "number" ? Number(amount((found * unit.divide) / unit.multiply)) : found;
    return line(value ?? "", unit.symbol, `default: ${ofTheMethod(id) ? `${entry.automatic} (${values.source("method") === "refused" ? "refused" : values.text("method")})` : entry.automatic}`);
  }
  const fallback = entry.fallback!;
  return line(typeof fallback === "string" ? choiceText(entry, fallback) : fallback === 0 ? defaultInWords(entry)! : fallback, typeof fallback === "number" && fallback !== 0 ? unit.symbol : "", "default");
}

function automaticValue(id: InputId, values: Values, problem: Problem | undefined, counts: readonly number[] | undefined): number | string | undefined {
  if (id === "counts") return counts === undefined ? undefined : rangeText(counts);
  if (ofTheMethod(id)) {
    const method = whereAvailable(() => methodOrNothing(values));
    return id === "readingSpacing" ? method?.spacing : method?.[id as "readingCov" | "holeCov" | "methodCov"];
  }
  if (id === "spacingAlongY") return whereAvailable(() => values.number("spacingAlongX"));
  if (problem === undefined) return undefined;
  return id === "footprintLength" ? problem.building.footprint.length : problem.building.footprint.width;
}

function ofTheMethod(id: InputId): boolean {
  return id === "readingCov" || id === "holeCov" || id === "methodCov" || id === "readingSpacing";
}

/** The method in force, unless it is an own one without its COVs, whose fault is shown at its own row. */
function methodOrNothing(values: Values): ReturnType<typeof methodInForce> | undefined {
  return values.text("method") === "own" ? undefined : methodInForce(values);
}
