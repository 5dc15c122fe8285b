import type { FunctionsJson } from "../../../src/build/metadata.js";
import { ErrorValue } from "../../../src/formula/cell-value.js";
import { UnsupportedFormula } from "../../../src/formula/unsupported.js";
import { prepared, type Blanks, type Given } from "./function-arguments.js";
import { functionResult, type FunctionResult, type RawResult } from "./function-results.js";
import type { Message } from "./events.js";

/** Kinds of messages to the library's runtime of custom functions. */
const CATEGORY = 1;
const INVOKE = 1_000;
const CANCEL = 1_001;
/** What a message says of the function: may be cancelled, takes error values. */
const CANCELABLE = 1;
const TAKES_ERRORS = 4;

/** What the formula engine calls a value that is still on its way; cells show #BUSY!. */
export const BUSY = "#GETTING_DATA";

interface Call {
  readonly id: number;
  readonly isCancelable: boolean;
  message: Message | undefined;
  result: FunctionResult | undefined;
  isUsed: boolean;
  /** sent to a page that is gone: nobody will answer */
  isLost?: boolean;
  /** by a test, which no formula gives up */
  isAsked?: boolean;
  answered?: (result: FunctionResult) => void;
}

/** One call as a test sees it. */
export interface SeenCall {
  readonly name: string;
  readonly values: readonly unknown[];
}

/** Calls functions of the page through the library's own runtime: a message there, a result back some time later. */
export class CustomFunctions {
  /** every call that was sent, in order */
  readonly seen: SeenCall[] = [];
  /** formulas that Excel would call in a way that this model does not know */
  readonly troubles: string[] = [];
  private readonly calls = new Map<string, Call>();
  private isReady = false;
  private made = 0;
  private asked = 0;

  constructor(
    readonly metadata: FunctionsJson | undefined,
    private readonly blanks: Blanks,
    private readonly send: (messages: readonly Message[]) => void,
    private readonly arrived: (place: string) => void,
  ) {}

  /** The page has loaded its functions. */
  ready(): void {
    this.isReady = true;
    this.sendWaiting();
  }

  /** The page is gone with everything that it was asked; Excel waits for its answers all the same. */
  pageGone(): void {
    this.isReady = false;
    for (const call of this.calls.values()) call.isLost = call.message === undefined;
  }

  /** Called before the formulas are calculated. */
  startPass(): void {
    for (const call of this.calls.values()) call.isUsed = false;
  }

  /** Called after the formulas are calculated: calls what is new and gives up what no formula asks for any more. */
  endPass(): void {
    for (const [key, call] of this.calls) {
      if (call.isUsed || call.isAsked === true) continue;
      this.calls.delete(key);
      if (call.result === undefined && call.message === undefined && call.isCancelable) this.send([[CATEGORY, CANCEL, "", JSON.stringify({ invocationId: call.id }), call.id]]);
    }
    this.sendWaiting();
  }

  /**
   * The value of a function in a cell.
   *
   * @param place  the cell, so that two cells never share a call
   * @throws {UnsupportedFormula} while the function has not answered
   */
  value(id: string, given: readonly Given[], place: string, address: string): FunctionResult {
    if (this.metadata?.functions.some((each) => each.id === id) !== true) throw new UnsupportedFormula(`No function ${id} is registered.`, "#NAME?", false);
    if (given.flat(3).some((each) => each instanceof ErrorValue && each.code === BUSY)) throw busy(id);
    const call = this.callFor(id, given, place, address);
    if (!("id" in call)) return call;
    call.isUsed = true;
    if (call.result === undefined) throw busy(id);
    return call.result;
  }

  /** Calls a function without a cell, with the arguments that a formula would give. */
  ask(id: string, given: readonly Given[]): Promise<FunctionResult> {
    const call = this.callFor(id, given, `asked ${++this.asked}`, "");
    if (!("id" in call)) return Promise.resolve(call);
    call.isAsked = true;
    return new Promise((resolve) => {
      call.answered = resolve;
      this.sendWaiting();
    });
  }

  /** Results of the page; one of a call that is no longer wanted is dropped. */
  receive(results: readonly RawResult[]): void {
    for (const result of results) {
      for (const [key, call] of this.calls) {
        if (call.id !== result[0]) continue;
        call.result = functionResult(result);
        call.answered?.(call.result);
        this.arrived((JSON.parse(key) as [string])[0]);
      }
    }
  }

  /** Forgets answers, so that everything is called again. @param isMeant  by the cell */
  forget(isMeant: (place: string) => boolean): void {
    for (const [key, call] of this.calls) if ((call.result !== undefined || call.isLost === true) && isMeant((JSON.parse(key) as [string])[0])) this.calls.delete(key);
  }

  /** How many calls have not been answered. */
  get waiting(): number {
    return [...this.calls.values()].filter(({ result }) => result === undefined).length;
  }

  /** The call that these arguments make, an old one where it was made before; an answer where Excel does not call at all. */
  private callFor(id: string, given: readonly Given[], place: string, address: string): Call | FunctionResult {
    const entry = this.metadata?.functions.find((each) => each.id === id);
    if (entry === undefined) throw new Error(`No function ${id} is registered.`);
    const made = prepared(entry.parameters, given, this.blanks, this.metadata?.allowErrorForDataTypeAny === true);
    if (made instanceof ErrorValue) return { values: [[made]] };
    if (typeof made === "string") {
      this.troubles.push(`${id}: ${made}`);
      return { values: [[new ErrorValue("#VALUE!")]], message: made };
    }
    const key = JSON.stringify([place, id, made.values]);
    const before = this.calls.get(key);
    if (before !== undefined) return before;
    const isCancelable = (entry as { options?: { cancelable?: boolean } }).options?.cancelable === true;
    const number = ++this.made;
    const flags = (isCancelable ? CANCELABLE : 0) | (made.takesErrors ? TAKES_ERRORS : 0);
    const call: Call = { id: number, isCancelable, message: [CATEGORY, INVOKE, "", JSON.stringify([number, id, made.values, address, flags]), number], result: undefined, isUsed: false };
    this.calls.set(key, call);
    this.seen.push({ name: id, values: made.values });
    return call;
  }

  private sendWaiting(): void {
    if (!this.isReady) return;
    const messages: Message[] = [];
    for (const call of this.calls.values()) {
      if (call.message === undefined) continue;
      messages.push(call.message);
      call.message = undefined;
    }
    if (messages.length > 0) this.send(messages);
  }
}

function busy(id: string): UnsupportedFormula {
  return new UnsupportedFormula(`${id} has not answered yet.`, BUSY, false);
}

