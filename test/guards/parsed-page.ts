import { createRequire } from "node:module";

// The package brings no types, and its own test environment would take Node's addresses away from the code under test.
const { JSDOM } = createRequire(import.meta.url)("jsdom") as { JSDOM: new (html: string) => { readonly window: { readonly document: Document; readonly DOMParser: new () => DOMParser } } };

/** A page as a browser reads it; nothing in it runs or is fetched. */
export function parsedPage(html: string): Document {
  return new JSDOM(html).window.document;
}

/** An XML text as a browser reads it; one that is not well-formed holds an element parsererror. */
export function parsedXml(text: string): Document {
  return new (new JSDOM("").window.DOMParser)().parseFromString(text, "application/xml");
}
