import type { Site } from "../../inputs/index.js";
import { offeredMethods, orderOf, RULES, usualChoices, type Refusal, type RunChoices } from "../model/run-choices.js";
import { shorten } from "../model/numbers.js";
import { element, freshId } from "../parts/element.js";
import type { RunOrder } from "../run-order.js";
import type { SiteStore } from "../site-store.js";
import { choiceList } from "./choice-list.js";

/** What a run is to do, as the person sets it. */
export interface OrderPanel {
  readonly panel: HTMLElement;
  /** @returns the order, or undefined after the panel has said what is wrong */
  order(): RunOrder | undefined;
}

/**
 * The settings of a run: counts, methods and rules side by side, when it has enough, and the seed that fixes it.
 *
 * @param store  the site block
 */
export function orderPanel(store: SiteStore): OrderPanel {
  const title = freshId("title");
  const body = element("div");
  const nothing = element("p", { class: "hint" }, "Choose a site block that can be used in the Site view first.");
  const refusal = element("p", { class: "refusal", role: "alert", hidden: true });
  const panel = element("section", { "aria-labelledby": title, class: "order" }, element("h2", { id: title }, "What to run"), nothing, body, refusal);
  let form: { readonly read: () => RunChoices; readonly mark: (part: Refusal["part"] | undefined) => void } | undefined;
  let made = "";
  store.subscribe(({ site }) => {
    nothing.hidden = site !== undefined;
    body.hidden = site === undefined;
    if (site === undefined) return;
    // What the person has set stays, unless the block itself now asks for something else.
    const key = JSON.stringify([usualChoices(site), site.problem.seed, site.money]);
    if (key === made) return;
    made = key;
    form = fields(body, site, () => {
      refusal.hidden = true;
      form?.mark(undefined);
    });
  });
  return {
    panel,
    order: () => {
      const { site, cells, place } = store.state;
      if (site === undefined || form === undefined) return undefined;
      const order = orderOf(site, cells, form.read(), place === undefined ? "" : `${place.sheet}!${place.address}`, Date.now());
      const refused = "part" in order ? order : undefined;
      form.mark(refused?.part);
      refusal.hidden = refused === undefined;
      refusal.textContent = refused?.sentence ?? "";
      return "part" in order ? undefined : order;
    },
  };
}

function fields(body: HTMLElement, site: Site, changed: () => void): { read: () => RunChoices; mark: (part: Refusal["part"] | undefined) => void } {
  const usual = usualChoices(site);
  const money = site.money === "" ? "" : shorten(site.money, 12);
  const field = (value: string, attributes: Record<string, string>): HTMLInputElement => {
    const made = element("input", { class: "field", ...attributes });
    made.value = value;
    made.addEventListener("input", changed);
    return made;
  };
  const counts = field(usual.counts, { type: "text", id: freshId("counts"), autocomplete: "off" });
  const prices = new Map(offeredMethods(site).map((method) => [method, field("", { type: "number", min: "0", step: "any", inputmode: "decimal", "aria-label": `Price per hole of ${method}, blank for the block's`, placeholder: "block\u2019s" })]));
  const methods = choiceList(
    "Methods side by side",
    offeredMethods(site).map((method) => ({ value: method, text: method, beside: element("span", { class: "beside" }, element("span", { class: "label", "aria-hidden": "true" }, "per hole"), prices.get(method)!) })),
    usual.methods,
    () => {
      changed();
      sum();
    },
  );
  const rules = choiceList("Design rules side by side", RULES, usual.rules, () => {
    changed();
    sum();
  });
  const summary = element("span", { class: "group-count" });
  const sum = (): void => {
    const ways = methods.chosen().length * rules.chosen().length;
    summary.textContent = ways === 1 ? "as in the block" : `${ways} ways`;
    if (ways === 1 && (methods.chosen()[0] !== usual.methods[0] || rules.chosen()[0] !== usual.rules[0])) summary.textContent = "one way";
  };
  sum();
  const name = freshId("stop");
  const radio = (value: string): HTMLInputElement => {
    const made = element("input", { type: "radio", name, value, class: "tick" });
    made.checked = value === usual.stop;
    made.addEventListener("change", changed);
    return made;
  };
  const byPrecision = radio("precision");
  const byNumber = radio("number");
  const regret = field(usual.sum, { type: "number", min: "0", step: "any", inputmode: "decimal", "aria-label": `Sum that a wrong choice may cost${money === "" ? "" : `, ${money}`}` });
  const realisations = field(usual.realisations, { type: "number", min: "2", step: "1", inputmode: "numeric", "aria-label": "Number of grounds analysed by finite elements" });
  regret.addEventListener("input", () => (byPrecision.checked = true));
  realisations.addEventListener("input", () => (byNumber.checked = true));
  const interaction = element("input", { type: "checkbox", class: "tick" });
  interaction.checked = usual.interaction;
  interaction.addEventListener("change", changed);
  const stop = element(
    "fieldset",
    { class: "choices stop" },
    element("legend", { class: "label" }, "Stop"),
    element("div", { class: "choice" }, element("label", { class: "choice-label" }, byPrecision, element("span", {}, "when sure to within")), element("span", { class: "beside" }, regret, money)),
    element("div", { class: "choice" }, element("label", { class: "choice-label" }, byNumber, element("span", {}, "after")), element("span", { class: "beside" }, realisations, "grounds")),
    element("p", { class: "hint" }, "Sure to within: what choosing the wrong count may be expected to cost. The sum proposed is the price of one more hole, because a doubt that costs less is not worth a hole."),
  );
  body.replaceChildren(
    element("label", { class: "label", for: counts.id }, "Numbers of holes, such as 0 to 12 or 0, 2, 4, 8"),
    counts,
    element(
      "details",
      { class: "group ways" },
      element("summary", {}, element("span", { class: "group-name" }, "Methods and design rules"), summary),
      methods.list,
      element("p", { class: "hint" }, "A method brings its own errors and reading spacing. All other prices, and hole depth, are the block's."),
      rules.list,
      element("label", { class: "choice-label" }, interaction, element("span", {}, "Piles settle their neighbours (interaction factors)")),
    ),
    stop,
    element("p", { class: "hint seed" }, `Seed: ${shorten(site.problem.seed, 24)}, from the site block. The same seed and inputs give the same figures, however often the run is interrupted.`),
  );
  const named: Record<Refusal["part"], readonly HTMLElement[]> = { counts: [counts], methods: [methods.list], rules: [rules.list], target: [regret, realisations] };
  return {
    read: () => ({
      counts: counts.value, methods: methods.chosen(), prices: Object.fromEntries([...prices].map(([method, price]) => [method, price.value])),
      rules: rules.chosen(), stop: byPrecision.checked ? "precision" : "number", sum: regret.value, realisations: realisations.value, interaction: interaction.checked,
    }),
    mark: (part) => {
      for (const [each, elements] of Object.entries(named)) for (const marked of elements) {
        if (each === part) marked.setAttribute("aria-invalid", "true");
        else marked.removeAttribute("aria-invalid");
      }
    },
  };
}

