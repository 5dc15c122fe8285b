import type { Area } from "../../../../src/formula/addresses.js";
import type { SheetModel } from "./sheet-model.js";

/** A defined name. */
export interface NameModel {
  readonly name: string;
  /** the sheet on which alone it is known; undefined for the whole workbook */
  readonly sheet: SheetModel | undefined;
  /** the range that it stands for; undefined for a formula, a constant or a range that is gone */
  range: { readonly sheet: SheetModel; readonly area: Area } | undefined;
  /** with "=" */
  formula: string;
  comment: string;
  visible: boolean;
}

/** Whether Excel takes a text as a name: no cell address, no spaces, starts with a letter or "_". */
export function isName(text: string): boolean {
  if (text.length > 255 || !/^[\p{L}_\\][\p{L}\p{N}_.\\?]*$/u.test(text)) return false;
  const isCell = /^[a-z]{1,3}[0-9]{1,7}$/i.test(text) || /^r(?:[0-9]+)?(?:c(?:[0-9]+)?)?$/i.test(text) || /^c(?:[0-9]+)?$/i.test(text);
  return !isCell && !/^(?:true|false)$/i.test(text);
}
