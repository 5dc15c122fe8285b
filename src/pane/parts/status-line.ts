import { element } from "./element.js";

/** The one line in which the pane says what it has done; read aloud when it changes, never in the way. */
export interface StatusLine {
  readonly line: HTMLElement;
  /** shows a sentence and has it read aloud */
  tell(sentence: string): void;
}

/** Makes the status line. */
export function statusLine(): StatusLine {
  const line = element("p", { class: "status", role: "status", "aria-live": "polite", "aria-atomic": "true" });
  return {
    line,
    tell: (sentence) => {
      line.textContent = sentence;
    },
  };
}
