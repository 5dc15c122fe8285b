const { rows } = require("./rows.cjs");

const pattern = (prefixes) => `^(${prefixes.map((prefix) => prefix.replace(/\./g, "\\.")).join("|")})`;

const upward = rows.slice(0, -1).map((row, index) => ({
  name: `row-${index}-stays-below`,
  comment: "A file imports from its own row of the house or an earlier one.",
  severity: "error",
  from: { path: pattern(row) },
  to: { path: pattern(rows.slice(index + 1).flat()) },
}));

module.exports = {
  forbidden: [
    ...upward,
    {
      name: "decision-without-simulation",
      comment: "Simulation builds on the decision's parts; cells must not wait for it.",
      severity: "error",
      from: { path: "^src/engine/decision/" },
      to: { path: "^src/engine/simulation/" },
    },
    {
      name: "no-circle",
      comment: "Two files that need each other are one file, or a third is missing.",
      severity: "error",
      from: {},
      to: { circular: true },
    },
    {
      name: "no-orphan",
      comment: "A file that nothing imports and that imports nothing has no place.",
      severity: "error",
      from: { orphan: true, pathNot: "(\\.d\\.ts$|^src/kernels/)" }, // kernels are compiled, not imported
      to: {},
    },
    {
      name: "through-the-door",
      comment: "The rest of the house sees the engine through src/engine/index.ts alone.",
      severity: "error",
      from: { path: "^src/", pathNot: "^src/(engine|units)/" },
      to: { path: "^src/engine/", pathNot: "^src/engine/index\\.ts$" },
    },
    {
      name: "inside-without-the-door",
      comment: "Inside the engine the door would make every file depend on every other.",
      severity: "error",
      from: { path: "^src/engine/", pathNot: "^src/engine/index\\.ts$" },
      to: { path: "^src/engine/index\\.ts$" },
    },
    {
      name: "engine-packages",
      comment: "The engine runs in every runtime; these packages are pure arithmetic and were checked against references.",
      severity: "error",
      from: { path: "^src/(units|engine)/" },
      to: { path: "node_modules/", pathNot: "node_modules/(jstat|seedrandom)/" },
    },
    {
      name: "kernels-are-compiled",
      comment: "Sources of the WebAssembly module mean nothing to JavaScript.",
      severity: "error",
      from: { path: "^src/", pathNot: "^src/kernels/" },
      to: { path: "^src/kernels/" },
    },
    {
      name: "no-node-in-pages",
      comment: "Only the formula line and the build run in Node.",
      severity: "error",
      from: { path: "^src/", pathNot: "^src/(formula|build)/" },
      to: { dependencyTypes: ["core"] },
    },
    {
      name: "grid-in-practice-only",
      comment: "The grid is megabytes; the add-in lives inside a grid already.",
      severity: "error",
      from: { path: "^src/", pathNot: "^src/(practice|formula)/" },
      to: { path: "node_modules/@univerjs/" },
    },
    {
      name: "workbook-files-in-formula-only",
      comment: "Reading files of a workbook is the formula line's work.",
      severity: "error",
      from: { path: "^src/", pathNot: "^src/(formula|build)/" },
      to: { path: "node_modules/(exceljs|jszip)/" },
    },
    {
      name: "no-tests-in-the-house",
      comment: "What ships must not need what checks it.",
      severity: "error",
      from: { path: "^src/" },
      to: { path: "^test/" },
    },
    {
      name: "resolvable",
      comment: "An import that leads nowhere.",
      severity: "error",
      from: {},
      to: { couldNotResolve: true },
    },
  ],
  options: {
    doNotFollow: { path: "node_modules" },
    exclude: { path: "\\.css$" },
    tsPreCompilationDeps: true, // type-only circles are circles too
    enhancedResolveOptions: { extensions: [".ts", ".js", ".json"], exportsFields: ["exports"], conditionNames: ["import", "types", "default"] },
    parser: "tsc",
  },
};
