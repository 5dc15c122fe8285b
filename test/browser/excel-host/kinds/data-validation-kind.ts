import { accessDenied, invalidArgument, notModelled } from "../host-error.js";
import { type Kind } from "../kind.js";
import type { Place } from "../model/chart-model.js";
import type { SheetModel, Validation } from "../model/sheet-model.js";

const RULES = ["wholeNumber", "decimal", "list", "date", "time", "textLength", "custom"] as const;
const OPERATORS = ["Between", "NotBetween", "EqualTo", "NotEqualTo", "GreaterThan", "LessThan", "GreaterThanOrEqualTo", "LessThanOrEqualTo"];
const LONGEST_LIST = 255;

/** What may be entered into a range, and what is said about it. */
export const dataValidationKind: Kind<Place> = {
  get: {
    rule: (place) => at(place)?.properties.rule ?? null,
    errorAlert: (place) => at(place)?.properties.errorAlert ?? null,
    prompt: (place) => at(place)?.properties.prompt ?? null,
    ignoreBlanks: (place) => at(place)?.properties.ignoreBlanks ?? true,
    type: (place) => ruleName(at(place)?.properties.rule) ?? "None",
  },
  set: {
    rule: (place, value) => put(place, "rule", rule(value)),
    errorAlert: (place, value) => put(place, "errorAlert", words(value, { message: 255, title: 32 }, ["style", "showAlert"])),
    prompt: (place, value) => put(place, "prompt", words(value, { message: 255, title: 32 }, ["showPrompt"])),
    ignoreBlanks: (place, value) => {
      if (typeof value !== "boolean") throw invalidArgument("DataValidation.ignoreBlanks");
      put(place, "ignoreBlanks", value);
    },
  },
  call: { clear: (place) => void without(place) },
};

/** The rule for one cell of a sheet, for tests. */
export function validationAt(sheet: SheetModel, row: number, column: number): Record<string, unknown> | undefined {
  return at({ sheet, area: { top: row, left: column, bottom: row, right: column } })?.properties;
}

function at({ sheet, area }: Place): Validation | undefined {
  return sheet.validations.find(({ area: each }) => each.top <= area.top && each.left <= area.left && each.bottom >= area.bottom && each.right >= area.right);
}

function put(place: Place, property: string, value: unknown): void {
  refuse(place);
  const before = place.sheet.validations.find(({ area }) => area.top === place.area.top && area.left === place.area.left && area.bottom === place.area.bottom && area.right === place.area.right);
  if (before !== undefined) before.properties[property] = value;
  else place.sheet.validations.unshift({ area: place.area, properties: { [property]: value } });
}

function without(place: Place): void {
  refuse(place);
  const { area } = place;
  place.sheet.validations = place.sheet.validations.filter(({ area: each }) => each.bottom < area.top || each.top > area.bottom || each.right < area.left || each.left > area.right);
}

function refuse({ sheet, area }: Place): void {
  if (sheet.isLocked(area)) throw accessDenied(`${sheet.name} is protected`);
}

function ruleName(value: unknown): string | undefined {
  const key = Object.keys((value ?? {}) as object)[0];
  return key === undefined ? undefined : key.slice(0, 1).toUpperCase() + key.slice(1);
}

function rule(value: unknown): unknown {
  const keys = Object.keys((value ?? {}) as object);
  const kind = RULES.find((each) => each === keys[0]);
  if (keys.length !== 1 || kind === undefined) throw invalidArgument(`DataValidation.rule ${JSON.stringify(value)}`);
  const content = (value as Record<string, Record<string, unknown>>)[kind] ?? {};
  const known = kind === "list" ? ["inCellDropDown", "source"] : kind === "custom" ? ["formula"] : ["formula1", "formula2", "operator"];
  for (const key of Object.keys(content)) if (!known.includes(key)) throw notModelled(`${key} of the rule ${kind}`);
  if (kind === "list") {
    const { source } = content;
    if (typeof source === "object" && source !== null) throw notModelled("a range as the list of a validation");
    if (typeof source !== "string" || source === "" || (!source.startsWith("=") && source.length > LONGEST_LIST)) throw invalidArgument("the list of a validation must be a text of at most 255 signs, a formula or a range");
  } else if (kind !== "custom") {
    const { operator, formula1, formula2 } = content;
    const isPair = operator === "Between" || operator === "NotBetween";
    if (!OPERATORS.includes(String(operator)) || !usable(formula1) || isPair !== usable(formula2)) throw invalidArgument(`DataValidation.rule ${JSON.stringify(value)}`);
  } else if (typeof content.formula !== "string" || !content.formula.startsWith("=")) throw invalidArgument("the formula of a validation");
  return value;
}

function usable(value: unknown): boolean {
  return typeof value === "number" || (typeof value === "string" && value !== "");
}

function words(value: unknown, longest: Readonly<Record<string, number>>, others: readonly string[]): unknown {
  for (const [key, each] of Object.entries((value ?? {}) as object)) {
    if (longest[key] === undefined && !others.includes(key)) throw notModelled(`${key} of a validation's message`);
    if (longest[key] !== undefined && (typeof each !== "string" || each.length > longest[key])) throw invalidArgument(`the ${key} of a validation's message has at most ${longest[key]} signs`);
  }
  return value;
}
