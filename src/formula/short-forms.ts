import { functionName } from "./function-names.js";
import type { Token } from "./tokens.js";

/**
 * Replaces the two functions that stand for signs in a stored formula (SINGLE for "@" before an operand, ANCHORARRAY for
 * "#" after a cell) and leaves out spaces, but for the one between two operands, which means the cells that both share.
 */
export function shortForms(pieces: readonly Token[]): Token[] {
  const list = pieces.filter((piece, k) => piece.kind !== "space" || (endsOperand(pieces[k - 1]) && startsOperand(pieces[k + 1])));
  const found: Token[] = [];
  for (let k = 0; k < list.length; k++) {
    const piece = list[k] as Token;
    const name = piece.kind === "function" ? functionName(piece.text).name : "";
    const inside = list[k + 2];
    const holdsOne = inside !== undefined && ["reference", "name", "table"].includes(inside.kind) && list[k + 3]?.kind === "close";
    if (name === "ANCHORARRAY" && holdsOne) {
      found.push(inside, sign("#"));
      k += 3;
    } else if (name === "SINGLE") {
      found.push(sign("@"));
      if (holdsOne) {
        found.push(inside);
        k += 3;
      }
    } else found.push(piece);
  }
  return found;
}

function sign(text: string): Token {
  return { kind: "operator", text, raw: text };
}

function endsOperand(piece: Token | undefined): boolean {
  return piece !== undefined && ["reference", "name", "table", "close"].includes(piece.kind);
}

function startsOperand(piece: Token | undefined): boolean {
  return piece !== undefined && ["reference", "name", "table", "function"].includes(piece.kind);
}
