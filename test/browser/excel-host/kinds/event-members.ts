import type { ExcelHost } from "../excel-host.js";
import type { Arguments } from "../arguments.js";
import { EVENTS } from "../events.js";
import type { SheetModel } from "../model/sheet-model.js";
import type { WorkbookModel } from "../model/workbook-model.js";

type Call = (target: SheetModel | WorkbookModel, given: Arguments, host: ExcelHost) => void;

/** The hidden members by which the library says whose events a page wants. */
export function registering(whose: "Workbook" | "Worksheet"): Record<string, Call> {
  const calls: Record<string, Call> = {};
  for (const { member, type } of EVENTS) {
    const id = (target: SheetModel | WorkbookModel): string => (whose === "Workbook" ? "Workbook" : (target as SheetModel).id);
    calls[`_Register${member}`] = (target, _given, host) => host.events.register(type, id(target));
    calls[`_Unregister${member}`] = (target, _given, host) => host.events.unregister(type, id(target));
  }
  return calls;
}
