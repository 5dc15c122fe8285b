import { afterAll, beforeAll, describe, expect, it, vi } from "vitest";
import type * as Engine from "../../src/engine/index.js";
import { ninePiles } from "./decision/example-problem.js";

// The same problems through the whole engine twice, with WebAssembly and without: what a person reads must not hang on what a browser allows.
describe("with and without WebAssembly", () => {
  let vector: typeof Engine;
  let scalar: typeof Engine;

  const compiled: boolean[] = [];
  const loaded = async (): Promise<typeof Engine> => {
    vi.resetModules();
    const engine = await import("../../src/engine/index.js");
    const { kernels } = await import("../../src/engine/numerics/chosen-kernels.js");
    compiled.push(String(kernels().factor).includes("[native code]"));
    return engine;
  };

  beforeAll(async () => {
    vector = await loaded();
    vi.stubGlobal("WebAssembly", undefined);
    scalar = await loaded();
    vi.unstubAllGlobals();
  });
  afterAll(() => vi.unstubAllGlobals());

  it("run apart", () => {
    expect(compiled).toEqual([true, false]);
  });

  it.each([
    ["as it stands", ninePiles()],
    ["isotropic, much scatter", ninePiles({ correlation: "ellipsoidal", cov: 1, rule: "harmonic" })],
    ["surprises found", ninePiles({ foundShare: 0.7, rule: "quartile" })],
    ["group interaction, surprises found", ninePiles({ foundShare: 0.7, groupInteraction: true })],
    ["a design value a hole", ninePiles({ lengthRule: "nearest" })],
  ])("cells say the same to the last digit: %s", (_, problem) => {
    const counts = [0, 1, 4];
    expect(vector.assessCounts(problem, counts)).toEqual(scalar.assessCounts(problem, counts));
  });

  it("realisations say the same to the last digit", () => {
    const task = { variants: [{ name: "", problem: ninePiles() }], counts: [1, 4], seed: "both" };
    const [ours, theirs] = [vector, scalar].map((engine) => {
      const simulation = engine.prepareSimulation(task);
      return [engine.simulateElements(simulation, 3), engine.simulateForm(simulation, 4)].map((row) => [...row]);
    });
    expect(ours).toEqual(theirs);
  });
});
