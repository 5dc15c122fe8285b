import { CATALOGUE, isRequired, type CatalogueEntry, type InputId } from "./catalogue.js";
import { attempt, type Fault } from "./fault.js";
import { InputError } from "./input-error.js";
import { inWords } from "./place.js";
import type { Values } from "./values.js";

/**
 * Checks that what must be there is there, and that no input is given in two ways.
 *
 * @param values  the values in force
 * @param faults  where refusals are noted
 */
export function checkPresence(values: Values, faults: Fault[]): void {
  for (const entry of CATALOGUE) {
    const { id, label, insteadOf } = entry;
    const row = values.block.rows.get(id);
    const list = insteadOf as InputId | undefined;
    if (list !== undefined && values.hasList(list)) {
      if (id !== "stiffnessCov") attempt(faults, { id, label, row }, () => refuseBoth(values, id, list));
      else attempt(faults, { id, label, row }, () => refuseIdleCov(values));
    } else if (isRequired(entry) && row === undefined && !values.replacements.has(id)) {
      attempt(faults, { id, label, row: undefined }, () => {
        throw new InputError(missing(entry));
      });
    }
  }
}

/**
 * Why an input of the block is not used, though it is sound.
 *
 * @param values  the values in force
 * @param id      the input
 * @returns       words such as "not used: each layer has its own COV", or undefined
 */
export function whyUnused(values: Values, id: InputId): string | undefined {
  const aside = values.setAside.get(id);
  if (aside !== undefined) return aside;
  if (id === "layerList" && !values.hasList(id)) return "not used: one layer is given";
  if (id === "pileList" && !values.hasList(id)) return "not used: the grid is given";
  if (id === "stiffnessCov" && everyLayerHasCov(values)) return "not used: each layer has its own COV";
  if (id === "regionalUpdate" && values.source("regionalCov") !== "refused" && values.number("regionalCov") === 0) return "not used: there is no Regional COV";
  if (id === "deviationsBelowMean" && values.source("designRule") !== "refused" && values.text("designRule") !== "lessdeviations") return "not used: it belongs to the rule mean less deviations";
  return undefined;
}

function everyLayerHasCov(values: Values): boolean {
  return values.block.lists.get("layerList")?.rows.every(({ values: [, , , cov] }) => cov !== undefined) ?? false;
}

function refuseBoth(values: Values, id: InputId, list: InputId): void {
  if (values.replacements.has(id)) throw new InputError(`${values.named(id)} changes nothing: ${values.named(list)} takes its place.`);
  if (values.block.inputs.get(id)?.given !== undefined) throw new InputError(`${values.named(id)} and ${values.named(list)} are both given; the list takes the other's place, so take one of them out.`, values.block.rows.get(id));
}

function refuseIdleCov(values: Values): void {
  if (values.replacements.has("stiffnessCov") && everyLayerHasCov(values)) throw new InputError(`${values.named("stiffnessCov")} changes nothing: each layer of the layer list has its own COV.`);
}

function missing(entry: CatalogueEntry): string {
  const list = entry.insteadOf === undefined ? "" : `, or a ${entry.insteadOf === "layerList" ? "layer list" : "pile list"}`;
  const kind = entry.kind === "money" || entry.kind === "moneyPerLength" ? "a price" : `a number${entry.unit === "" || entry.unit === "ratio" ? "" : ` in ${entry.unit}`}`;
  const wanted = [kind, ...(entry.zero === "none" ? ["the word none"] : [])];
  return `${entry.label} is missing: the section ${entry.section} needs a row "${entry.label}" with ${inWords(wanted)}${list}.`;
}
