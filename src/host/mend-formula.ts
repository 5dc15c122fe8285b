const BRACKETS = "\\[(?:'.|[^\\[\\]']|\\[(?:'.|[^\\[\\]'])*\\])*\\]";
const BEFORE = `(?:'(?:[^']|'')*'|(?:${BRACKETS})?[\\p{L}\\p{N}_.\\\\]*)!`;
const NAME = "[\\p{L}_\\\\][\\p{L}\\p{N}_.\\\\?]*";
/** A text; a function's name with what stands before it; or any other piece, which is passed over whole. */
const PIECES = new RegExp(`("(?:[^"]|"")*(?:"|$))|(${BEFORE})?(${NAME})(?=\\s*\\()|${BEFORE}|'(?:[^']|'')*'|${BRACKETS}|[\\p{L}\\p{N}_.\\\\?]+`, "gu");

/**
 * A formula whose calls of our functions have lost their way, put right: Excel writes another workbook, the file of an add-in
 * or the mark of an unknown function in front of them when a workbook is opened where the functions are not installed.
 *
 * @param formula    as Excel shows it, beginning with "="
 * @param namespace  under which the functions stand here
 * @param ids        of our functions, in capitals
 * @returns          the formula; as it was where nothing is wrong. Texts and everybody else's functions are never changed
 */
export function mendedFormula(formula: string, namespace: string, ids: ReadonlySet<string>): string {
  return formula.replace(PIECES, (piece: string, text: string | undefined, _before: string | undefined, name: string | undefined) => {
    if (text !== undefined || name === undefined) return piece;
    const marked = markedId(name, namespace, ids);
    if (marked !== undefined) return `${namespace}.${marked}`;
    return ownId(name, namespace, ids) === undefined ? piece : name;
  });
}

/** Whether a formula calls one of our functions, whole or mangled. */
export function callsOurs(formula: string, namespace: string, ids: ReadonlySet<string>): boolean {
  for (const match of formula.matchAll(PIECES)) {
    const name = match[1] === undefined ? match[3] : undefined;
    if (name !== undefined && (ownId(name, namespace, ids) ?? markedId(name, namespace, ids)) !== undefined) return true;
  }
  return false;
}

function ownId(name: string, namespace: string, ids: ReadonlySet<string>): string | undefined {
  const upper = name.toUpperCase();
  const id = upper.startsWith(`${namespace}.`) ? upper.slice(namespace.length + 1) : "";
  return ids.has(id) ? id : undefined;
}

/** "_xldudf_PROBE_TOTALCOST", the form in which files store a call; Excel puts _xlfn. before it where it knows less. */
function markedId(name: string, namespace: string, ids: ReadonlySet<string>): string | undefined {
  const upper = name.toUpperCase();
  const mark = /^(?:_XLFN\.)?_XLDUDF_/.exec(upper)?.[0];
  if (mark === undefined || !upper.startsWith(`${namespace}_`, mark.length)) return undefined;
  const id = upper.slice(mark.length + namespace.length + 1);
  // a full stop of an id is stored as a line below
  return [...ids].find((each) => each.replaceAll(".", "_") === id);
}
