import type { FunctionsJson } from "../../../src/build/metadata.js";
import { Calculator } from "./calculator.js";
import { CustomFunctions } from "./custom-functions.js";
import { Events, type Message } from "./events.js";
import { Faults } from "./faults.js";
import type { Blanks, Given } from "./function-arguments.js";
import type { FunctionResult } from "./function-results.js";
import { notModelled } from "./host-error.js";
import { opened, type Opened } from "./kind.js";
import { WorkbookModel } from "./model/workbook-model.js";
import { References } from "./references.js";
import { Request } from "./request.js";
import type { SupportedSets } from "./requirement-sets.js";
import type { WireReply, WireRequest } from "./wire.js";

/** What kind of Excel stands behind the wire. */
export interface HostOptions {
  readonly sets: SupportedSets;
  readonly namespace: string;
  readonly metadata: FunctionsJson | undefined;
  readonly blanks: Blanks;
}

/** The Excel side of the wire: a workbook, and what a page may ask of it. */
export class ExcelHost {
  readonly book = new WorkbookModel();
  readonly references = new References();
  readonly faults = new Faults();
  readonly events = new Events();
  readonly functions: CustomFunctions;
  readonly calculator: Calculator;
  readonly sets: SupportedSets;
  /** every refusal that the page was given, in order */
  readonly refused: { readonly code: string; readonly message: string }[] = [];
  /** whether the pane is shown, in the platform's word */
  paneState = "Visible";
  /** what the page still has to be told */
  private readonly outbox: Message[] = [];

  /** @param send  brings messages to the page */
  constructor(
    { sets, namespace, metadata, blanks }: HostOptions,
    private readonly send: (messages: readonly Message[]) => void,
  ) {
    this.sets = sets;
    this.functions = new CustomFunctions(metadata, blanks, (messages) => this.outbox.push(...messages), (place) => this.calculator.answered(place));
    this.calculator = new Calculator(this.book, this.functions, namespace);
    this.book.listeners.add((event) => this.outbox.push(...this.events.messagesFor(event)));
  }

  get root(): Opened {
    return opened("Workbook", this.book);
  }

  /** Objects that the page makes by the name of a service. */
  service(name: string): Opened {
    if (name === "Microsoft.InternalService.AddinInternalService") return opened("AddinInternalService", undefined);
    if (name === "Microsoft.AppRuntime.AppRuntimeService") return opened("AppRuntimeService", undefined);
    if (name === "Microsoft.ExcelServices.CustomFunctions") return opened("CustomFunctions", undefined);
    throw notModelled(`the service ${name}`);
  }

  /** @param isOfFunctions  the request comes from the runtime of custom functions, whose root is another */
  perform(request: WireRequest, isOfFunctions: boolean): WireReply {
    return new Request(this, request, isOfFunctions ? opened("CustomFunctionsContainer", undefined) : this.root).perform();
  }

  /**
   * Calls a cell function as Excel would, without a cell.
   *
   * @param given  a range as rows of cells with null for a blank one, one cell as its value, undefined for an omitted argument
   */
  async ask(id: string, given: readonly Given[]): Promise<FunctionResult> {
    const answer = this.functions.ask(id, given);
    this.settle();
    return answer;
  }

  /** The page starts anew, as Excel does with one that has not answered for too long. */
  pageGone(): void {
    this.events.pageGone();
    this.functions.pageGone();
  }

  /** Calculates what has changed and tells the page; called after a request was answered or a person did something. */
  settle(): void {
    this.calculator.bringUpToDate();
    if (this.outbox.length > 0) this.send(this.outbox.splice(0));
  }
}
