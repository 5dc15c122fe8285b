import type { HelpEntry } from "../model/help-entries.js";
import { button } from "../parts/button.js";
import { element } from "../parts/element.js";

/** What the buttons of an example do. */
export interface ExampleActions {
  /** puts the formula on the clipboard; false where the browser forbids it */
  readonly copy: (formula: string) => Promise<boolean>;
  /** puts the formula on a new sheet; undefined where there is no workbook */
  readonly insert: ((id: string, formula: string) => void) | undefined;
  readonly tell: (sentence: string) => void;
}

/**
 * One function, folded; its inside is made when it is first opened, because there are many.
 *
 * @param entry     the function
 * @param siteName  the name under which the example finds the site block, asked each time the entry is opened
 * @param actions   what the buttons do
 */
export function helpEntry(entry: HelpEntry, siteName: () => string, actions: ExampleActions): HTMLElement {
  const head = element("summary", {}, element("span", { class: "function-name" }, entry.id), element("span", { class: "function-words" }, entry.description));
  const made = element("details", { class: "group function" }, head);
  made.addEventListener("toggle", () => {
    if (made.open) made.replaceChildren(head, inside(entry, siteName(), actions));
  });
  return made;
}

function inside(entry: HelpEntry, siteName: string, actions: ExampleActions): HTMLElement {
  const formula = entry.example(siteName);
  const parameters = entry.parameters.flatMap((parameter) => [
    element("dt", {}, element("code", {}, parameter.name), parameter.need === "required" ? undefined : element("span", { class: "need" }, ` ${parameter.need}`)),
    element("dd", {}, parameter.description),
  ]);
  const list = parameters.length === 0 ? element("p", {}, "It takes no arguments.") : element("dl", { class: "parameters" }, ...parameters);
  return element("div", { class: "function-body" }, element("p", { class: "call" }, element("code", {}, breakable(entry.call))), list, formula === undefined ? undefined : example(entry.id, formula, actions));
}

function example(id: string, formula: string, actions: ExampleActions): HTMLElement {
  const shown = element("code", { class: "formula", tabindex: -1 }, formula);
  const copy = async (): Promise<void> => {
    if (await actions.copy(formula)) {
      actions.tell("Copied. Paste it into a cell.");
      return;
    }
    // Without leave to use the clipboard the person copies by hand; the text is already marked for that.
    window.getSelection()?.selectAllChildren(shown);
    shown.focus();
    actions.tell("The clipboard is closed to this pane. The formula is marked; copy it with the keyboard.");
  };
  const buttons = element("div", { class: "row" }, button("Copy", () => void copy(), { name: `Copy the example of ${id}` }));
  const { insert } = actions;
  if (insert !== undefined) buttons.append(button("Put on a new sheet", () => insert(id, formula), { name: `Put the example of ${id} on a new sheet` }));
  return element("div", { class: "example" }, shown, buttons);
}

/** Lets a long call break after a comma and after the full stop, which the pane's width needs. */
function breakable(call: string): string {
  return call.replace(/([.(])/g, "$1\u200b");
}
