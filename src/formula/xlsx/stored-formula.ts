import { tokens } from "../tokens.js";

/** A formula as the xlsx format stores it. */
export interface StoredFormula {
  /** without "=" */
  readonly text: string;
  /** it calls functions of the add-in, which the format keeps as formulas that spill */
  readonly isOurs: boolean;
}

/** Whose functions a stored formula calls: those of the installed add-in, or of the one that developers load. */
export type Namespace = "PROBE" | "PROBEDEV";

/**
 * Writes a formula as Excel stores it. Functions of an add-in stand under one word with "_xldudf_" in front and underscores for
 * full stops; found so, they are bound to the add-in as soon as that is there, and found otherwise they stay #NAME? for good.
 *
 * @param formula    with or without "="
 * @param namespace  that of the add-in which shall calculate it
 */
export function storedFormula(formula: string, namespace: Namespace): StoredFormula {
  let isOurs = false;
  const text = tokens(formula.replace(/^\s*=/, "")).map(({ kind, text: written, raw }) => {
    if (kind !== "function" || !/^PROBE\./i.test(written)) return raw;
    isOurs = true;
    return `${raw.slice(0, raw.length - written.length)}_xldudf_${namespace}_${written.slice("PROBE.".length).toUpperCase().replaceAll(".", "_")}`;
  });
  return { text: text.join(""), isOurs };
}
