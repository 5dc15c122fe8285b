import { describe, expect, it } from "vitest";
import { ErrorValue } from "../../src/formula/cell-value.js";
import { readCsv } from "../../src/formula/csv.js";

/** The cells of a csv as rows; null for blank ones. */
function rowsOf(content: string | Uint8Array): unknown[][] {
  const cells = readCsv(Buffer.from(content as string), "block").sheets[0]!.cells;
  const rows: unknown[][] = Array.from({ length: Math.max(...cells.map(({ row }) => row)) + 1 }, () => []);
  for (const { row, column, value } of cells) rows[row]![column] = value instanceof ErrorValue ? value.code : value;
  return rows.map((row) => Array.from(row, (value) => value ?? null));
}

describe("a csv", () => {
  it.each([
    ["commas", "Mean stiffness,20,MPa\nStiffness COV,0.6\n", [["Mean stiffness", 20, "MPa"], ["Stiffness COV", 0.6]]],
    ["semicolons and decimal commas", "Mean stiffness;20,5;MPa\nStiffness COV;0,6\n", [["Mean stiffness", 20.5, "MPa"], ["Stiffness COV", 0.6]]],
    ["semicolons and decimal points", "Mean stiffness;20.5;MPa\n", [["Mean stiffness", 20.5, "MPa"]]],
    ["tabs", "Mean stiffness\t20.5\tMPa\n", [["Mean stiffness", 20.5, "MPa"]]],
    ["a declared separator", "sep=;\r\na;1\r\n", [["a", 1]]],
    ["commas with semicolons in the notes", 'a,1,"x; y"\nb,2,p; q\nc,3\n', [["a", 1, "x; y"], ["b", 2, "p; q"], ["c", 3]]],
    ["commas with semicolons within quotation marks", 'a,"x;y"\n"b;c",2\n', [["a", "x;y"], ["b;c", 2]]],
    ["quotation marks, doubled ones and line breaks within", '"a ""b"", c",1\n"line\nbreak",2\n', [['a "b", c', 1], ["line\nbreak", 2]]],
    ["lines that end like those of each system", "a,1\r\nb,2\rc,3\nd,4", [["a", 1], ["b", 2], ["c", 3], ["d", 4]]],
    ["blank lines and blank fields", "a,,1\n\n,,2\n", [["a", null, 1], [], [null, null, 2]]],
    ["numbers as they may be written", "1,-2,+3,.5,4.,1e3,2E-3,60%\n", [[1, -2, 3, 0.5, 4, 1000, 0.002, 0.6]]],
    ["truth values and error values", "TRUE,false,#N/A,#div/0!\n", [[true, false, "#N/A", "#DIV/0!"]]],
    ["one column", "a\n1\n", [["a"], [1]]],
  ])("reads %s", (_, content, rows) => {
    expect(rowsOf(content)).toEqual(rows);
  });

  it("keeps a number in quotation marks as text, so that it can be refused", () => {
    expect(rowsOf('Mean stiffness,"20",MPa\n')).toEqual([["Mean stiffness", "20", "MPa"]]);
  });

  it("keeps a number with thousands marks or the other decimal mark as text", () => {
    expect(rowsOf("a;1.234,5;1,5\nb;2.5;3\n")).toEqual([["a", "1.234,5", 1.5], ["b", "2.5", 3]]);
    expect(rowsOf('a,"1,234"\nb,1 234\n')).toEqual([["a", "1,234"], ["b", "1 234"]]);
    expect(rowsOf("a,1e999,0x10,12abc\n")).toEqual([["a", "1e999", "0x10", "12abc"]]);
  });

  it("keeps a formula as the text that it is", () => {
    expect(rowsOf("=1+1,2\n")).toEqual([["=1+1", 2]]);
  });

  it("reads UTF-8 with and without its mark, UTF-16 and Windows-1252", () => {
    const content = "Prüfung,1,m³\n";
    const wanted = [["Prüfung", 1, "m³"]];
    expect(rowsOf(Buffer.from(`\ufeff${content}`))).toEqual(wanted);
    expect(rowsOf(Buffer.from(content))).toEqual(wanted);
    expect(rowsOf(Buffer.concat([Buffer.from([0xff, 0xfe]), Buffer.from(content, "utf16le")]))).toEqual(wanted);
    expect(rowsOf(Buffer.concat([Buffer.from([0xfe, 0xff]), Buffer.from(content, "utf16le").swap16()]))).toEqual(wanted);
    expect(rowsOf(Buffer.from(content, "latin1"))).toEqual(wanted);
  });

  it("names its whole range Site", () => {
    const { names, sheets } = readCsv(Buffer.from("a,1\nb,2,m,note\nc,3\n"), "block");
    expect(names).toEqual([{ name: "Site", sheet: undefined, meaning: "$A$1:$D$3" }]);
    expect(sheets[0]!.name).toBe("block");
  });

  it("is refused where it is none", () => {
    expect(() => readCsv(Buffer.from(""), "x")).toThrow("The csv holds no values.");
    expect(() => readCsv(Buffer.from("\n\n,,\n"), "x")).toThrow("The csv holds no values.");
    expect(() => readCsv(Buffer.from("a,\0b\n"), "x")).toThrow("no csv");
    expect(() => readCsv(Buffer.from('a,"b\n'), "x")).toThrow("a quotation mark that is never closed");
  });
});
