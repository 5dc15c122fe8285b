/** The door of the inputs: a range of cells in, a problem or a sentence out. */
export { CATALOGUE, isRequired, SECTIONS } from "./catalogue.js";
export type { CheckRow } from "./check-rows.js";
export { requireCount } from "./count.js";
export { DEMONSTRATION } from "./demonstration.js";
export type { Choice } from "./entry.js";
export { GROUND_KINDS } from "./ground-kinds.js";
export type { TypicalRange } from "./ground-kinds.js";
export { InputError } from "./input-error.js";
export { LARGEST_COUNT } from "./limits.js";
export { METHODS } from "./methods.js";
export { checkSite, parseSite } from "./parse-site.js";
export type { Site } from "./parse-site.js";
export { templateRows } from "./template.js";
