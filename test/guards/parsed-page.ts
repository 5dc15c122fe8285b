import { createRequire } from "node:module";

// The package brings no types, and its own test environment would take Node's addresses away from the code under test.
const { JSDOM } = createRequire(import.meta.url)("jsdom") as { JSDOM: new (html: string) => { readonly window: { readonly document: Document } } };

/** A page as a browser reads it; nothing in it runs or is fetched. */
export function parsedPage(html: string): Document {
  return new JSDOM(html).window.document;
}
