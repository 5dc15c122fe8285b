import { CATALOGUE, SECTIONS, type CatalogueEntry } from "./catalogue.js";
import { DEMONSTRATION_DAMAGE, DEMONSTRATION_VALUES } from "./demonstration.js";

/**
 * The site block ready to be filled in, made from the catalogue with the demonstration's values.
 *
 * @returns rows of label, value, unit, note, all four cells wide; blank rows between sections, and below the damage list its rows
 */
export function templateRows(): (string | number)[][] {
  return SECTIONS.flatMap((section, index) => [
    ...(index === 0 ? [] : [["", "", "", ""]]),
    [section, "", "", ""],
    ...CATALOGUE.filter((entry) => entry.section === section).flatMap(entryRows),
  ]);
}

function entryRows(entry: CatalogueEntry): (string | number)[][] {
  const demonstration = DEMONSTRATION_VALUES[entry.id];
  if (demonstration === undefined) return []; // a list that would take the place of what is given
  const { value, unit, note } = demonstration;
  const shownUnit = unit ?? (entry.unit === "ratio" || entry.kind === "money" || entry.kind === "moneyPerLength" ? "" : entry.unit);
  const row = [entry.label, value, shownUnit, note ?? entry.help];
  if (entry.id !== "damageList") return [row];
  // without a blank row below it the next label would still be found, but the eye wants the gap
  return [row, ["Distortion", "Share", "", ""], ...DEMONSTRATION_DAMAGE.map(([distortion, share]) => [distortion, share, "", ""]), ["", "", "", ""]];
}
