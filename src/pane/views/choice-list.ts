import { element } from "../parts/element.js";

/** A list of boxes to tick, with what may stand beside each. */
export interface ChoiceList {
  readonly list: HTMLElement;
  /** values that are ticked, in the list's order */
  chosen(): string[];
}

/**
 * Makes the list.
 *
 * @param legend   what is chosen
 * @param items    value, words, and an element that is shown while it is ticked
 * @param ticked   values that are ticked at first
 * @param changed  called after each change
 */
export function choiceList(legend: string, items: readonly { readonly value: string; readonly text: string; readonly beside?: HTMLElement }[], ticked: readonly string[], changed: () => void): ChoiceList {
  const boxes = items.map(({ value, text, beside }) => {
    const box = element("input", { type: "checkbox", value, class: "tick" });
    box.checked = ticked.includes(value);
    const show = (): void => {
      if (beside !== undefined) beside.hidden = !box.checked;
    };
    box.addEventListener("change", () => {
      show();
      changed();
    });
    show();
    return { box, row: element("div", { class: "choice" }, element("label", { class: "choice-label" }, box, element("span", {}, text)), beside) };
  });
  return {
    list: element("fieldset", { class: "choices" }, element("legend", { class: "label" }, legend), ...boxes.map(({ row }) => row)),
    chosen: () => boxes.filter(({ box }) => box.checked).map(({ box }) => box.value),
  };
}
