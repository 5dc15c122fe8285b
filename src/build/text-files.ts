import { readFile } from "node:fs/promises";
import { fileURLToPath } from "node:url";
import type { Form } from "./form.js";
import { functionSources } from "./function-sources.js";
import { helpPage } from "./help-page.js";
import { functionsMetadata } from "./metadata.js";
import { privacyPage } from "./privacy-page.js";

/**
 * What stands beside a page of the tool and is made from the functions' own descriptions: functions.json, the help, the
 * privacy statement and their style.
 *
 * @param form       which add-in, and where it is served
 * @param namespace  what stands before the functions' names on that page
 * @returns          file name -> text
 */
export async function textFiles(form: Form, namespace: string = form.namespace): Promise<ReadonlyMap<string, string>> {
  const json = await functionsMetadata(`${form.base}help.html`);
  return new Map([
    ["functions.json", `${JSON.stringify(json, null, 2)}\n`],
    ["help.html", helpPage({ json, sources: functionSources(), namespace })],
    ["privacy.html", privacyPage()],
    ["pages.css", await readFile(fileURLToPath(new URL("pages.css", import.meta.url)), "utf8")],
  ]);
}
