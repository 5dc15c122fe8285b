import type { Page } from "playwright-core";

/** What a page did that a person may not see. */
export interface PageLog {
  /** errors and warnings of the console, uncaught errors, and dialogs, which are dismissed */
  readonly complaints: string[];
  /** address of every request, and of every socket */
  readonly requests: string[];
}

/** Listens to a page from now on. */
export function pageLog(page: Page): PageLog {
  const log: PageLog = { complaints: [], requests: [] };
  page.on("console", (message) => {
    if (message.type() === "error" || message.type() === "warning") log.complaints.push(`${message.type()}: ${message.text()}`);
  });
  page.on("pageerror", (error) => log.complaints.push(`uncaught: ${error.message}`));
  page.on("dialog", (dialog) => {
    log.complaints.push(`dialog: ${dialog.message()}`);
    void dialog.dismiss();
  });
  page.on("request", (request) => log.requests.push(request.url()));
  page.on("websocket", (socket) => log.requests.push(socket.url()));
  return log;
}
