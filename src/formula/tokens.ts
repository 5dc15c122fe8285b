import { readReference } from "./addresses.js";

/** One piece of a formula's text. */
export interface Token {
  readonly kind: TokenKind;
  /** as written, without the sheet in front */
  readonly text: string;
  /** what stands before the "!", unquoted; undefined without one */
  readonly sheet?: string;
  /** exactly as it stands in the formula */
  readonly raw: string;
}

type Piece = Omit<Token, "raw">;

export type TokenKind =
  | "reference"
  | "name"
  /** a name right before an opening bracket; the bracket is its own token */
  | "function"
  /** a table with its square brackets, or the brackets alone */
  | "table"
  | "number"
  | "text"
  | "error"
  /** a constant in braces */
  | "array"
  | "operator"
  | "open"
  | "close"
  | "comma"
  | "space"
  /** anything else */
  | "unknown";

const PREFIX = /(?:'((?:[^']|'')+)'|((?:\[[^\]]*\])?[\p{L}_\\][\p{L}\p{N}_.\\?]*(?::[\p{L}_\\][\p{L}\p{N}_.\\?]*)?|\[[^\]]*\]))!/uy;
const REFERENCE = /(?:\$?[A-Z]{1,3}\$?[0-9]{1,7}(?::\$?[A-Z]{1,3}\$?[0-9]{1,7})?|\$?[A-Z]{1,3}:\$?[A-Z]{1,3}|\$?[0-9]{1,7}:\$?[0-9]{1,7})(?![\p{L}\p{N}_.(\\!])/iuy;
const NAME = /[\p{L}_\\][\p{L}\p{N}_.\\?]*/uy;
const NUMBER = /(?:[0-9]+\.?[0-9]*|\.[0-9]+)(?:[eE][-+]?[0-9]+)?/y;
const TEXT = /"(?:[^"]|"")*"/y;
const ERROR = /#(?:NULL!|DIV\/0!|VALUE!|REF!|NAME\?|NUM!|N\/A|GETTING_DATA|SPILL!|CALC!|FIELD!|BLOCKED!|CONNECT!|BUSY!|UNKNOWN!)/iy;
const ARRAY = /\{(?:"(?:[^"]|"")*"|[^"{}])*\}/y;
const SPACE = /[ \t\r\n\u00a0]+/y;
const OPERATOR = /<=|>=|<>|[-+*/^&=<>%:@#]/y;

/**
 * Takes a formula apart. The pieces put together again give the formula; what cannot be told is of kind "unknown".
 *
 * @param formula  without the leading "="
 */
export function tokens(formula: string): Token[] {
  const found: Token[] = [];
  let at = 0;
  const take = (pattern: RegExp): RegExpExecArray | null => {
    pattern.lastIndex = at;
    return pattern.exec(formula);
  };
  while (at < formula.length) {
    const [piece, length] = next(formula, at, take);
    found.push({ ...piece, raw: formula.slice(at, at + length) });
    at += length;
  }
  return found;
}

function next(formula: string, at: number, take: (pattern: RegExp) => RegExpExecArray | null): [Piece, number] {
  const plain = (kind: TokenKind, text: string): [Piece, number] => [{ kind, text }, text.length];
  const character = formula.charAt(at);
  if (character === "(") return plain("open", character);
  if (character === ")") return plain("close", character);
  if (character === "," || character === ";") return plain("comma", ",");
  for (const [kind, pattern] of [["space", SPACE], ["text", TEXT], ["error", ERROR], ["array", ARRAY]] as const) {
    const match = take(pattern);
    if (match !== null) return plain(kind, match[0]);
  }
  const prefix = take(PREFIX);
  if (prefix !== null) {
    const sheet = prefix[1]?.replaceAll("''", "'") ?? prefix[2] ?? "";
    const start = at + prefix[0].length;
    const [rest, length] = operand(formula, start);
    return [{ ...rest, sheet }, prefix[0].length + length];
  }
  if (character === "[") {
    const length = bracketsLength(formula, at);
    return plain(length > 0 ? "table" : "unknown", formula.slice(at, at + Math.max(length, 1)));
  }
  const [token, length] = operand(formula, at);
  if (token.kind !== "unknown") return [token, length];
  const number = take(NUMBER);
  if (number !== null) return plain("number", number[0]);
  const operator = take(OPERATOR);
  return operator === null ? plain("unknown", character) : plain("operator", operator[0]);
}

function operand(formula: string, at: number): [Piece, number] {
  const take = (pattern: RegExp): string | undefined => {
    pattern.lastIndex = at;
    return pattern.exec(formula)?.[0];
  };
  const reference = take(REFERENCE);
  if (reference !== undefined && readReference(reference) !== undefined) return [{ kind: "reference", text: reference }, reference.length];
  const error = take(ERROR);
  if (error !== undefined) return [{ kind: "error", text: error }, error.length];
  const name = take(NAME);
  if (name === undefined) return [{ kind: "unknown", text: formula.charAt(at) }, Math.min(1, formula.length - at)];
  const after = formula.charAt(at + name.length);
  if (after === "(") return [{ kind: "function", text: name }, name.length];
  if (after === "[") {
    const brackets = bracketsLength(formula, at + name.length);
    if (brackets > 0) return [{ kind: "table", text: formula.slice(at, at + name.length + brackets) }, name.length + brackets];
  }
  return [{ kind: "name", text: name }, name.length];
}

/** Square brackets may nest, and an apostrophe takes away the meaning of the next sign. */
function bracketsLength(formula: string, at: number): number {
  let depth = 0;
  for (let k = at; k < formula.length; k++) {
    const character = formula.charAt(k);
    if (character === "'") k++;
    else if (character === "[") depth++;
    else if (character === "]" && --depth === 0) return k - at + 1;
  }
  return 0;
}
