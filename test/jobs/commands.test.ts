import ExcelJS from "exceljs";
import { spawn } from "node:child_process";
import { existsSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { merge } from "../../src/formula/simulation/merge.js";
import { progressText } from "../../src/formula/simulation/progress-line.js";
import { simulate, simulationThreads } from "../../src/formula/simulation/simulate.js";
import { readSimulateCall } from "../../src/formula/simulation/simulate-call.js";
import type { Terminal } from "../../src/formula/simulation/terminal.js";
import { saveState } from "../../src/jobs/simulation-state.js";
import { stateOfText, stateText } from "../../src/jobs/state-text.js";
import { newWorkbook } from "../../src/formula/xlsx/new-workbook.js";
import { quickThreads } from "./quick-threads.js";
import { smallSiteCsv, smallSiteRows, smallTask } from "./small-site.js";

const ROOT = fileURLToPath(new URL("../..", import.meta.url));
const folder = mkdtempSync(join(tmpdir(), "simulate-"));
const at = (name: string): string => join(folder, name);
afterAll(() => rmSync(folder, { recursive: true }));

interface Said {
  readonly code: number;
  readonly out: string;
  readonly err: string;
}

/** Carries out a command in this process; Ctrl-C is pressed once the words are heard on standard error. */
async function said(command: typeof simulate, words: readonly string[], stopAt?: RegExp, threads = quickThreads): Promise<Said> {
  let [out, err] = ["", ""];
  const pressed: (() => void)[] = [];
  const terminal: Terminal = {
    isLive: true,
    out: (text) => void (out += text),
    err: (text) => {
      err += text;
      if (stopAt?.test(err) === true) for (const press of pressed) press();
    },
    onInterrupt: (handler) => {
      pressed.push(handler);
      return () => void pressed.splice(0);
    },
  };
  const code = await command(words, terminal, threads);
  return { code, out, err };
}

const simulated = (...words: string[]): Promise<Said> => said(simulate, words);
const merged = (...words: string[]): Promise<Said> => said(merge, words);
/** Without the line of the file that was written. */
const tableOf = ({ out }: Said): string => out;

const SITE = at("small.csv");
const SOON = ["--book", SITE, "--precision", "10000000", "--workers", "2"];

describe("a run in the terminal", () => {
  let whole: Said;
  beforeAll(async () => {
    writeFileSync(SITE, smallSiteCsv());
    whole = await said(simulate, [...SOON, "--out", at("new.xlsx"), "--brief", "0", "--state", at("whole.state")], undefined, simulationThreads);
  }, 120_000);

  it("prints the table with its stamp and writes it beside the site block in a new workbook", async () => {
    expect([whole.code, whole.out.split("\n")[0]]).toEqual([0, expect.stringMatching(/^Holes {2}Investigation .*Surprises {2}Over-design, m/)]);
    expect(whole.out).toMatch(/\nCheapest: \d holes?, total EUR [\d,]+.*\nRealisations: \d+ by finite elements, [\d,]+ by the second-order form alone\. Version .*, seed 11, inputs [0-9a-f]{16}\.\n$/);
    expect(whole.err).toContain("Preparing the piles and the ground ...");
    expect(whole.err).toContain(`Written to ${at("new.xlsx")}, sheets Simulation and Client brief.`);
    const book = new ExcelJS.Workbook();
    await book.xlsx.readFile(at("new.xlsx"));
    expect(book.worksheets.map(({ name }) => name)).toEqual(["Site", "Simulation", "Client brief"]);
    expect(book.getWorksheet("Site")!.getCell("A2").value).toBe("Mean stiffness");
    const column = book.getWorksheet("Simulation")!.getColumn(1).values as unknown[];
    expect(column).toEqual(expect.arrayContaining(["Hash of the inputs", "Count (holes)", 0, 1, 3]));
    const brief = (book.getWorksheet("Client brief")!.getColumn(1).values as unknown[]).filter((value) => typeof value === "string").join(" ");
    expect(brief).toMatch(/^How many holes before the piles are priced For this foundation of 3 piles, .* expected to cost least: [\d,]+\u00a0EUR in all/);
    // the count that the client has in mind is told of
    expect(brief).toMatch(/buying none, as proposed, this|That is the number proposed/);
    expect(brief).toMatch(/Inputs read from: small\.csv\./);
  });

  it("goes on from its state file without computing anything twice", async () => {
    const again = await simulated(...SOON, "--state", at("whole.state"));
    expect(tableOf(again)).toBe(tableOf(whole));
    // not one realisation was asked of a thread
    expect(again.err).not.toContain("realisations by finite elements");
  }, 60_000);

  it("is stopped by Ctrl-C, keeps what is done, says how to go on, and ends with the same table", async () => {
    const first = await said(simulate, [...SOON, "--out", at("stopped.xlsx")], / [1-9]\d* of \d+ realisations by finite elements/);
    expect(first.code).toBe(130);
    const kept = at("stopped.state");
    expect(first.err).toMatch(/What is finished is kept in .*stopped\.state\. To go on: npm run --silent simulate -- --book .* --state .*stopped\.state\n$/);
    expect(existsSync(at("stopped.xlsx"))).toBe(false);
    expect(stateOfText(readFileSync(kept, "utf8")).elements.length).toBeGreaterThan(0);
    const second = await simulated(...SOON, "--out", at("stopped.xlsx"), "--state", kept);
    expect([second.code, tableOf(second)]).toEqual([0, tableOf(whole)]);
  }, 120_000);

  it("gives the same table with another number of workers, from an xlsx, on a new sheet of a copy", async () => {
    const cells = smallSiteRows().flatMap((row, r) => row.map((value, column) => ({ row: r, column, value })));
    const book = newWorkbook([{ name: "Simulation", cells, names: [{ name: "Site", range: `A1:D${smallSiteRows().length}` }] }]);
    writeFileSync(at("site.xlsx"), book);
    const other = await simulated("--book", at("site.xlsx"), "--precision", "10000000", "--workers", "1", "--brief", "none", "--out", at("copy.xlsx"));
    expect([other.code, tableOf(other)]).toEqual([0, tableOf(whole)]);
    expect(other.err).toContain(`Written to ${at("copy.xlsx")}, sheets Simulation (2) and Client brief.`);
    const copy = new ExcelJS.Workbook();
    await copy.xlsx.readFile(at("copy.xlsx"));
    expect(copy.worksheets.map(({ name }) => name)).toEqual(["Simulation", "Simulation (2)", "Client brief"]);
    expect(Buffer.from(readFileSync(at("site.xlsx"))).equals(Buffer.from(book))).toBe(true);
  }, 120_000);

  it("refuses a state of other inputs, a damaged one and a part, and leaves them alone", async () => {
    const before = readFileSync(at("whole.state"), "utf8");
    const other = await simulated(...SOON, "--counts", "0-2", "--state", at("whole.state"));
    expect([other.code, other.out]).toEqual([1, ""]);
    expect(other.err).toMatch(/^.*whole\.state: The saved run belongs to other inputs \(/);
    expect(readFileSync(at("whole.state"), "utf8")).toBe(before);
    writeFileSync(at("short.state"), before.slice(0, before.length / 2));
    expect((await simulated(...SOON, "--state", at("short.state"))).err).toMatch(/short\.state: The saved run is damaged or cut short and cannot be used; take an earlier copy of it, or start anew\.\n$/);
    writeFileSync(at("old.state"), stateText({ ...stateOfText(before), version: "0.0.1" }));
    expect((await simulated(...SOON, "--state", at("old.state"))).err).toContain("was made by version 0.0.1");
    writeFileSync(at("part.state"), stateText(saveState(smallTask(), { elements: [], form: [] }, { units: "SI", money: "" }, { from: 0, to: 5 })));
    expect(await simulated(...SOON, "--state", at("part.state"))).toEqual({ code: 2, out: "", err: `${at("part.state")} holds realisations 1 to 5 of a run; give another file.\n` });
  }, 60_000);
});

it("lets piles settle their neighbours as the block says, or where the command says so", async () => {
  const settling = at("settling.csv");
  writeFileSync(SITE, smallSiteCsv());
  writeFileSync(settling, smallSiteCsv({ "Group interaction": "on" }));
  const few = ["--realisations", "2", "--counts", "0"];
  const [alone, told, block] = [await simulated("--book", SITE, ...few), await simulated("--book", SITE, ...few, "--interaction"), await simulated("--book", settling, ...few)];
  expect([alone.code, told.code]).toEqual([0, 0]);
  expect(told.out).toBe(block.out);
  expect(told.out).not.toBe(alone.out);
}, 60_000);

describe("parts of a run", () => {
  const part = (from: number, to: number, name: string, ...more: string[]): Promise<Said> => simulated("--book", SITE, "--from", String(from), "--to", String(to), "--part", at(name), "--workers", "1", ...more);

  beforeAll(async () => {
    writeFileSync(SITE, smallSiteCsv());
    for (const [from, to, name] of [[1, 1, "a.part"], [2, 3, "b.part"], [3, 3, "c.part"]] as const) {
      const { code, err } = await part(from, to, name);
      expect([code, err]).toEqual([0, expect.stringContaining(`Realisations ${from} to ${to} are in ${at(name)}; npm run merge joins the parts.`)]);
    }
    writeFileSync(at("other.csv"), smallSiteCsv({ Seed: 12 }));
    await simulated("--book", at("other.csv"), "--from", "2", "--to", "3", "--part", at("other.part"));
  }, 120_000);

  it("are joined in any order into the table of one run, bit for bit, and written into a workbook", async () => {
    const one = await simulated("--book", SITE, "--realisations", "3", "--out", at("one.xlsx"), "--workers", "2");
    const joined = await merged(at("b.part"), at("a.part"), "--book", SITE, "--out", at("joined.xlsx"), "--brief", "3", "--workers", "1");
    expect(joined.err).toContain("sheets Simulation and Client brief.");
    expect([joined.code, joined.out]).toEqual([0, one.out]);
    const figures = async (path: string): Promise<unknown[][]> => {
      const book = new ExcelJS.Workbook();
      await book.xlsx.readFile(path);
      const rows: unknown[][] = [];
      book.getWorksheet("Simulation")!.eachRow((row) => rows.push([...(row.values as unknown[])]));
      return rows.filter(([, label]) => label !== "Date");
    };
    expect(await figures(at("joined.xlsx"))).toEqual(await figures(at("one.xlsx")));
  }, 120_000);

  it("are refused where they do not belong together", async () => {
    const refused = async (...words: string[]): Promise<string> => {
      const { code, out, err } = await merged(...words);
      expect([code, out]).toEqual([1, ""]);
      return err;
    };
    expect(await refused(at("a.part"), at("c.part"))).toBe("Realisations 2 to 2 are in none of the parts; compute them with --from 2 --to 2.\n");
    expect(await refused(at("b.part"))).toBe("Realisations 1 to 1 are in none of the parts; compute them with --from 1 --to 1.\n");
    expect(await refused(at("a.part"), at("b.part"), at("c.part"))).toBe(`Realisations 3 to 3 are in both ${at("b.part")} and ${at("c.part")}; leave one of them out.\n`);
    expect(await refused(at("a.part"), at("other.part"))).toMatch(/other\.part belongs to other inputs \([0-9a-f]{16}\) than .*a\.part/);
    const text = readFileSync(at("b.part"), "utf8");
    const state = stateOfText(text);
    writeFileSync(at("version.part"), stateText({ ...state, version: "0.2.0" }));
    expect(await refused(at("a.part"), at("version.part"))).toMatch(/version\.part: The saved run was made by version 0\.2\.0 and this is version/);
    writeFileSync(at("half.part"), stateText({ ...state, elements: state.elements.map((run) => ({ from: run.from, count: 1, values: run.values.slice(0, run.values.length / 2) })) }));
    expect(await refused(at("a.part"), at("half.part"))).toBe(`${at("half.part")} is not finished: 1 of its 2 realisations are there. Run it again with --from 2 --to 3 --part ${at("half.part")}; it goes on where it stopped.\n`);
    const form = state.form.map((run) => ({ ...run, values: run.values.map((value) => value * (1 + 2 ** -52)) }));
    writeFileSync(at("machine.part"), stateText({ ...state, form }));
    expect(await refused(at("a.part"), at("machine.part"))).toMatch(/machine\.part was computed with other arithmetic than/);
    writeFileSync(at("whole.part"), stateText({ ...state, part: undefined }));
    expect(await refused(at("whole.part"))).toMatch(/whole\.part holds a run of its own and no part of one/);
    writeFileSync(at("cut.part"), text.slice(0, -20));
    expect(await refused(at("a.part"), at("cut.part"))).toMatch(/cut\.part: The saved run is damaged or cut short/);
    expect(await refused(at("a.part"), at("b.part"), "--book", at("other.csv"), "--out", at("no.xlsx"))).toMatch(/^The site block of .*other\.csv is not the one that the parts were made from/);
    expect(await merged(at("none.part"))).toEqual({ code: 2, out: "", err: `There is no file ${at("none.part")}.\n` });
  }, 60_000);

  it("go on where they stopped, and are not written over another part", async () => {
    const state = stateOfText(readFileSync(at("b.part"), "utf8"));
    writeFileSync(at("begun.part"), stateText({ ...state, elements: state.elements.map((run) => ({ from: run.from, count: 1, values: run.values.slice(0, run.values.length / 2) })) }));
    expect((await part(2, 3, "begun.part")).code).toBe(0);
    expect(stateOfText(readFileSync(at("begun.part"), "utf8"))).toEqual(state);
    expect(await part(1, 3, "b.part")).toEqual({ code: 2, out: "", err: `${at("b.part")} holds realisations 2 to 3 of a run; give another file.\n` });
  }, 60_000);
});

it("says in one line how far the run is, how long it takes and what it found so far", () => {
  const progress = { phase: "computing", done: { elements: 12, form: 1200 }, wanted: { elements: 64, form: 3400 }, share: 0.1899, secondsLeft: 150, table: undefined, threads: 2, notice: "" } as const;
  expect(progressText(progress)).toBe(" 18 %: 12 of 64 realisations by finite elements, 1,200 of 3,400 by the form, 3 minutes left");
  expect(progressText({ ...progress, secondsLeft: undefined, phase: "preparing" })).toBe("Preparing the piles and the ground ...");
});

describe("the words after the command", () => {
  it.each([
    [["--precision", "0"], "The option --precision is 0; a sum of money above 0 is needed"],
    [["--precision", "-3"], "The option --precision is -3;"],
    [["--precision", "cheap"], "The option --precision is cheap;"],
    [["--realisations", "0"], "The option --realisations is 0; a whole number from 2 to 100000 is needed."],
    [["--realisations", "1.5"], "The option --realisations is 1.5;"],
    [["--realisations", "20", "--precision", "5"], "both say when to stop"],
    [["--counts", "0-99"], "The option --counts is 0-99; numbers of holes from 0 to 60 are needed, such as 0-12 or 0,2,4-8."],
    [["--counts", "5-2"], "The option --counts is 5-2;"],
    [["--counts", "two"], "The option --counts is two;"],
    [["--workers", "0"], "The option --workers is 0; a whole number from 1 to 64 is needed."],
    [["--from", "1", "--to", "5"], "A part of a run needs all three of --from, --to and --part."],
    [["--from", "5", "--to", "1", "--part", "x"], "--to must not be smaller than --from"],
    [["--from", "1", "--to", "5", "--part", "x", "--out", "y.xlsx"], "--part and --out do not go together"],
    [["--overwrite"], "--overwrite goes with --out."],
    [["--brief", "2"], "--brief goes with --out, the workbook that it is written into."],
    [["--brief", "few", "--out", "x.xlsx"], "The option --brief is few; the number of holes that the client has in mind, or none, is needed, from 0 to 60."],
    [["--brief", "61", "--out", "x.xlsx"], "The option --brief is 61;"],
    [["--brief", "--out", "x.xlsx"], "The option --brief needs the number of holes that the client has in mind, or none, after it."],
    [["--state"], "The option --state needs a file after it."],
    [["--state", "--out"], "The option --state needs a file after it."],
    [["--state", "a", "--state", "b"], "The option --state is given twice."],
    [["--speed", "9"], "The option --speed is not known; the options are --book,"],
    [["fast"], "The word fast is not understood"],
  ])("%j are refused in a sentence", async (words, sentence) => {
    const { code, out, err } = await simulated(...words);
    expect([code, out]).toEqual([2, ""]);
    expect(err).toContain(sentence);
  });

  it("may join name and value, and list counts in any order", () => {
    expect(readSimulateCall(["--counts=4,0-2,2", "--realisations=20"])).toMatchObject({ counts: [0, 1, 2, 4], target: { realisations: 20 } });
  });

  it("are explained with --help", async () => {
    expect(await simulated("--help")).toEqual({ code: 0, out: expect.stringContaining("--realisations N"), err: "" });
    expect(await merged("-h")).toEqual({ code: 0, out: expect.stringContaining("Joins parts"), err: "" });
  });

  it("name files and counts that are there", async () => {
    expect(await simulated("--book", at("none.xlsx"))).toEqual({ code: 2, out: "", err: `There is no file ${at("none.xlsx")}.\n` });
    writeFileSync(at("faulty.csv"), smallSiteCsv({ "Stiffness COV": -1 }));
    expect((await simulated("--book", at("faulty.csv"))).err).toMatch(/^Stiffness COV .*\n$/);
    writeFileSync(at("there.xlsx"), "");
    expect((await simulated("--out", at("there.xlsx"))).err).toContain("is there already; give another name, or add --overwrite to replace it.");
    expect((await simulated("--out", at("no/such/folder.xlsx"))).err).toContain("There is no folder");
    expect((await simulated("--out", at("table.csv"))).err).toContain("its name must end with .xlsx");
  });
});

// The whole way through the shell's door: the script as npm runs it, both streams, the signal and the exit code. A launcher that ends a
// busy process by force after Ctrl-C would lose what is done.
it("hears Ctrl-C as a process of its own", async () => {
  writeFileSync(SITE, smallSiteCsv());
  const { scripts } = JSON.parse(readFileSync(join(ROOT, "package.json"), "utf8")) as { scripts: { simulate: string } };
  const [program, ...script] = scripts.simulate.split(" ");
  expect(program).toBe("node");
  const child = spawn(process.execPath, [...script, "--book", SITE, "--realisations", "1000", "--state", at("signal.state")], { cwd: ROOT });
  let err = "";
  let isPressed = false;
  child.stderr.on("data", (piece: Buffer) => {
    err += piece.toString();
    // not before something is finished, which would be told otherwise
    if (isPressed || !/ %: [1-9][\d,]* of /.test(err)) return;
    isPressed = true;
    child.kill("SIGINT");
  });
  const code = await new Promise((resolve) => child.on("close", resolve));
  expect(code).toBe(130);
  expect(err).toMatch(/What is finished is kept in .*signal\.state\. To go on: npm run --silent simulate -- .* --realisations 1000 --state .*signal\.state\n$/);
  expect(stateOfText(readFileSync(at("signal.state"), "utf8")).inputs).toMatch(/^[0-9a-f]{16}$/);
}, 120_000);
