import { escaped } from "./xml.js";

const HEAD = '<?xml version="1.0" encoding="UTF-8" standalone="yes"?>\n';
const OFFICE = "http://schemas.openxmlformats.org/officeDocument/2006";
const PACKAGE = "http://schemas.openxmlformats.org/package/2006/metadata/core-properties";

/** What a workbook says of itself. */
export interface About {
  readonly title: string;
  /** the program that made it, and its release */
  readonly program: string;
  readonly version: string;
}

/** The parts that hold a workbook's properties, by name. */
export function propertyParts({ title, program, version }: About): Record<string, string> {
  return {
    "docProps/core.xml": `${HEAD}<cp:coreProperties xmlns:cp="${PACKAGE}" xmlns:dc="http://purl.org/dc/elements/1.1/"><dc:title>${escaped(title)}</dc:title><dc:creator>${escaped(`${program} ${version}`)}</dc:creator><cp:version>${escaped(version)}</cp:version></cp:coreProperties>`,
    "docProps/app.xml": `${HEAD}<Properties xmlns="${OFFICE}/extended-properties"><Application>${escaped(program)}</Application></Properties>`,
    "docProps/custom.xml": `${HEAD}<Properties xmlns="${OFFICE}/custom-properties" xmlns:vt="${OFFICE}/docPropsVTypes"><property fmtid="{D5CDD505-2E9C-101B-9397-08002B2CF9AE}" pid="2" name="${escaped(`${program} version`)}"><vt:lpwstr>${escaped(version)}</vt:lpwstr></property></Properties>`,
  };
}

/** The kinds of content of these parts, and of their relations to the package. */
export const PROPERTY_KINDS: Readonly<Record<string, { readonly content: string; readonly relation: string }>> = {
  "docProps/core.xml": { content: "application/vnd.openxmlformats-package.core-properties+xml", relation: "http://schemas.openxmlformats.org/package/2006/relationships/metadata/core-properties" },
  "docProps/app.xml": { content: "application/vnd.openxmlformats-officedocument.extended-properties+xml", relation: `http://schemas.openxmlformats.org/officeDocument/2006/relationships/extended-properties` },
  "docProps/custom.xml": { content: "application/vnd.openxmlformats-officedocument.custom-properties+xml", relation: "http://schemas.openxmlformats.org/officeDocument/2006/relationships/custom-properties" },
};
