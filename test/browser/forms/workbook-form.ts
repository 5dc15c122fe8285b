import type { CellValue, Workbook } from "../../../src/host/workbook.js";

/** A form of the workbook under test, with what a person does to it from outside. */
export interface WorkbookForm {
  readonly workbook: Pick<Workbook, "readName" | "readSelection" | "names" | "insertSheet">;
  /** every sheet's cells as they show, cut to what is used; asked without the workbook interface where there is another way */
  cells(): Promise<Record<string, CellValue[][]>>;
  /** types a value into a cell and waits until it is calculated */
  type(sheet: string, address: string, value: CellValue): Promise<void>;
  select(sheet: string, address: string): Promise<void>;
  addSheet(name: string): Promise<void>;
  /** waits until everything is calculated */
  settled(): Promise<void>;
  /** begins to count calls of onChanged */
  watch(): Promise<Watch>;
  close(): Promise<void>;
}

/** A subscription to changes. */
export interface Watch {
  count(): Promise<number>;
  stop(): Promise<void>;
}

/** What a page of a form offers to the test outside it. */
export interface FormPage {
  readonly workbook: Workbook;
  /** calls so far of each subscription */
  readonly counts: number[];
  readonly stops: (() => void)[];
}

declare global {
  interface Window {
    form: FormPage;
  }
}

/** Puts a workbook where the test finds it. */
export function offer(workbook: Workbook): void {
  window.form = { workbook, counts: [], stops: [] };
}
