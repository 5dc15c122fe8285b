import { readdirSync, readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { generateCustomFunctionsMetadata } from "custom-functions-metadata";
import { DEVELOPMENT } from "./form.js";

/** One argument of a cell function as Excel reads it. */
export interface FunctionParameter {
  name: string;
  description?: string;
  type?: string;
  dimensionality?: string;
  optional?: boolean;
  repeating?: boolean;
}

/** One cell function as Excel reads it. */
export interface FunctionMetadata {
  id: string;
  name: string;
  description?: string;
  helpUrl?: string;
  parameters: FunctionParameter[];
  result?: { type?: string; dimensionality?: string };
}

/** The whole of functions.json. */
export interface FunctionsJson {
  allowErrorForDataTypeAny: true;
  functions: FunctionMetadata[];
}

const FUNCTIONS = fileURLToPath(new URL("../functions/", import.meta.url));

/**
 * Reads the cell functions' descriptions out of their doc comments.
 *
 * @param helpBase  page on which every function has its own anchor
 * @param folder    where the functions' sources stand
 * @returns         the content of functions.json, functions sorted by id
 * @throws {Error}  when the generator refuses a signature or two functions carry one id
 */
export async function functionsMetadata(helpBase = `${DEVELOPMENT.base}help.html`, folder = FUNCTIONS): Promise<FunctionsJson> {
  const sources = readdirSync(folder)
    .filter((name) => name.endsWith(".ts"))
    .map((name) => `${folder.replace(/\/$/, "")}/${name}`)
    .filter((path) => readFileSync(path, "utf8").includes("@customfunction"))
    .sort();
  const generated = await generateCustomFunctionsMetadata(sources);
  if (generated.errors.length > 0) throw new Error(`The functions' doc comments cannot be turned into functions.json: ${generated.errors.join(" ")}`);
  const { functions } = JSON.parse(generated.metadataJson || '{"functions":[]}') as { functions: FunctionMetadata[] };
  refuseTwins(functions);
  // without the flag Excel never calls a function whose range holds an error cell, and CHECK could not say which cell it is
  return {
    allowErrorForDataTypeAny: true,
    functions: functions.map((entry) => ({ ...entry, helpUrl: `${helpBase}#${entry.id}` })).sort((a, b) => (a.id < b.id ? -1 : 1)),
  };
}

function refuseTwins(functions: readonly FunctionMetadata[]): void {
  const seen = new Set<string>();
  for (const { id } of functions) {
    if (seen.has(id)) throw new Error(`Two functions carry the id ${id}.`);
    seen.add(id);
  }
}
