/** What the figures are. */
export const IS = "Screening figures for planning and pricing an investigation, from an idealised model: elastic piles, one lognormal field of stiffness, no downdrag, no change of groundwater, no construction defects.";

/** What the figures are not. */
export const IS_NOT = "Not a foundation design. Local codes, the ground model of a licensed geotechnical engineer, and the investigation that safety or law requires come first, also where a smaller count is the cheapest here.";

/** How far small sums can be trusted. */
export const SMALL_SUMS = "A failure cost below 1\u00a0% of the building value may be off by a fifth. Round it to one or two figures.";

/** What happens to the person's data. */
export const PRIVACY: readonly string[] = [
  "Nothing leaves this machine. Every figure is computed here, in this program; no cell, name or result is sent anywhere, and nothing is counted or reported.",
  "The pane reads the cells you choose and adds new sheets when you ask for one. A sheet that exists is changed only by a repair that you start, and only in formulas of ours that are stuck.",
  "Your choice of colours, and the inputs and finished grounds of your last four runs, are kept in this program's own storage on this machine, so that an interrupted run can go on. The Run view deletes the runs. Nothing else is kept.",
];
