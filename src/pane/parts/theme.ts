import { setTheme } from "@fluentui/web-components/theme/set-theme.js";
import { webDarkTheme, webLightTheme } from "@fluentui/tokens";
import { drawn, element } from "./element.js";

/** What the person may choose: as the page around the pane, or else the system, has it; or always light or dark. */
export type ColourChoice = "around" | "light" | "dark";

const ORDER: readonly ColourChoice[] = ["around", "light", "dark"];
const WORDS: Record<ColourChoice, string> = { around: "as around it", light: "light", dark: "dark" };
const SHAPES: Record<ColourChoice, string> = {
  around: "M8 2a6 6 0 1 0 0 12A6 6 0 0 0 8 2ZM8 2v12a6 6 0 0 0 0-12Z",
  light: "M8 5a3 3 0 1 0 0 6 3 3 0 0 0 0-6ZM8 1v1.6M8 13.4V15M1 8h1.6M13.4 8H15M3 3l1.2 1.2M11.8 11.8 13 13M3 13l1.2-1.2M11.8 4.2 13 3",
  dark: "M13 9.6A5.6 5.6 0 1 1 6.4 3 4.6 4.6 0 0 0 13 9.6Z",
};
const REMEMBERED = "probeworth-colours";

// The controls take their accent from our own colours, so that both look alike in either theme.
const LIGHT = {
  ...webLightTheme,
  ...accents("#0b5c66", "#09505a", "#07434b", "#ffffff"),
  colorNeutralBackground1: "#fffefb",
  colorNeutralForeground1: "#23282b",
  colorNeutralForeground2: "#4c5357",
  colorNeutralStroke1: "#8b8578",
};
const DARK = {
  ...webDarkTheme,
  ...accents("#79c7cf", "#8fd3da", "#a5dee4", "#07282c"),
  colorNeutralBackground1: "#222527",
  colorNeutralForeground1: "#ecebe6",
  colorNeutralForeground2: "#c3c2bb",
  colorNeutralStroke1: "#8d918f",
};

/**
 * The switch between light and dark. Excel on the web does not say which theme it shows, so the person does.
 *
 * @param root   the pane's own element; gets data-theme "light" or "dark"
 * @param tell   says a sentence aloud
 * @returns      the button, and a function that stops listening
 */
export function themeSwitch(root: HTMLElement, tell: (sentence: string) => void): { readonly button: HTMLElement; readonly stop: () => void } {
  const system = window.matchMedia("(prefers-color-scheme: dark)");
  let choice = remembered();
  const shape = drawn("path", { class: "theme-shape" });
  const glyph = drawn("svg", { viewBox: "0 0 16 16", width: 16, height: 16, "aria-hidden": "true" }, shape);
  const button = element("fluent-button", { role: "button", appearance: "subtle", size: "small", class: "theme-switch", "icon-only": true }, glyph);
  const apply = (): void => {
    const around = document.documentElement.dataset["theme"] ?? (system.matches ? "dark" : "light");
    const dark = (choice === "around" ? around : choice) === "dark";
    root.dataset["theme"] = dark ? "dark" : "light";
    setTheme(dark ? DARK : LIGHT, root);
    shape.setAttribute("d", SHAPES[choice]);
    shape.classList.toggle("theme-shape-half", choice === "around");
    const words = `Colours: ${WORDS[choice]}. Press for ${WORDS[after(choice)]}.`;
    button.setAttribute("aria-label", words);
    button.title = words;
  };
  button.addEventListener("click", () => {
    choice = after(choice);
    remember(choice);
    apply();
    tell(`Colours ${WORDS[choice]}.`);
  });
  system.addEventListener("change", apply);
  const page = new MutationObserver(apply);
  page.observe(document.documentElement, { attributes: true, attributeFilter: ["data-theme"] });
  apply();
  return {
    button,
    stop: () => {
      system.removeEventListener("change", apply);
      page.disconnect();
    },
  };
}

function after(choice: ColourChoice): ColourChoice {
  return ORDER[(ORDER.indexOf(choice) + 1) % ORDER.length]!;
}

function accents(rest: string, hover: string, pressed: string, on: string): Record<string, string> {
  return {
    colorBrandBackground: rest,
    colorBrandBackgroundHover: hover,
    colorBrandBackgroundPressed: pressed,
    colorNeutralForegroundOnBrand: on,
    colorCompoundBrandBackground: rest,
    colorCompoundBrandBackgroundHover: hover,
    colorCompoundBrandBackgroundPressed: pressed,
    colorCompoundBrandStroke: rest,
    colorCompoundBrandStrokeHover: hover,
    colorCompoundBrandStrokePressed: pressed,
    colorCompoundBrandForeground1: rest,
    colorCompoundBrandForeground1Hover: hover,
    colorNeutralForeground2BrandHover: hover,
    colorNeutralForeground2BrandPressed: pressed,
  };
}

// Storage may be forbidden inside a frame; the choice then lasts as long as the pane.
function remembered(): ColourChoice {
  try {
    const stored = window.localStorage.getItem(REMEMBERED);
    return ORDER.find((choice) => choice === stored) ?? "around";
  } catch {
    return "around";
  }
}

function remember(choice: ColourChoice): void {
  try {
    window.localStorage.setItem(REMEMBERED, choice);
  } catch {
    // nothing is lost but the memory of it
  }
}
