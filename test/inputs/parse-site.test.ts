import { describe, expect, it } from "vitest";
import { CATALOGUE, checkSite, parseSite } from "../../src/inputs/index.js";
import { add, checkOf, put, refusalOf, SMALL, withoutGrid, without } from "./block.js";

describe("a site block", () => {
  // Source: worked out by hand from SMALL and the defaults that the catalogue states
  it("becomes the problem that it says, in metres, kilopascals and kilonewtons", () => {
    const { problem } = parseSite(SMALL);
    expect(problem.ground).toEqual({
      layers: [{ top: 0, mean: 8000, increase: 0, cov: 0.6 }], correlation: "markov", horizontalScale: 20, verticalScale: 2, regionalCov: 0, poissonRatio: 0.3,
    });
    // corner piles carry 0.5625 of 1000 kN, the two in the middle row stand on one edge: 0.75
    expect(problem.building.piles).toEqual([
      { x: 0, y: 0, load: 562.5 }, { x: 5, y: 0, load: 562.5 }, { x: 0, y: 4, load: 750 }, { x: 5, y: 4, load: 750 }, { x: 0, y: 8, load: 562.5 }, { x: 5, y: 8, load: 562.5 },
    ]);
    expect(problem.building.footprint).toEqual({ length: 9, width: 12 }); // 5 x 8 m and the nearest distance, 4 m
    expect(problem.building.value).toBe(2_000_000);
    expect(problem.building.damage).toEqual([{ distortion: 1 / 500, share: 0 }, { distortion: 1 / 300, share: 0.1 }, { distortion: 1 / 150, share: 1 }]);
    expect(problem.building.allowableSettlement).toBe(0.025);
    expect(problem.piles).toEqual({ diameter: 0.5, modulus: 30e6, shortest: 3, longest: 25, lengthStep: 0, lengthRule: "load", groupInteraction: false });
    expect(problem.investigation).toEqual({
      readingCov: 0.05, holeCov: 0.058, methodCov: 0.35, readingSpacing: 0.5, holeDepth: 15.5, holes: undefined,
      designRule: { name: "geometric", deviations: 0.5, update: false },
    });
    expect(problem.prices).toEqual({
      mobilisation: 0, perHole: 1500, perHoleMetre: 120, perReading: 0, report: 0, daysPerHole: 0, waitingDay: 0, rig: 0, perPile: 0, perPileMetre: 300, carbonPerCubicMetre: 250,
    });
    expect(problem.delay).toEqual({ dayCost: 0, daysPerSurprise: 1, surpriseTolerance: 1, foundShare: 0 });
    expect(problem.seed).toBe("1");
  });

  it("says units, counts, method and money besides", () => {
    const site = parseSite(SMALL);
    expect([site.units, site.counts, site.method, site.money]).toEqual(["SI", undefined, "Electric cone", "EUR"]);
    const other = parseSite(add(SMALL, ["Units of results", "us customary"], ["Counts", "0, 4, 2"], ["Method", "SPT"]));
    expect([other.units, other.counts, other.method]).toEqual(["US", [0, 2, 4], "Standard penetration test"]);
  });

  it("is found whatever the order, the case and the spaces", () => {
    const shuffled = [...SMALL].reverse().map(([label, ...rest]) => [`  ${String(label).toUpperCase().replace(/ /g, "\u00a0  ")}: `.replace(/^\s*:\s*$/, ""), ...rest]);
    expect(parseSite(shuffled).problem).toEqual(parseSite(SMALL).problem);
  });

  it("may have a head row, American spelling, remarks and blank cells as null, as 0 or as nothing", () => {
    const headed = [["Input", "Value", "Unit", "Note"], ...put(SMALL, "Stiffness COV", 0.6, "-", "our guess")].map((row) => (row[0] === "Price per metre of hole" ? ["Price per meter of hole", ...row.slice(1)] : row));
    expect(parseSite(headed).problem).toEqual(parseSite(SMALL).problem);
    const blanks = (blank: null | 0) => SMALL.map((row) => row.map((cell) => (cell === "" ? blank : cell)));
    expect(parseSite(blanks(null)).problem).toEqual(parseSite(SMALL).problem);
    expect(parseSite(blanks(0)).problem).toEqual(parseSite(SMALL).problem);
    expect(parseSite(SMALL.map((row) => row.slice(0, 3))).problem).toEqual(parseSite(SMALL).problem);
  });

  it("gives the very same object for equal cells, and another one for others", () => {
    const copy = () => SMALL.map((row) => [...row]);
    expect(parseSite(copy())).toBe(parseSite(copy()));
    expect(parseSite(copy(), ["Stiffness COV", 0.5])).toBe(parseSite(copy(), ["Stiffness COV", 0.5]));
    expect(parseSite(copy(), ["Stiffness COV", 0.5])).not.toBe(parseSite(copy()));
    const changed = copy();
    parseSite(changed);
    changed[1] = ["Mean stiffness", 9, "MPa", ""];
    expect(parseSite(changed).problem.ground.layers[0]!.mean).toBe(9000);
  });
});

describe("values", () => {
  it("may be a deliberate zero, written none, or a plain zero where that is the default", () => {
    expect(parseSite(put(SMALL, "Price per hole", "None")).problem.prices.perHole).toBe(0);
    expect(parseSite(put(SMALL, "Stiffness COV", " NONE ")).problem.ground.layers[0]!.cov).toBe(0);
    expect(parseSite(add(SMALL, ["Length step", 0, "m"], ["Regional COV", ""])).problem.piles.lengthStep).toBe(0);
  });

  it("may ask for their default in words", () => {
    const rows = add(SMALL, ["Pile modulus", "default"], ["Reading COV", "from the method"], ["Footprint length", "Automatic"], ["Footprint width", "auto"], ["Hole list", "auto"], ["Correlation", "default"]);
    expect(parseSite(rows).problem).toEqual(parseSite(SMALL).problem);
  });

  it("may stand at the end of their range in any unit, rounded as a formula rounds it, and no farther", () => {
    const shortest = (feet: number): number => parseSite(put(SMALL, "Shortest length", feet, "ft", "")).problem.piles.shortest;
    expect((1 / 0.3048) * 0.3048).toBeLessThan(1);
    expect(shortest(1 / 0.3048)).toBe(1);
    expect(refusalOf(put(SMALL, "Shortest length", 3.2808, "ft", ""))).toContain("Shortest length (row 17 of the site block) is 3.2808 ft; it must be from 1 m to 150 m");
  });

  it("are percentages where the unit cell says so", () => {
    expect(parseSite(put(SMALL, "Stiffness COV", 60, "%")).problem).toEqual(parseSite(SMALL).problem);
    expect(parseSite(add(SMALL, ["Share found on site", 0.5, "%"])).problem.delay.foundShare).toBe(0.005);
  });

  it("may be chosen by each spelling, and truth values are yes and no", () => {
    for (const { id, label, choices } of CATALOGUE.filter(({ kind }) => kind === "choice")) {
      for (const { value, text, also } of choices!) {
        if (value === "own") continue; // needs its COVs, tested apart
        for (const word of [text, value, ...also]) {
          const shown = checkOf(add(SMALL, ["Regional COV", 0.3], [label, ` ${word.toUpperCase()}`]), label);
          expect([id, word, shown.value, shown.ok]).toEqual([id, word, text, true]);
        }
      }
    }
    expect(parseSite(add(SMALL, ["Regional COV", 0.3], ["Regional update", false])).problem.investigation.designRule.update).toBe(false);
    expect(parseSite(add(SMALL, ["Regional COV", 0.3], ["Regional update", true])).problem.investigation.designRule.update).toBe(true);
    for (const [word, on] of [["on", true], ["Yes", true], [true, true], ["off", false], ["no", false], [false, false]] as const) {
      expect(parseSite(add(SMALL, ["Group interaction", word])).problem.piles.groupInteraction).toBe(on);
    }
    expect(parseSite(add(SMALL, ["Regional COV", 0.3])).problem.investigation.designRule.update).toBe(true);
  });

  it("of counts are the largest, a range or all of them", () => {
    const counts = (value: string | number) => parseSite(add(SMALL, ["Counts", value])).counts;
    expect(counts(3)).toEqual([0, 1, 2, 3]);
    expect(counts("2 to 4")).toEqual([2, 3, 4]);
    expect(counts("0-2")).toEqual([0, 1, 2]);
    expect(counts("8; 1,4 ,1")).toEqual([1, 4, 8]);
  });

  it("of the seed are numbers or words", () => {
    expect(parseSite(add(SMALL, ["Seed", 7])).problem.seed).toBe("7");
    expect(parseSite(add(SMALL, ["Seed", " second look "])).problem.seed).toBe("second look");
  });
});

describe("the piles", () => {
  const listed = (...rows: (string | number)[][]) => parseSite(add(withoutGrid(SMALL), ["Pile list"], ...rows)).problem.building;

  it("come from a list as well as from a grid, and the same piles give the same problem", () => {
    const rows = [[0, 0, 562.5], [5, 0, 562.5], [0, 4, 750], [5, 4, 750], [0, 8, 562.5], [5, 8, 562.5]];
    expect(listed(...rows)).toEqual(parseSite(SMALL).problem.building);
  });

  it("may be headed, named, in any order of columns and in units of the heading", () => {
    const plain = listed([0, 0, 900], [6, 0, 800]).piles;
    expect(listed(["x, m", "y, m", "Load, kN"], [0, 0, 900], [6, 0, 800]).piles).toEqual(plain);
    expect(listed(["Pile", "Load (MN)", "y [mm]", "x (cm)"], ["A1", 0.9, 0, 0], ["A2", 0.8, 0, 600]).piles).toEqual(plain);
    expect(listed(["No.", "Easting", "Northing", "Load"], [1, 0, 0, 900], [2, 6, 0, 800]).piles).toEqual(plain);
  });

  it("in a single row have ends for edges and no corners", () => {
    const { piles } = parseSite(put(put(SMALL, "Piles along x", 4), "Piles along y", 1)).problem.building;
    expect(piles.map(({ load }) => load)).toEqual([750, 1000, 1000, 750]);
  });

  it("stand as far apart along y as along x where nothing else is said", () => {
    const { piles } = parseSite(without(SMALL, "Spacing along y")).problem.building;
    expect(piles[2]).toEqual({ x: 0, y: 5, load: 750 });
  });

  it("in one line have a footprint as wide as their spacing, or the one that is given", () => {
    expect(listed([100, 50, 900], [106, 50, 800], [112, 50, 800]).footprint).toEqual({ length: 18, width: 6 });
    expect(listed([0, 0, 900], [4, 0, 900], [8, 0, 900], [20, 0, 900]).footprint).toEqual({ length: 24, width: 4 }); // the middle one of 4, 4, 4 and 12 m
    expect(listed([0, 0, 900], [0.6, 0, 800]).footprint).toEqual({ length: 1.2, width: 1 });
    expect(parseSite(add(SMALL, ["Footprint length", 30, "m"], ["Footprint width", 50, "ft"])).problem.building.footprint).toEqual({ length: 30, width: 50 * 0.3048 });
  });
});

describe("the ground", () => {
  const ground = (...rows: (string | number)[][]) => parseSite(add(without(SMALL, "Mean stiffness", "Stiffness COV"), ["Layer list"], ...rows)).problem.ground.layers;

  it("may be layers", () => {
    expect(ground([0, 6, 0.5, 0.4], [4, 20, "", 0.3])).toEqual([{ top: 0, mean: 6000, increase: 500, cov: 0.4 }, { top: 4, mean: 20000, increase: 0, cov: 0.3 }]);
    expect(ground(["Top, ft", "Mean, ksf", "Increase, ksf/ft", "COV, %"], [0, 100, 0, 40], [10, 200, 1, 30])[1]).toEqual({ top: 10 * 0.3048, mean: expect.closeTo(9576.0518, 4), increase: expect.closeTo(157.08746, 4), cov: 0.3 });
  });

  it("takes the general COV for layers that have none of their own", () => {
    const rows = add(without(SMALL, "Mean stiffness"), ["Layer list"], [0, 6], [4, 20, 0, 0.3]);
    expect(parseSite(rows).problem.ground.layers.map(({ cov }) => cov)).toEqual([0.6, 0.3]);
    expect(parseSite(rows, ["Stiffness COV", 0.5]).problem.ground.layers.map(({ cov }) => cov)).toEqual([0.5, 0.3]);
    const zeros = rows.map((row) => row.map((cell) => (cell === "" ? 0 : cell))); // as blank cells arrive on some machines
    expect(parseSite(zeros).problem).toEqual(parseSite(rows).problem);
  });
});

describe("the damage list", () => {
  it("takes fractions as text, ratios as numbers and shares in percent", () => {
    const damage = (...rows: (string | number)[][]) => parseSite(add(SMALL, ["Damage list"], ...rows)).problem.building.damage;
    const expected = [{ distortion: 1 / 400, share: 0 }, { distortion: 0.01, share: 0.5 }];
    expect(damage(["1/400", 0], [0.01, 0.5])).toEqual(expected);
    expect(damage([0.0025, 0], ["1 in 100", 0.5])).toEqual(expected);
    expect(damage(["Distortion", "Share, %"], [" 1 : 400", 0], ["1/100", 50])).toEqual(expected);
    expect(damage([0, 0], ["1/400", 0], ["1/100", 0.5])).toEqual(expected); // no damage at no distortion says nothing new
  });
});

describe("the holes", () => {
  const holes = (rows: readonly (readonly (string | number | null)[])[]) => parseSite(add(SMALL, ["Hole list"], ...rows)).problem.investigation.holes;

  it("stand where their list says, in its order", () => {
    expect(holes([[2, 3], [1, 4]])).toEqual([{ x: 2, y: 3 }, { x: 1, y: 4 }]);
    expect(holes([["Hole", "x, ft", "y, ft"], ["BH1", 10, 0], ["BH2", 0, 20]])).toEqual([{ x: 3.048, y: 0 }, { x: 0, y: 6.096 }]);
  });

  it("may stand at (0, 0) where they are named or the machine can tell a blank cell from 0", () => {
    expect(holes([["Hole", "x", "y"], [1, 0, 0], [2, 5, 5]])).toEqual([{ x: 0, y: 0 }, { x: 5, y: 5 }]);
    const nulls = add(SMALL, ["Hole list"], [5, 5], [0, 0]).map((row) => row.map((cell) => (cell === "" ? null : cell)));
    expect(parseSite(nulls).problem.investigation.holes).toEqual([{ x: 5, y: 5 }, { x: 0, y: 0 }]);
    const narrow = nulls.map((row) => row.slice(0, 2)); // labels and values alone: the row is all zeros, but there are nulls elsewhere
    expect(parseSite(narrow).problem.investigation.holes).toEqual([{ x: 5, y: 5 }, { x: 0, y: 0 }]);
  });

  it("end at a blank row, also where blank cells arrive as 0", () => {
    const rows = add(SMALL, ["Hole list"], [5, 5], [1, 1], ["", ""], ["Seed", 3]);
    const zeros = rows.map((row) => row.map((cell) => (cell === "" ? 0 : cell)));
    expect(parseSite(zeros).problem).toEqual(parseSite(rows).problem);
    expect(parseSite(rows).problem.investigation.holes).toHaveLength(2);
    expect(parseSite(rows).problem.seed).toBe("3");
  });
});

describe("the method", () => {
  it("brings its errors and its spacing; own ones go before", () => {
    const spt = parseSite(add(SMALL, ["Method", "spt"], ["Hole COV", 0.2])).problem.investigation;
    expect([spt.readingCov, spt.holeCov, spt.methodCov, spt.readingSpacing]).toEqual([0.135, 0.2, 0.5, 1.5]);
  });

  it("may be own, with its three COVs", () => {
    const own = parseSite(add(SMALL, ["Method", "own"], ["Reading COV", 0.2], ["Hole COV", 0.15], ["Method COV", "none"])).problem.investigation;
    expect([own.readingCov, own.holeCov, own.methodCov, own.readingSpacing]).toEqual([0.2, 0.15, 0, 0.5]);
  });
});

describe("check rows", () => {
  it("are one for each input, in the order of the catalogue", () => {
    expect(checkSite(SMALL).map(({ label }) => label)).toEqual(CATALOGUE.map(({ label }) => label));
    expect(parseSite(SMALL).rows).toEqual(checkSite(SMALL));
  });

  it("say what is used, what is a default and what is not used", () => {
    const rows = put(SMALL, "Mean stiffness", 8, "");
    expect(checkOf(SMALL, "Mean stiffness")).toEqual({ label: "Mean stiffness", value: 8, unit: "MPa", verdict: "used", ok: true, row: 2 });
    expect(checkOf(rows, "Mean stiffness")).toMatchObject({ value: 8, unit: "MPa", verdict: "used; no unit given, so read as MPa" });
    expect(checkOf(put(SMALL, "Price per metre of pile", 300, "EUR"), "Price per metre of pile")).toMatchObject({ unit: "EUR/m", verdict: "used; no length given, so read as EUR/m" });
    expect(checkOf(SMALL, "Stiffness COV")).toMatchObject({ value: 0.6, unit: "", verdict: "used" });
    expect(checkOf(SMALL, "Pile modulus")).toEqual({ label: "Pile modulus", value: 30, unit: "GPa", verdict: "default", ok: true, row: undefined });
    expect(checkOf(SMALL, "Correlation")).toMatchObject({ value: "separable Markov", verdict: "default" });
    expect(checkOf(SMALL, "Mobilisation")).toMatchObject({ value: "none", unit: "", verdict: "default" });
    expect(checkOf(SMALL, "Footprint width")).toMatchObject({ value: 12, unit: "m", verdict: "default: outline of the piles along y and one pile spacing" });
    expect(checkOf(without(SMALL, "Spacing along y"), "Spacing along y")).toMatchObject({ value: 5, unit: "m", verdict: "default: the spacing along x" });
    expect(checkOf(SMALL, "Hole COV")).toMatchObject({ value: 0.058, verdict: "default: from the method table (Electric cone)" });
    expect(checkOf(SMALL, "Reading spacing")).toMatchObject({ value: 0.5, unit: "m", verdict: "default: usual for the method (Electric cone)" });
    expect(checkOf(SMALL, "Counts")).toMatchObject({ value: "0 to 12" });
    expect(checkOf(SMALL, "Pile list")).toMatchObject({ value: "", verdict: "not used: the grid is given" });
    expect(checkOf(SMALL, "Layer list")).toMatchObject({ value: "", verdict: "not used: one layer is given" });
    expect(checkOf(SMALL, "Damage list")).toMatchObject({ value: "1/500: 0, 1/300: 0.10, 1/150: 1", verdict: "default" });
    expect(checkOf(SMALL, "Hole list")).toMatchObject({ value: "automatic", verdict: "default: automatic positions within the footprint" });
    expect(checkOf(SMALL, "Regional update")).toMatchObject({ verdict: "not used: there is no Regional COV" });
    expect(checkOf(add(SMALL, ["Deviations below mean", 1]), "Deviations below mean")).toMatchObject({ value: 1, verdict: "not used: it belongs to the rule mean less deviations" });
    expect(checkOf(add(SMALL, ["Hole list"], [1, 2], [3, 4]), "Hole list")).toMatchObject({ value: "2 holes", verdict: "used", row: 25 });
    expect(checkOf(add(SMALL, ["Hole list"], [1, 2]), "Counts")).toMatchObject({ value: "0, 1" });
    const layers = add(without(SMALL, "Mean stiffness"), ["Layer list"], [0, 6, 0, 0.4]);
    expect(checkOf(layers, "Mean stiffness")).toMatchObject({ value: "", verdict: "not used: the layer list takes its place" });
    expect(checkOf(layers, "Stiffness COV")).toMatchObject({ value: 0.6, verdict: "not used: each layer has its own COV" });
    expect(checkOf(layers, "Layer list")).toMatchObject({ value: "1 layer", verdict: "used" });
  });

  it("show each fault at its input, and rows without an input first", () => {
    const rows = put(put(SMALL, "Stiffness COV", -1), "Pile diameter", "thick");
    const check = checkSite([["Colour", "green", "", ""], ...rows]);
    expect(check[0]).toMatchObject({ label: "Colour", ok: false, row: 1 });
    expect(check.filter(({ ok }) => !ok).map(({ label, row }) => [label, row])).toEqual([["Colour", 1], ["Stiffness COV", 4], ["Pile diameter", 17]]);
    expect(check.find(({ label }) => label === "Mean stiffness")).toMatchObject({ verdict: "used", ok: true, row: 3 });
  });
});
