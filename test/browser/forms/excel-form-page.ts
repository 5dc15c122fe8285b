import "../../../src/functions/associate.js";
import { FUNCTIONS } from "../../../src/functions/registry.js";
import { ExcelWorkbook } from "../../../src/host/excel-workbook.js";
import { repairInWords, repairWorkbook } from "../../../src/host/repair.js";
import { offer } from "./workbook-form.js";

declare global {
  interface Window {
    /** what the pane's repair says */
    repair(): Promise<string>;
  }
}

offer(new ExcelWorkbook("PROBEDEV"));
window.repair = async () => repairInWords(await repairWorkbook("PROBEDEV", new Set(FUNCTIONS.keys())));
