const LIST = '[data-u-comp="sheets-formula-editor"]';

/**
 * Keeps Enter and Tab from putting an outdated suggestion into a formula. The grid renews its list of function names only
 * 300 ms after the last key, and takes its first entry at Enter: whoever types faster would get "=PDURATION(2)" for
 * "=PROBE.TOTALCOST(2)". A list that does not fit the name being typed is closed first. Call it before the grid starts, so
 * that it hears the keys first.
 */
export function closeStaleSuggestions(): void {
  let name = "";
  addEventListener(
    "keydown",
    (event) => {
      if (event.key === "Enter" || event.key === "Tab") {
        const list = document.querySelector(LIST);
        if (event.isTrusted && list !== null && !fits(list, name)) {
          event.preventDefault();
          event.stopImmediatePropagation();
          closeThen(event.target ?? document.body, event);
        }
        name = "";
      } else if (event.key === "Backspace") name = name.slice(0, -1);
      else if (event.key.length === 1) name = /[\w.]/.test(event.key) ? name + event.key : "";
      else if (event.key !== "Shift") name = "";
    },
    true,
  );
}

function fits(list: Element, name: string): boolean {
  return name !== "" && (list.firstElementChild?.textContent ?? "").toUpperCase().startsWith(name.toUpperCase());
}

function closeThen(target: EventTarget, pressed: KeyboardEvent): void {
  target.dispatchEvent(copy(pressed, "Escape", 27));
  const waiting = setInterval(() => {
    if (document.querySelector(LIST) !== null) return;
    clearInterval(waiting);
    target.dispatchEvent(copy(pressed, pressed.key, pressed.keyCode));
  }, 10);
}

function copy(pressed: KeyboardEvent, key: string, keyCode: number): KeyboardEvent {
  return new KeyboardEvent("keydown", { key, code: key, keyCode, shiftKey: pressed.shiftKey, bubbles: true, cancelable: true, composed: true });
}
