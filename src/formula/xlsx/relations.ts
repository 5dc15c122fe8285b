import { TagScanner, xmlText } from "./xml.js";
import type { ZipFile } from "./zip.js";

/** A part that another part names. */
export interface Relation {
  readonly id: string;
  /** the last word of its kind, such as "worksheet" */
  readonly kind: string;
  /** name of the part within the package; undefined for something outside */
  readonly part: string | undefined;
}

/**
 * The parts that a part names.
 *
 * @param part  such as "xl/workbook.xml"; "" for the package itself
 */
export function relations(zip: ZipFile, part: string): Relation[] {
  const folder = part.slice(0, part.lastIndexOf("/") + 1);
  const name = relationsPart(part);
  const bytes = zip.read(name);
  if (bytes === undefined) return [];
  const scan = new TagScanner(xmlText(bytes, name));
  const found: Relation[] = [];
  while (scan.next()) {
    if (!scan.opens("Relationship")) continue;
    const attributes = scan.attributes();
    const target = attributes.get("Target") ?? "";
    const isInside = attributes.get("TargetMode") !== "External";
    found.push({ id: attributes.get("Id") ?? "", kind: (attributes.get("Type") ?? "").split("/").at(-1) ?? "", part: isInside ? resolved(folder, target) : undefined });
  }
  return found;
}

/** The name of the part that holds the relations of a part. */
export function relationsPart(part: string): string {
  const slash = part.lastIndexOf("/");
  return `${part.slice(0, slash + 1)}_rels/${part.slice(slash + 1)}.rels`;
}

/** The name of a part from a path that starts at the package ("/xl/...") or at a folder, with ".." for the folder above. */
function resolved(folder: string, target: string): string {
  const steps: string[] = [];
  for (const step of (target.startsWith("/") ? target : folder + target).split("/")) {
    if (step === "..") steps.pop();
    else if (step !== "" && step !== ".") steps.push(step);
  }
  return steps.join("/");
}
