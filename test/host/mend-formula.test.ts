import fc from "fast-check";
import { describe, expect, it } from "vitest";
import ids from "../guards/function-ids.json" with { type: "json" };
import { callsOurs, mendedFormula } from "../../src/host/mend-formula.js";

const IDS = new Set(ids as string[]);
const mend = (formula: string, namespace = "PROBE"): string => mendedFormula(formula, namespace, IDS);

// The mangled forms are those that the platform's issue threads report: a book's number, an add-in's file, its path, the mark of an unknown function.
describe("a formula that has lost its way", () => {
  it.each([
    ["=[2]!_xldudf_PROBE_TOTALCOST(Site,4)", "=PROBE.TOTALCOST(Site,4)"],
    ["=Some.xla!_xldudf_PROBE_TOTALCOST(Site,4)", "=PROBE.TOTALCOST(Site,4)"],
    ["=_xldudf_PROBE_TOTALCOST(Site,4)", "=PROBE.TOTALCOST(Site,4)"],
    ["=_xlfn._xldudf_PROBE_TOTALCOST(Site,4)", "=PROBE.TOTALCOST(Site,4)"],
    ["=_XLDUDF_probe_totalcost(Site,4)", "=PROBE.TOTALCOST(Site,4)"],
    ["='C:\\path\\Some.xla'!PROBE.TOTALCOST(Site,4)", "=PROBE.TOTALCOST(Site,4)"],
    ["='C:\\old jobs\\It''s mine.xlam'!PROBE.TOTALCOST(Site,4)", "=PROBE.TOTALCOST(Site,4)"],
    ["='C:\\path\\[Some.xlsx]Sheet 1'!_xldudf_PROBE_COSTTABLE(Site,12)", "=PROBE.COSTTABLE(Site,12)"],
    ["=[Some.xlam]!PROBE.VERSION()", "=PROBE.VERSION()"],
    ["=[Some.xlsx]Sheet1!PROBE.VERSION()", "=PROBE.VERSION()"],
    ["=Some.xlam!probe.version()", "=probe.version()"],
    ["=IF(A1>0,[2]!_xldudf_PROBE_SAVING(Site,0,4),_xldudf_PROBE_TOTALCOST(Site,0))*1.08", "=IF(A1>0,PROBE.SAVING(Site,0,4),PROBE.TOTALCOST(Site,0))*1.08"],
    ["=@_xldudf_PROBE_TOTALCOST(Site,4)", "=@PROBE.TOTALCOST(Site,4)"],
    ["=-_xldudf_PROBE_TOTALCOST (Site,4)", "=-PROBE.TOTALCOST (Site,4)"],
    ["=_xldudf_PROBE_TOTALCOST('Other sheet'!A1:D60,4)", "=PROBE.TOTALCOST('Other sheet'!A1:D60,4)"],
    ["=_xldudf_PROBE_TOTALCOST([Inputs.xlsx]Site!A1:D60,4)", "=PROBE.TOTALCOST([Inputs.xlsx]Site!A1:D60,4)"],
    ['=_xldudf_PROBE_TOTALCOST(Site,4,"Stiffness COV",T[[#All],[a "b"]])', '=PROBE.TOTALCOST(Site,4,"Stiffness COV",T[[#All],[a "b"]])'],
  ])("%s", (wrong, right) => expect(mend(wrong)).toBe(right));

  it.each([
    "=PROBE.TOTALCOST(Site,4)",
    "=probe.totalcost(site,4)",
    "=SUM(A1:A4)",
    "=_xldudf_OTHER_TOTALCOST(Site,4)",
    "=[2]!_xldudf_OTHER_TOTALCOST(Site,4)",
    "=_xldudf_PROBE_NOSUCH(Site,4)",
    "=_xldudf_PROBEDEV_TOTALCOST(Site,4)",
    "='C:\\path\\Some.xla'!OTHER.TOTALCOST(Site,4)",
    "='C:\\path\\Some.xla'!PROBE.NOSUCH(1)",
    "=Sheet1!A1+Some.xla!Total",
    '="write _xldudf_PROBE_TOTALCOST(Site,4) or [2]!_xldudf_PROBE_X("',
    '="a ""quoted"" [2]!_xldudf_PROBE_TOTALCOST("&A1',
    "='_xldudf_PROBE_TOTALCOST('!A1",
    "='a [2]!_xldudf_PROBE_TOTALCOST(''b'!A1",
    "=Prices[_xldudf_PROBE_TOTALCOST(]",
    "=Prices['[_xldudf_PROBE_TOTALCOST(]",
    "=MY_xldudf_PROBE_TOTALCOST(Site,4)",
    "=_xldudf_PROBE_TOTALCOST",
    "=APROBE.TOTALCOST(1)",
    "=SUM(PROBE.A1,Some.xla!PROBE.TOTALCOST)",
    "=LET(x,'unclosed,x)",
    '="unclosed [2]!_xldudf_PROBE_TOTALCOST(',
    "",
  ])("leaves alone %s", (formula) => expect(mend(formula)).toBe(formula));

  it("follows the namespace of the build", () => {
    expect(mend("=[2]!_xldudf_PROBEDEV_TOTALCOST(Site,4)", "PROBEDEV")).toBe("=PROBEDEV.TOTALCOST(Site,4)");
    expect(mend("=[2]!_xldudf_PROBE_TOTALCOST(Site,4)", "PROBEDEV")).toBe("=[2]!_xldudf_PROBE_TOTALCOST(Site,4)");
    expect(mend("=Some.xla!PROBE.TOTALCOST(Site,4)", "PROBEDEV")).toBe("=Some.xla!PROBE.TOTALCOST(Site,4)");
  });

  it("mends every function that there is, in every form", () => {
    for (const id of IDS) {
      for (const wrong of [`=[2]!_xldudf_PROBE_${id}(1)`, `=A.xla!_xldudf_PROBE_${id}(1)`, `='C:\\a b\\A.xla'!PROBE.${id}(1)`, `=_xldudf_PROBE_${id}(1)`]) expect(mend(wrong)).toBe(`=PROBE.${id}(1)`);
    }
  });

  // Identity: mending twice is mending once; a text literal in front of or behind the formula stays to the letter.
  it("does nothing the second time, and nothing to texts, whatever stands around", () => {
    const piece = fc.constantFrom("[2]!", "Some.xla!", "'C:\\x y\\S.xla'!", "_xldudf_PROBE_", "PROBE.", "TOTALCOST", "VERSION", "(", ")", ",", "Site", "A1", "'", '"', "[", "]", "!", " ", "+", "_xldudf_", "é", "''");
    fc.assert(
      fc.property(fc.array(piece, { maxLength: 14 }), fc.string(), (pieces, words) => {
        const once = mend(`=${pieces.join("")}`);
        expect(mend(once)).toBe(once);
        const literal = `"${words.replaceAll('"', '""')}[2]!_xldudf_PROBE_TOTALCOST("`;
        expect(mend(`=T(${literal})&_xldudf_PROBE_VERSION()`)).toBe(`=T(${literal})&PROBE.VERSION()`);
      }),
      { seed: 4, numRuns: 2000 },
    );
  });

  it("is quick on the longest formula that a cell holds", () => {
    for (const long of ["[".repeat(8000), "'".repeat(7999), `"${"[2]!".repeat(2000)}`, "_xldudf_PROBE_".repeat(570), "[2]!_xldudf_PROBE_VERSION()+".repeat(290)]) {
      const begun = performance.now();
      mend(`=${long}`);
      expect(performance.now() - begun).toBeLessThan(2000);
    }
  });
});

describe("which formulas are ours", () => {
  it.each([["=PROBE.TOTALCOST(Site,4)"], ["=1+probe.version()"], ["=[2]!_xldudf_PROBE_TOTALCOST(Site,4)"], ["='C:\\S.xla'!PROBE.VERSION()"]])("%s is", (formula) => expect(callsOurs(formula, "PROBE", IDS)).toBe(true));
  it.each([['="PROBE.TOTALCOST(1)"'], ["=PROBE.NOSUCH(1)"], ["=PROBEDEV.TOTALCOST(1)"], ["='PROBE.TOTALCOST('!A1"], ["=SUM(A1)"]])("%s is not", (formula) => expect(callsOurs(formula, "PROBE", IDS)).toBe(false));
});
