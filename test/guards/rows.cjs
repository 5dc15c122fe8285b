// The house, row by row: a file imports from its own row or an earlier one. Read by dependency-cruiser and by the tests.
/** @type {readonly (readonly string[])[]} */
exports.rows = [
  ["src/units/", "src/kernels/"],
  ["src/engine/numerics/", "src/engine/random/", "src/engine/costs/"],
  ["src/engine/ground/"],
  ["src/engine/investigation/", "src/engine/piles/"],
  ["src/engine/decision/", "src/engine/simulation/"],
  ["src/engine/index.ts"],
  ["src/inputs/", "src/results/", "src/jobs/"],
  ["src/functions/", "src/host/"],
  ["src/pane/"],
  ["src/practice/", "src/formula/"],
  ["src/build/"],
];
