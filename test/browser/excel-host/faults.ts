import { HostError } from "./host-error.js";

/** Ways in which an answer fails as a whole, before anything of the request is looked at; the numbers are the platform's own. */
export const OUTRIGHT = { cellEdit: 5004, sessionOver: 5012, activityLimit: 5102, requestTooLarge: 5103, responseTooLarge: 5104 } as const;

const FIVE_MEGABYTES = 5 * 1024 * 1024;

/** Everything that can go wrong between a page and Excel, on order. */
export class Faults {
  /** signs of a request or an answer, as on the web */
  largest = FIVE_MEGABYTES;
  /** The person is typing into a cell: requests are refused, or wait where the page asked for that. */
  private editing: { readonly over: Promise<void>; readonly end: () => void } | undefined;
  private always: number | undefined;
  private once: number | undefined;
  private actionsLeft = Infinity;
  private failure = new HostError("GeneralException", "");
  private waiting: { readonly member: string; readonly change: () => void }[] = [];

  /** A person starts to type into a cell, and goes on until endEdit. */
  startEdit(): void {
    let end = (): void => undefined;
    const over = new Promise<void>((resolve) => (end = resolve));
    this.editing = { over, end };
  }

  endEdit(): void {
    this.editing?.end();
    this.editing = undefined;
  }

  /** The next request fails outright. */
  failNext(how: keyof typeof OUTRIGHT): void {
    this.once = OUTRIGHT[how];
  }

  /** The workbook is closed: from now on every request fails. */
  close(): void {
    this.always = OUTRIGHT.sessionOver;
  }

  /** The nth action from now on fails with this code; what stands before it is done. */
  failAfter(actions: number, code = "GeneralException", message = "There was an internal error while processing the request."): void {
    this.actionsLeft = actions;
    this.failure = new HostError(code, message);
  }

  /** Does something to the workbook just before the page's next use of a member, such as "WorksheetCollection.add". */
  meanwhile(member: string, change: () => void): void {
    this.waiting.push({ member, change });
  }

  /**
   * Whether a request fails as a whole.
   *
   * @param signs  its length
   * @param waits  the page asked to wait while a person types
   */
  async outright(signs: number, waits: boolean): Promise<number | undefined> {
    if (this.always !== undefined) return this.always;
    if (signs > this.largest) return OUTRIGHT.requestTooLarge;
    while (this.editing !== undefined) {
      if (!waits) return OUTRIGHT.cellEdit;
      await this.editing.over;
    }
    const once = this.once;
    this.once = undefined;
    return once;
  }

  /** Called before each action. */
  beforeAction(member: string): void {
    const due = this.waiting.filter((each) => each.member === member);
    this.waiting = this.waiting.filter((each) => each.member !== member);
    for (const { change } of due) change();
    if (this.actionsLeft-- > 0) return;
    this.actionsLeft = Infinity;
    throw this.failure;
  }
}
