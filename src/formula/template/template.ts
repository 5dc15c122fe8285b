import { existsSync, statSync } from "node:fs";
import { dirname, extname } from "node:path";
import { DEMONSTRATION } from "../../inputs/demonstration.js";
import { demonstrationWorkbook } from "../../host/demonstration-workbook.js";
import type { SheetPlan } from "../../host/workbook.js";
import { gridFunctions } from "../../practice/grid-functions.js";
import { PRODUCT_VERSION } from "../../results/index.js";
import { Calculation } from "../calculation.js";
import { bookOfPlans } from "../demonstration.js";
import { FormulaLineError, misused } from "../failure.js";
import { writeNewFile } from "../files.js";
import type { Said } from "../formula-line.js";
import { readOptions } from "../simulation/options.js";
import { newWorkbook } from "../xlsx/new-workbook.js";
import type { Namespace } from "../xlsx/stored-formula.js";
import { blankSite } from "./blank-site.js";

const USAGE = `Writes a workbook for Excel: the site block with the name Site, a bid, costs by number of holes, a sensitivity table and check rows.

  npm run --silent template -- bid.xlsx
  npm run --silent template -- new-job.xlsx --blank

  FILE.xlsx      the workbook to write
  --blank        leaves the inputs that every job must state blank; without it the figures of the invented demonstration stand there
  --development  for the add-in that developers load (functions PROBEDEV), which the installed one does not calculate
  --overwrite    replaces a file that is there

Exit code 0; 2 for a call that cannot be carried out as given, with the reason on standard error.
`;

const KNOWN = { values: {}, flags: ["--blank", "--development", "--overwrite"], plain: "the workbook to write" };

/**
 * Carries out one call that writes the template.
 *
 * @param words  the words after the command
 */
export function template(words: readonly string[]): Said {
  try {
    const options = readOptions(words, KNOWN);
    if (options === "help") return { out: USAGE, err: "", code: 0 };
    const { flags, plain } = options;
    if (plain.length > 1) throw misused(`One workbook is written, and ${plain.length} names are given: ${plain.join(", ")}.`);
    const path = plain[0];
    if (path === undefined) throw misused("Give the name of the workbook to write, such as bid.xlsx; --help says more.");
    const overwrite = flags.has("--overwrite");
    requireFree(path, overwrite);
    writeNewFile(path, templateWorkbook(flags.has("--blank"), flags.has("--development") ? "PROBEDEV" : "PROBE"), overwrite);
    return { out: `Written to ${path}. ${flags.has("--blank") ? "Fill in the sheet Site; the sheet Check says what is missing." : "Its figures are invented; put your own into the sheet Site, where inputs are marked."}\n`, err: "", code: 0 };
  } catch (reason) {
    if (reason instanceof FormulaLineError) return { out: "", err: `${reason.message}\n`, code: reason.exitCode };
    throw reason;
  }
}

/**
 * The template as a file, with the values of its formulas as the functions give them now.
 *
 * @param isBlank    without the demonstration's figures
 * @param functions  whose functions the formulas call
 */
export function templateWorkbook(isBlank: boolean, functions: Namespace): Uint8Array {
  const plans = demonstrationWorkbook().map((plan): SheetPlan => (isBlank && plan.names?.some(({ name }) => name === "Site") ? blankSite(plan) : plan));
  const calculation = new Calculation(bookOfPlans(plans), gridFunctions);
  try {
    return newWorkbook(plans, {
      valuesOf: (sheet, row, column) => calculation.cell({ sheet, row, column })?.values,
      functions,
      about: { title: isBlank ? "Number of boreholes for a piled foundation" : DEMONSTRATION.title, program: "Probeworth", version: PRODUCT_VERSION },
    });
  } finally {
    calculation.dispose();
  }
}

function requireFree(path: string, overwrite: boolean): void {
  if (extname(path).toLowerCase() !== ".xlsx") throw misused(`The template is an xlsx workbook, so its name must end with .xlsx, and ${path} does not.`);
  if (!existsSync(dirname(path))) throw misused(`There is no folder ${dirname(path)} to write into.`);
  const there = statSync(path, { throwIfNoEntry: false });
  if (there?.isFile() === false) throw misused(`${path} is not a file.`);
  if (there !== undefined && !overwrite) throw misused(`The file ${path} is there already; give another name, or add --overwrite to replace it.`);
}
