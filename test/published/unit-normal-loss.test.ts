import { expect, it } from "vitest";
import { unitNormalLoss } from "../../src/engine/numerics/normal.js";

// Source: Raiffa & Schlaifer (1961), Applied Statistical Decision Theory, table of the unit normal loss integral; the four values that
// are remembered from it (from memory) to the digits remembered, the others computed with scipy 1.17.1 to six decimals.
const REMEMBERED: [number, number][] = [[0, 0.3989], [0.5, 0.1978], [1, 0.0833], [2, 0.0085]];
const COMPUTED: [number, number][] = [
  [0, 0.398942], [0.1, 0.350935], [0.2, 0.306895], [0.25, 0.286345], [0.5, 0.197797], [0.75, 0.131167], [1, 0.083315], [1.25, 0.050587], [1.5, 0.029307],
  [2, 0.008491], [2.5, 0.002004], [3, 0.000382],
];

it.each(REMEMBERED)("the unit normal loss at %d is %d as tabulated", (u, loss) => expect(Math.abs(unitNormalLoss(u) - loss)).toBeLessThan(5.1e-5));
it.each(COMPUTED)("the unit normal loss at %d is %d", (u, loss) => expect(Math.abs(unitNormalLoss(u) - loss)).toBeLessThan(5.1e-7));
