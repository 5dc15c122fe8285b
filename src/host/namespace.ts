/** Strings and quoted sheet names, which are left alone, and words. */
const PIECES = /"(?:[^"]|"")*"|'(?:[^']|'')*'|[\p{L}_\\][\p{L}\p{N}_.\\?]*/gu;

/** The namespace in which plans and examples are written. */
export const PLANNED_NAMESPACE = "PROBE";

/**
 * A plan's formula for the namespace under which the functions stand here.
 *
 * @param formula    with functions written as PROBE.NAME, in any case
 * @param namespace  such as "PROBEDEV"
 */
export function inNamespace(formula: string, namespace: string): string {
  const beginning = `${PLANNED_NAMESPACE}.`;
  return namespace === PLANNED_NAMESPACE ? formula : formula.replace(PIECES, (piece) => (piece.toUpperCase().startsWith(beginning) ? `${namespace}.${piece.slice(beginning.length)}` : piece));
}
