import { element } from "./element.js";

/** How a button looks and what it is called beyond its text. */
export interface ButtonLook {
  readonly appearance?: "primary" | "outline" | "subtle";
  /** full name for those who do not see what stands around it */
  readonly name?: string;
}

/**
 * Makes a button.
 *
 * @param text     what stands on it
 * @param pressed  what it does
 * @param look     how it looks
 */
export function button(text: string, pressed: () => void, look: ButtonLook = {}): HTMLElement {
  // The control states its role only to the browser; the attribute tells every other reader as well.
  const made = element("fluent-button", { role: "button", size: "small", appearance: look.appearance ?? "outline", "aria-label": look.name }, text);
  made.addEventListener("click", pressed);
  return made;
}
