import { misused } from "../failure.js";

/** Which options a command knows: those with a value, each with what its value is, and those without. */
export interface KnownOptions {
  readonly values: Readonly<Record<string, string>>;
  readonly flags: readonly string[];
  /** what words without "--" are; undefined where none are taken */
  readonly plain: string | undefined;
}

/** The words after a command. */
export interface Options {
  readonly values: ReadonlyMap<string, string>;
  readonly flags: ReadonlySet<string>;
  readonly plain: readonly string[];
}

/**
 * Reads the words after a command: "--name value", "--name=value", "--flag" and plain words.
 *
 * @returns "help" where that was asked for
 * @throws {FormulaLineError} for a call that says something twice, something unknown or too little
 */
export function readOptions(words: readonly string[], known: KnownOptions): Options | "help" {
  const values = new Map<string, string>();
  const flags = new Set<string>();
  const plain: string[] = [];
  for (let k = 0; k < words.length; k++) {
    const word = words[k] ?? "";
    const at = word.indexOf("=");
    const name = at < 0 ? word : word.slice(0, at);
    if (word === "--help" || word === "-h") return "help";
    if (!word.startsWith("--")) {
      if (known.plain === undefined) throw misused(`The word ${word} is not understood; the options are ${listed(known)}.`);
      plain.push(word);
    } else if (known.flags.includes(word)) flags.add(word);
    else {
      const meaning = known.values[name];
      if (meaning === undefined) throw misused(`The option ${name} is not known; the options are ${listed(known)}.`);
      if (values.has(name)) throw misused(`The option ${name} is given twice.`);
      const value = at < 0 ? words[++k] : word.slice(at + 1);
      if (value === undefined || value === "" || (at < 0 && value.startsWith("--"))) throw misused(`The option ${name} needs ${meaning} after it.`);
      values.set(name, value);
    }
  }
  return { values, flags, plain };
}

/**
 * The number that an option holds.
 *
 * @param least  accepted
 * @param most   accepted
 * @returns      undefined where the option is not given
 * @throws {FormulaLineError} for anything but a whole number within the limits
 */
export function wholeNumber({ values }: Options, name: string, least: number, most: number): number | undefined {
  const text = values.get(name);
  if (text === undefined) return undefined;
  const number = Number(text);
  if (text.trim() === "" || !Number.isInteger(number) || number < least || number > most) throw misused(`The option ${name} is ${text}; a whole number from ${least} to ${most} is needed.`);
  return number;
}

function listed({ values, flags }: KnownOptions): string {
  const names = [...Object.keys(values), ...flags];
  return `${names.slice(0, -1).join(", ")} and ${names.at(-1) ?? ""}`;
}
