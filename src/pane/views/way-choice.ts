import { shorten } from "../model/numbers.js";
import { element, freshId } from "../parts/element.js";

/** A choice between ways to investigate; hidden while there is only one. */
export interface WayChoice {
  readonly row: HTMLElement;
  /** offers ways; the usual one is chosen until the person chooses */
  offer(ways: readonly { readonly variant: number; readonly name: string }[], usual: number): void;
  chosen(): number;
}

/**
 * Makes the choice.
 *
 * @param label    what it is called
 * @param changed  called after the person has chosen
 */
export function wayChoice(label: string, changed: () => void): WayChoice {
  const id = freshId("way");
  const select = element("select", { id, class: "field" });
  const row = element("div", { class: "row count-row", hidden: true }, element("label", { for: id, class: "label" }, label), select);
  let offered = "";
  let own: number | undefined;
  let shown = 0;
  select.addEventListener("change", () => {
    own = shown = Number(select.value);
    changed();
  });
  return {
    row,
    offer: (ways, usual) => {
      const key = JSON.stringify(ways);
      if (key !== offered) {
        offered = key;
        own = undefined;
        select.replaceChildren(...ways.map(({ variant, name }) => element("option", { value: variant }, shorten(name, 60))));
      }
      shown = own ?? usual;
      select.value = String(shown);
      row.hidden = ways.length < 2;
    },
    chosen: () => shown,
  };
}
