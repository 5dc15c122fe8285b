import { readFileSync } from "node:fs";
import { beforeAll, describe, expect, it } from "vitest";
import { functionsMetadata, type FunctionsJson } from "../../src/build/metadata.js";
import { FUNCTIONS } from "../../src/functions/registry.js";

const guard = <T>(name: string): T => JSON.parse(readFileSync(new URL(`../guards/${name}`, import.meta.url), "utf8")) as T;

describe("functions.json", () => {
  let metadata: FunctionsJson;
  beforeAll(async () => {
    metadata = await functionsMetadata("https://example.invalid/help.html");
  });

  it("is the committed one, to the letter: what Excel shows changes on purpose only", () => {
    expect(metadata).toEqual(guard("functions.json"));
  });

  it("keeps every id ever released, because workbooks hold them", () => {
    expect(metadata.functions.map(({ id }) => id)).toEqual(guard<string[]>("function-ids.json"));
  });

  it("names exactly the functions that have a body", () => {
    expect(metadata.functions.map(({ id }) => id)).toEqual([...FUNCTIONS.keys()].sort());
  });

  it("lets error cells through to the functions and keeps data types out", () => {
    expect(metadata).toMatchObject({ allowErrorForDataTypeAny: true });
    expect(Object.keys(metadata).sort()).toEqual(["allowErrorForDataTypeAny", "functions"]);
  });

  it("has arguments of type any only, so that a wrong kind of cell meets our sentence and not Excel's bare error", () => {
    for (const { id, parameters } of metadata.functions) expect([id, parameters.filter(({ type }) => type !== "any")]).toEqual([id, []]);
  });

  // Excel's limits: ids of letters, digits and full stops, 3 to 64 characters; descriptions up to 128
  it("stays inside Excel's limits and describes every function and argument", () => {
    for (const { id, name, description, helpUrl, parameters } of metadata.functions) {
      expect(id).toMatch(/^[A-Z0-9.]{3,64}$/);
      expect(name).toBe(id);
      expect(description?.length, id).toBeGreaterThan(10);
      expect(description?.length, id).toBeLessThanOrEqual(128);
      expect(helpUrl).toBe(`https://example.invalid/help.html#${id}`);
      for (const parameter of parameters) {
        expect(parameter.description?.length, `${id} ${parameter.name}`).toBeGreaterThan(5);
        expect(parameter.description?.length, `${id} ${parameter.name}`).toBeLessThanOrEqual(128);
      }
    }
  });

  it("puts required arguments first and the repeating pairs, optional, last", () => {
    for (const { id, parameters } of metadata.functions) {
      const optional = parameters.map((parameter) => parameter.optional === true);
      expect([id, optional]).toEqual([id, [...optional].sort()]);
      parameters.forEach((parameter, place) => {
        expect([id, parameter.name === "pairs"]).toEqual([id, parameter.repeating === true]);
        if (parameter.repeating === true) expect([id, place, parameter.optional, parameter.dimensionality]).toEqual([id, parameters.length - 1, true, undefined]);
      });
    }
  });

  it("carries a unit in the name of every argument that has one, because the tool tip shows names only", () => {
    const units = { SETTLEMENT: ["load_kN", "length_m", "diameter_m", "soil_MPa", "pile_GPa"], DESIGNLENGTH: ["load_kN", "diameter_m", "soil_MPa", "pile_GPa", "allowable_mm", "shortest_m", "longest_m"], CORRELATION: ["lag_m", "scale_m"], VARIANCEFACTOR: ["length_m", "scale_m"] };
    for (const [id, names] of Object.entries(units)) {
      const found = metadata.functions.find((entry) => entry.id === id)?.parameters.map(({ name }) => name) ?? [];
      expect(found.filter((name) => /_(m|mm|kN|MPa|GPa)$/.test(name))).toEqual(names);
    }
  });

  it("spills where the body gives rows and nowhere else", () => {
    const spilling = metadata.functions.filter(({ result }) => result?.dimensionality === "matrix").map(({ id }) => id);
    expect(spilling).toEqual(["CHECK", "COSTTABLE", "GROUNDKINDS", "LAYOUT", "LENGTHTABLE", "METHODS"]);
  });
});
