import { COLOURS } from "./colours.js";
import { LAYOUT } from "./layout.js";
import { PICTURES } from "./pictures.js";

let adopted = false;

/** Gives the page the pane's styles, once; as a constructed sheet, which a strict content policy allows. */
export function adoptStyles(): void {
  if (adopted) return;
  adopted = true;
  const sheet = new CSSStyleSheet();
  sheet.replaceSync([COLOURS, LAYOUT, PICTURES].join("\n"));
  document.adoptedStyleSheets.push(sheet);
}
