import type { Form } from "./form.js";

/** The drawings' library puts this one style sheet, always the same, into every picture; it is named by its SHA-256. */
const STYLES_OF_DRAWINGS = "'sha256-3cmPCalqtbvjSTYuXgWaEMmks6y5MkkqAhnajKyYiHQ='";

/** Lets the page compile the numeric kernels, which are bytes of our own bundle; text still never becomes code. Without it the same sums run in JavaScript, slower. */
const KERNELS = "'wasm-unsafe-eval'";

/**
 * What the pane's page may load and run: its own files, and the platform's library from where the form takes it. No script
 * and no style inside the page, no text turned into code, no word to another server.
 *
 * @param form  whose page it is
 */
export function panePolicy(form: Form): string {
  const library = URL.canParse(form.library) ? ` ${new URL(form.library).origin}` : "";
  return [
    "default-src 'none'",
    `script-src 'self' ${KERNELS}${library}`,
    `style-src 'self' ${STYLES_OF_DRAWINGS}`,
    "img-src 'self' data:",
    "connect-src 'self'",
    "worker-src 'self'",
    "base-uri 'none'",
    "form-action 'none'",
  ].join("; ");
}

/** A thread takes its policy from its own script's headers and from nowhere else: the guide has the server send this one with every script. */
export const THREAD_POLICY = `default-src 'none'; script-src 'self' ${KERNELS}`;

/** What a page of text may load: its own style sheet. */
export const TEXT_POLICY = "default-src 'none'; style-src 'self'; img-src data:; base-uri 'none'; form-action 'none'";
