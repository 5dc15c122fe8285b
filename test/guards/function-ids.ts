import type { FunctionsJson } from "../../src/build/metadata.js";

/**
 * What is wrong with the cell functions' descriptions, as far as worksheets already in use and Excel's own limits go.
 *
 * @param json       functions.json
 * @param committed  the ids that worksheets may hold already
 * @returns          one sentence a fault
 */
export function functionFaults(json: FunctionsJson, committed: readonly string[]): string[] {
  const faults: string[] = [];
  const ids = json.functions.map(({ id }) => id);
  for (const id of committed) if (!ids.includes(id)) faults.push(`${id} is gone; worksheets in use hold it.`);
  for (const id of ids) if (!committed.includes(id)) faults.push(`${id} is not in the committed list; add it there once and never change it.`);
  for (const { id, name, description, helpUrl, parameters } of json.functions) {
    if (!/^[A-Z0-9.]{3,64}$/.test(id) || name !== id) faults.push(`${id} is not a name of A-Z, 0-9 and full stops, 3 to 64 characters, equal to its id.`);
    if (!described(description)) faults.push(`${id} has no description of 1 to 128 characters.`);
    if (!helpUrl?.endsWith(`#${id}`)) faults.push(`${id} has no help address of its own.`);
    for (const parameter of parameters) {
      if (!described(parameter.description)) faults.push(`${id}: ${parameter.name} has no description of 1 to 128 characters.`);
    }
  }
  return faults;
}

function described(text: string | undefined): boolean {
  return text !== undefined && text.trim() !== "" && text.length <= 128;
}
