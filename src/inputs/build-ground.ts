import type { CorrelationName, Ground, GroundLayer } from "../engine/index.js";
import { kilopascals, metres } from "../units/quantities.js";
import { amount } from "./cells.js";
import { InputError } from "./input-error.js";
import { refusal, rowPlace } from "./place.js";
import type { Values } from "./values.js";

/**
 * The ground of the problem.
 *
 * @param values  the values in force
 * @returns       layers, scales and structure, SI
 * @throws {InputError} layers that do not start at 0 or do not go downwards, or a layer without a COV
 */
export function buildGround(values: Values): Ground {
  return {
    layers: buildLayers(values),
    correlation: values.text("correlation") as CorrelationName,
    horizontalScale: metres(values.number("horizontalScale")),
    verticalScale: metres(values.number("verticalScale")),
    regionalCov: values.number("regionalCov"),
    poissonRatio: values.number("poissonRatio"),
  };
}

function buildLayers(values: Values): GroundLayer[] {
  const list = values.list("layerList");
  if (list === undefined) {
    return [{
      top: metres(0), mean: kilopascals(values.number("meanStiffness")), increase: values.number("stiffnessIncrease"), cov: values.number("stiffnessCov"),
    }];
  }
  return list.rows.map(({ row, values: [top, mean, increase, cov] }, index) => {
    const place = rowPlace("Layer list, Top", row);
    if (index === 0 && top !== 0) throw refusal(place, `is ${amount(top!)} m; the first layer begins at 0`);
    if (index > 0 && !(top! > list.rows[index - 1]!.values[0]!)) throw refusal(place, `is ${amount(top!)} m, no deeper than the layer above; layers are listed downwards`);
    const general = cov ?? values.optional("stiffnessCov");
    if (general === undefined) throw new InputError(`Layer list, COV (row ${row} of the site block) is blank or zero; write a COV there, or a row "Stiffness COV" for all layers that have none of their own.`);
    return { top: metres(top!), mean: kilopascals(mean!), increase: increase ?? 0, cov: general };
  });
}
