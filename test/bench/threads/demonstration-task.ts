import { mostRealisations, type SimulationTask } from "../../../src/engine/index.js";
import { parseSite, templateRows } from "../../../src/inputs/index.js";

const site = parseSite(templateRows());

/** The demonstration with all counts from none to twelve holes. */
export const TASK: SimulationTask = { variants: [{ name: site.method, problem: site.problem }], counts: Array.from({ length: 13 }, (_, k) => k), seed: site.problem.seed };

/** What its runs may keep. */
export const MOST = mostRealisations(TASK);
