import type { LineCorrelationName } from "../engine/index.js";
import { found, isBlankOrZero } from "../inputs/cells.js";
import { CATALOGUE, InputError, type Choice } from "../inputs/index.js";
import { normaliseLabel } from "../inputs/labels.js";
import { oneCell } from "./arguments.js";

/**
 * A correlation structure by the words that the site block takes for it, and the triangular one, which exists along a line only.
 *
 * @param value  the argument as the host hands it over; blank or omitted: markov
 * @throws {InputError} listing the words that are accepted
 */
export function modelFrom(value: unknown): LineCorrelationName {
  const cell = oneCell(value, "Model");
  if (isBlankOrZero(cell)) return "markov"; // zero, because desktop Excel sends it for a blank cell
  const word = normaliseLabel(String(cell));
  const choice = CHOICES.find(({ value: name, text, also }) => [name, text, ...also].some((spelling) => normaliseLabel(spelling) === word));
  if (choice === undefined) throw new InputError(`Model is ${found(cell)}; it must be one of ${CHOICES.map(({ value: name }) => name).join(", ")}.`);
  return choice.value as LineCorrelationName;
}

const CHOICES: readonly Choice[] = [
  ...(CATALOGUE.find(({ id }) => id === "correlation")?.choices ?? []),
  { value: "triangular", text: "triangular", also: [] },
];
