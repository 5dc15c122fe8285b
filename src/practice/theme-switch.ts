/** The two looks of the page. */
export type Theme = "light" | "dark";

const KEY = "probeworth-theme";

/**
 * Makes a button switch the page between light and dark. The choice is kept for the next visit; without one the page
 * follows the machine.
 *
 * @param button     says which look it switches to
 * @param onChanged  called after each switch, not at the start
 * @returns          the look at the start
 */
export function themeSwitch(button: HTMLButtonElement, onChanged: (theme: Theme) => void): Theme {
  let theme = remembered() ?? (matchMedia("(prefers-color-scheme: dark)").matches ? "dark" : "light");
  show(theme, button);
  button.addEventListener("click", () => {
    theme = theme === "dark" ? "light" : "dark";
    show(theme, button);
    try {
      localStorage.setItem(KEY, theme);
    } catch {
      // a browser that keeps nothing still switches
    }
    onChanged(theme);
  });
  return theme;
}

function show(theme: Theme, button: HTMLButtonElement): void {
  document.documentElement.dataset["theme"] = theme;
  button.textContent = theme === "dark" ? "Light" : "Dark";
}

function remembered(): Theme | undefined {
  try {
    const kept = localStorage.getItem(KEY);
    return kept === "dark" || kept === "light" ? kept : undefined;
  } catch {
    return undefined;
  }
}
