import { unreadable } from "../failure.js";

/** Walks through the tags of an XML text and says where each stands. Entities of its own (a DOCTYPE) are refused, never read. */
export class TagScanner {
  /** of the present tag: from its "<" to behind its ">" */
  start = 0;
  end = 0;
  /** without namespace prefix */
  name = "";
  /** with the colon, or "" */
  prefix = "";
  kind: "open" | "close" | "empty" = "open";
  private at: number;

  constructor(
    readonly xml: string,
    from = 0,
  ) {
    this.at = from;
  }

  /** Goes to the next tag. @returns false at the end of the text */
  next(): boolean {
    for (;;) {
      const start = this.xml.indexOf("<", this.at);
      if (start < 0) return false;
      if (this.xml.startsWith("<!--", start)) this.at = after(this.xml, "-->", start);
      else if (this.xml.startsWith("<![CDATA[", start)) this.at = after(this.xml, "]]>", start);
      else if (this.xml.startsWith("<?", start)) this.at = after(this.xml, "?>", start);
      else if (this.xml.startsWith("<!", start)) throw unreadable("A part of the workbook declares entities of its own (a DOCTYPE), which the format does not allow; it is not read.");
      else {
        this.tag(start);
        return true;
      }
    }
  }

  /** True at the opening (or only) tag of such an element. */
  opens(name: string): boolean {
    return this.name === name && this.kind !== "close";
  }

  /** True at a tag that opens and closes at once. */
  isEmpty(): boolean {
    return this.kind === "empty";
  }

  /** True at the closing tag of such an element. */
  closes(name: string): boolean {
    return this.name === name && this.kind === "close";
  }

  /** The attributes of the present tag by name, prefixes included, with their characters decoded. */
  attributes(): Map<string, string> {
    return attributesOf(this.xml.slice(this.start, this.end));
  }

  private tag(start: number): void {
    const end = tagEnd(this.xml, start);
    const isClose = this.xml.charCodeAt(start + 1) === 47;
    let nameEnd = start + (isClose ? 2 : 1);
    const nameStart = nameEnd;
    for (; nameEnd < end; nameEnd++) {
      const code = this.xml.charCodeAt(nameEnd);
      if (code <= 32 || code === 47 || code === 62) break;
    }
    const written = this.xml.slice(nameStart, nameEnd);
    const colon = written.indexOf(":");
    this.name = colon < 0 ? written : written.slice(colon + 1);
    this.prefix = colon < 0 ? "" : written.slice(0, colon + 1);
    this.kind = isClose ? "close" : this.xml.charCodeAt(end - 2) === 47 ? "empty" : "open";
    this.start = start;
    this.end = end;
    this.at = end;
  }
}

const ATTRIBUTE = /([^\s=/<>"']+)\s*=\s*(?:"([^"]*)"|'([^']*)')/g;

/** The attributes within the text of a tag. */
function attributesOf(tag: string): Map<string, string> {
  const found = new Map<string, string>();
  for (const [, name, double, single] of tag.matchAll(ATTRIBUTE)) found.set(name ?? "", decoded(double ?? single ?? ""));
  return found;
}

/** The text between two places, tags and comments left out and characters decoded. */
export function textBetween(xml: string, start: number, end: number): string {
  const piece = xml.slice(start, end);
  if (!piece.includes("<")) return decoded(piece);
  const parts = piece.split(/(<!\[CDATA\[[\s\S]*?\]\]>|<!--[\s\S]*?-->|<[^>]*>)/);
  return parts.map((part) => (part.startsWith("<![CDATA[") ? part.slice(9, -3) : part.startsWith("<") ? "" : decoded(part))).join("");
}

const ENTITIES: Readonly<Record<string, string>> = { amp: "&", lt: "<", gt: ">", quot: '"', apos: "'" };

/** Decodes the five entities and the character numbers that every XML text has; others stay as they are. */
function decoded(text: string): string {
  if (!text.includes("&")) return text;
  return text.replace(/&(?:#x([0-9a-fA-F]{1,6})|#([0-9]{1,7})|([a-z]{2,4}));/g, (whole, hexadecimal?: string, decimal?: string, name?: string) => {
    if (name !== undefined) return ENTITIES[name] ?? whole;
    const code = hexadecimal !== undefined ? Number.parseInt(hexadecimal, 16) : Number(decimal);
    return code <= 0x10ffff ? String.fromCodePoint(code) : whole;
  });
}

/** Writes text so that it can stand between tags or within quotation marks. */
export function escaped(text: string): string {
  return text.replace(/[&<>"]/g, (sign) => ({ "&": "&amp;", "<": "&lt;", ">": "&gt;", '"': "&quot;" })[sign] as string);
}

/** Which order of bytes a part in UTF-16 has; undefined for UTF-8. */
export function utf16Order(bytes: Uint8Array): "big" | "little" | undefined {
  if (bytes[0] === 0xff && bytes[1] === 0xfe) return "little";
  return bytes[0] === 0xfe && bytes[1] === 0xff ? "big" : undefined;
}

/**
 * Decodes a part as text, a mark at its beginning included.
 *
 * @throws {FormulaLineError} for bytes that are no UTF-8 or UTF-16
 */
export function xmlText(bytes: Uint8Array, part: string): string {
  const order = utf16Order(bytes);
  try {
    return new TextDecoder(order === "little" ? "utf-16le" : order === "big" ? "utf-16be" : "utf-8", { fatal: true, ignoreBOM: true }).decode(bytes);
  } catch {
    throw unreadable(`The part ${part} of the workbook is no text that can be read.`);
  }
}

function after(xml: string, closing: string, from: number): number {
  const at = xml.indexOf(closing, from);
  return at < 0 ? xml.length : at + closing.length;
}

function tagEnd(xml: string, start: number): number {
  let quote = 0;
  for (let at = start + 1; at < xml.length; at++) {
    const code = xml.charCodeAt(at);
    if (quote !== 0) {
      if (code === quote) quote = 0;
    } else if (code === 34 || code === 39) quote = code;
    else if (code === 62) return at + 1;
  }
  throw unreadable("A part of the workbook breaks off in the middle of a tag.");
}
