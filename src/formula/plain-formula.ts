import { nearestWord } from "../inputs/labels.js";
import { moved, readReference } from "./addresses.js";
import type { Book } from "./book.js";
import { CHANGING, COUNTING_DAYS, functionName, OUT_OF_REACH } from "./function-names.js";
import { ReferenceWriter, type Level } from "./reference-writer.js";
import { shortForms } from "./short-forms.js";
import type { Surroundings } from "./surroundings.js";
import { tableReference, type Place } from "./table-references.js";
import { tokens, type Token } from "./tokens.js";
import { UnsupportedFormula } from "./unsupported.js";

/** A formula without names, tables, prefixes and short forms. */
export interface PlainFormula {
  /** without "="; every reference carries its sheet as S_0, S_1, ... */
  readonly text: string;
  /** its value changes from one calculation to the next */
  readonly isChanging: boolean;
}

const NAMES_WITHIN_NAMES = 20;

/**
 * Writes a formula in the few forms that the formula engine reads without traps: names and tables become references,
 * references carry their sheet, stored function names become the written ones, and one cell is picked where an ordinary
 * formula takes one out of a range.
 *
 * @param formula   without "="
 * @param place     where it stands
 * @param isSingle  true for an ordinary formula of a stored workbook, which gives one value
 * @throws {UnsupportedFormula} for what cannot be read or calculated
 */
export function plainFormula(formula: string, place: Place, isSingle: boolean, around: Surroundings): PlainFormula {
  const writer = new PlainWriter(place, isSingle, around);
  writer.all(tokens(formula), false);
  return { text: writer.written, isChanging: writer.isChanging };
}

class PlainWriter {
  written = "";
  isChanging = false;
  private readonly levels: Level[] = [];
  private readonly variables = new Set<string>();
  private readonly references: ReferenceWriter;
  private namesOpen = 0;

  constructor(
    private readonly place: Place,
    isSingle: boolean,
    private readonly around: Surroundings,
  ) {
    this.references = new ReferenceWriter(place, isSingle, around);
  }

  /** @param fromA1  true for the meaning of a defined name, whose references are written as seen from cell A1 */
  all(pieces: readonly Token[], fromA1: boolean): void {
    const list = shortForms(pieces);
    const depth = this.levels.length;
    for (let k = 0; k < list.length; ) {
      k += this.one(list, k, fromA1);
      if (this.levels.length < depth) throw notReadable("a closing bracket has no opening one");
    }
    if (this.levels.length > depth) throw notReadable("a closing bracket is missing");
  }

  /** Writes the piece at k and says how many pieces that took. */
  private one(list: readonly Token[], k: number, fromA1: boolean): number {
    const token = list[k] as Token;
    const { kind, text } = token;
    if (kind === "reference") return this.reference(list, k, fromA1, false);
    if (kind === "function") return this.call(token, "");
    if (kind === "operator" && text === "@") return 1 + this.onlyOne(list, k + 1, fromA1);
    if (kind === "operator" && text === "#") throw notReadable("the sign # stands after something that is not a cell");
    if (kind === "name") this.name(token, list[k + 1], false);
    else if (kind === "table") this.area(token, false);
    else if (kind === "open") this.open("(", undefined, "");
    else if (kind === "close") this.close();
    else if (kind === "comma") this.comma();
    else if (kind === "space") throw new UnsupportedFormula("The formula takes the cells that two ranges share, which the formula line does not calculate.", "#NULL!");
    else if (kind === "unknown") throw notReadable(text === '"' ? "a text has no closing quotation mark" : `the sign ${text} has no meaning there`);
    else this.written += kind === "error" ? text.toUpperCase() : text;
    return 1;
  }

  /** What follows the sign "@", which takes one value out of a range or table. */
  private onlyOne(list: readonly Token[], k: number, fromA1: boolean): number {
    const token = list[k];
    if (token?.kind === "reference") return this.reference(list, k, fromA1, true);
    if (token?.kind === "table") this.area(token, true);
    else if (token?.kind === "name") this.name(token, list[k + 1], true);
    else if (token?.kind === "open") this.open("INDEX((", undefined, ",1,1)");
    else if (token?.kind === "function") {
      this.written += "INDEX(";
      return this.call(token, ",1,1)");
    } else throw notReadable("the sign @ stands before something that has no cells");
    return 1;
  }

  private reference(list: readonly Token[], k: number, fromA1: boolean, onlyOne: boolean): number {
    const { text, sheet } = list[k] as Token;
    const read = readReference(text);
    if (read === undefined) throw notReadable(`${text} is no reference`);
    const reference = fromA1 ? moved(read, this.place.row, this.place.column) : read;
    const at = this.references.sheetIndex(sheet);
    if (list[k + 1]?.text === "#" && list[k + 1]?.kind === "operator") {
      this.written += this.references.spilled(at, reference);
      return 2;
    }
    const isEnd = list[k + 1]?.text === ":" || list[k - 1]?.text === ":";
    this.written += isEnd ? this.references.whole(at, reference) : this.references.written(at, reference, this.levels, onlyOne);
    return 1;
  }

  private area(token: Token, onlyOne: boolean): void {
    const { sheet, area } = tableReference(this.around.book, token.text, this.place);
    this.written += this.references.written(sheet, area, this.levels, onlyOne);
  }

  /** A function with its opening bracket. */
  private call({ text, sheet }: Token, after: string): number {
    const { name } = functionName(text, sheet === "[0]" ? undefined : sheet);
    const meaning = this.around.functions.has(name) ? undefined : this.meaningOf(text, sheet);
    if (meaning !== undefined) {
      this.expand(text, meaning, false);
      this.open("(", undefined, after);
      return 2;
    }
    if (OUT_OF_REACH.has(name)) throw new UnsupportedFormula(`The formula line does not calculate ${name}.`);
    if (!this.around.functions.has(name)) throw unknownFunction(name, this.around.functions);
    if (this.around.book.dates1904 && COUNTING_DAYS.has(name)) throw new UnsupportedFormula(`The workbook counts dates from 1904, for which the formula line does not calculate ${name}.`, "#VALUE!");
    if (CHANGING.has(name)) this.isChanging = true;
    this.open(`${name}(`, name, after);
    return 2;
  }

  private name(token: Token, following: Token | undefined, onlyOne: boolean): void {
    const bare = token.text.replace(/^_xlpm\./i, "");
    if (bare !== token.text || this.isNewVariable(following)) this.variables.add(bare.toUpperCase());
    if (this.variables.has(bare.toUpperCase())) this.written += bare;
    else if (/^(?:TRUE|FALSE)$/i.test(bare) && token.sheet === undefined) this.written += bare.toUpperCase();
    else {
      const meaning = this.meaningOf(bare, token.sheet);
      if (meaning === undefined) throw unknownName(bare, token.sheet, this.around.book);
      this.expand(bare, meaning, onlyOne);
    }
  }

  private expand(name: string, meaning: string, onlyOne: boolean): void {
    if (this.namesOpen >= NAMES_WITHIN_NAMES) throw new UnsupportedFormula(`The name ${name} stands for itself, or for more than ${NAMES_WITHIN_NAMES} names within names.`, "#NAME?", false);
    this.namesOpen++;
    const pieces = tokens(meaning);
    if (pieces.length === 1 && pieces[0]?.kind === "reference") this.reference(pieces, 0, true, onlyOne);
    else if (pieces[0]?.kind === "function" && functionName(pieces[0].text).name === "LAMBDA") this.all(pieces, true);
    else {
      this.open(onlyOne ? "INDEX((" : "(", undefined, "");
      this.all(pieces, true);
      this.levels.pop();
      this.written += onlyOne ? "),1,1)" : ")";
    }
    this.namesOpen--;
  }

  private meaningOf(name: string, sheet: string | undefined): string | undefined {
    const wanted = name.toLowerCase();
    const named = this.around.book.names.filter((entry) => entry.name.toLowerCase() === wanted);
    if (named.length === 0) return undefined;
    const at = sheet === "[0]" ? undefined : this.references.sheetIndex(sheet);
    return (named.find((entry) => entry.sheet !== undefined && entry.sheet === at) ?? named.find((entry) => entry.sheet === undefined))?.meaning;
  }

  /** LET names a variable in every other argument from its first on, LAMBDA in all but its last. */
  private isNewVariable(following: Token | undefined): boolean {
    const level = this.levels[this.levels.length - 1];
    if (following?.kind !== "comma" || level === undefined) return false;
    return level.name === "LAMBDA" || (level.name === "LET" && level.argument % 2 === 0);
  }

  private open(text: string, name: string | undefined, after: string): void {
    this.written += text;
    this.levels.push({ name, argument: 0, after });
  }

  private close(): void {
    const level = this.levels.pop();
    if (level === undefined) throw notReadable("a closing bracket has no opening one");
    this.written += `)${level.after}`;
  }

  private comma(): void {
    const level = this.levels[this.levels.length - 1];
    if (level?.name === undefined) throw new UnsupportedFormula("The formula joins several ranges with commas, which the formula line does not calculate.", "#VALUE!");
    level.argument++;
    this.written += ",";
  }
}

function notReadable(what: string): UnsupportedFormula {
  return new UnsupportedFormula(`The formula cannot be read: ${what}.`, "#NAME?", false);
}

function unknownFunction(name: string, functions: ReadonlySet<string>): UnsupportedFormula {
  const near = name.startsWith("PROBE.") ? nearestWord(name, [...functions].filter((known) => known.startsWith("PROBE."))) : undefined;
  return new UnsupportedFormula(`No function named ${name} is known${near === undefined ? "" : `; the nearest is ${near}`}.`);
}

function unknownName(name: string, sheet: string | undefined, book: Book): UnsupportedFormula {
  const near = nearestWord(name, book.names.map((entry) => entry.name));
  const where = sheet === undefined ? "The workbook" : `The sheet ${sheet}`;
  return new UnsupportedFormula(`${where} has no name ${name}${near === undefined ? "" : `; the nearest is ${near}`}.`, "#NAME?", sheet?.includes("[") === true);
}
