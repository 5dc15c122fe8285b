import officeAddins from "eslint-plugin-office-addins";
import tseslint from "typescript-eslint";

const PROJECTS = ["src/*/tsconfig.json", "test/tsconfig.json"];

/** Where the answer may depend on nothing but the arguments. */
const PURE = ["src/units/**/*.ts", "src/engine/**/*.ts"];
/** Where figures are made or rounded that must be the same to the bit in every engine. */
const FIGURES = [...PURE, ...["inputs", "results", "functions", "jobs", "host", "pane"].map((folder) => `src/${folder}/**/*.ts`)];
const PAGES = ["src/host/**/*.ts", "src/pane/**/*.ts", "src/practice/**/*.ts"];

const named = { selector: "ExportDefaultDeclaration", message: "Named exports only: a name that the importer chooses cannot be searched for." };
const extension = {
  selector: ":matches(ImportDeclaration, ExportNamedDeclaration, ExportAllDeclaration)[source.value=/^\\.{1,2}\\/(?!.*\\.(js|cjs|json|css|html)$)/]",
  message: "A relative import ends in .js, as the runtime resolves it.",
};
const skipped = {
  selector: "MemberExpression[object.name=/^(it|test|describe)$/][property.name=/^(skip|only|todo|skipIf|runIf|fails)$/]",
  message: "A test that does not run is no test.",
};
const random = { object: "Math", property: "random", message: "Randomness is a stream argument, so that every figure can be repeated." };

const ARITHMETIC = "The language leaves its last digits to the engine; src/engine/numerics has its own, and results/powers-of-ten.ts powers of ten.";
const inexact = ["acos", "acosh", "asin", "asinh", "atan", "atan2", "atanh", "cbrt", "cos", "cosh", "exp", "expm1", "hypot", "log", "log10", "log1p", "log2", "pow", "sin", "sinh", "tan", "tanh"]
  .map((property) => ({ object: "Math", property, message: ARITHMETIC }));
const powers = { selector: ":matches(BinaryExpression[operator='**']:not([right.value=2]), AssignmentExpression[operator='**='])", message: `Only a square is the same everywhere: write products. ${ARITHMETIC}` };
const local = ["toLocaleString", "localeCompare"].map((property) => ({ property, message: "Depends on the machine's language." }));

const banned = (names, message) => names.map((name) => ({ name, message }));
const clock = banned(["Date", "performance"], "Same arguments, same answer: no clock.");
const ambient = banned(["globalThis", "console", "setTimeout", "Intl"], "Same arguments, same answer: nothing ambient in the engine.");
const dialogs = banned(["alert", "confirm", "prompt"], "Dialogs are blocked inside Excel; say it in the page.");
const excel = banned(["Excel"], "Only src/host talks to Excel; everything else sees the workbook interface.");

export default tseslint.config(
  { ignores: ["dist/**", "node_modules/**"] },
  { linterOptions: { noInlineConfig: true, reportUnusedDisableDirectives: "error" } },
  {
    files: ["src/**/*.ts", "test/**/*.ts"],
    extends: [tseslint.configs.recommended],
    languageOptions: { parserOptions: { project: PROJECTS, tsconfigRootDir: process.cwd() } },
    rules: {
      "@typescript-eslint/triple-slash-reference": ["error", { lib: "never", path: "never", types: "never" }], // one of them would let a runtime's globals past its tsconfig
      "@typescript-eslint/ban-ts-comment": "error",
      "@typescript-eslint/no-floating-promises": "error",
      "@typescript-eslint/no-misused-promises": "error",
      "@typescript-eslint/await-thenable": "error",
      "@typescript-eslint/switch-exhaustiveness-check": ["error", { considerDefaultExhaustiveForUnions: true }],
      "@typescript-eslint/consistent-type-imports": "error",
      "@typescript-eslint/no-unused-vars": ["error", { args: "all", argsIgnorePattern: "^_", varsIgnorePattern: "^_", destructuredArrayIgnorePattern: "^_" }],
      "no-eval": "error",
      "no-implied-eval": "error",
      "no-new-func": "error",
      eqeqeq: "error",
      "prefer-const": "error",
      "no-restricted-syntax": ["error", named, extension],
      "no-restricted-properties": ["error", random],
    },
  },
  {
    // functions.json is generated from plain signatures: the generator refuses anything narrower than any[][]
    files: ["src/functions/**/*.ts"],
    rules: { "@typescript-eslint/no-explicit-any": "off" },
  },
  { files: PURE, rules: { "no-restricted-globals": ["error", ...clock, ...ambient, ...excel] } },
  { files: FIGURES, rules: { "no-restricted-syntax": ["error", named, extension, powers], "no-restricted-properties": ["error", random, ...inexact] } },
  { files: [...PURE, "src/inputs/**/*.ts", "src/results/**/*.ts", "src/functions/**/*.ts"], rules: { "no-restricted-properties": ["error", random, ...inexact, ...local] } },
  { files: ["src/inputs/**/*.ts", "src/results/**/*.ts", "src/functions/**/*.ts"], rules: { "no-restricted-globals": ["error", ...clock, ...excel] } },
  { files: ["src/jobs/**/*.ts", "src/formula/**/*.ts"], rules: { "no-restricted-globals": ["error", ...excel] } },
  { files: ["src/pane/**/*.ts", "src/practice/**/*.ts"], rules: { "no-restricted-globals": ["error", ...dialogs, ...excel] } },
  { files: ["src/host/**/*.ts"], rules: { "no-restricted-globals": ["error", ...dialogs] } },
  { files: ["**/*.d.ts"], rules: { "no-restricted-syntax": "off" } }, // the shape of somebody else's module
  // about 150 lines in the engine and 200 elsewhere; what is well above is two ideas
  { files: ["src/**/*.ts"], rules: { "max-lines": ["error", { max: 220, skipBlankLines: true, skipComments: true }] } },
  { files: PURE, rules: { "max-lines": ["error", { max: 180, skipBlankLines: true, skipComments: true }] } },
  {
    // a table is as long as its rows
    files: ["src/**/*-table.ts", "src/**/*-numbers.ts", "src/**/*-plans.ts", "src/inputs/catalogue*.ts", "src/host/demonstration*.ts", "src/inputs/methods.ts", "src/inputs/ground-kinds.ts"],
    rules: { "max-lines": "off" },
  },
  {
    files: PAGES,
    rules: {
      "no-restricted-properties": [
        "error",
        random,
        ...inexact,
        ...["innerHTML", "outerHTML", "insertAdjacentHTML", "createContextualFragment"].map((property) => ({ property, message: "Cell text is untrusted and never becomes HTML; use textContent." })),
      ],
    },
  },
  {
    files: ["src/host/**/*.ts", "src/pane/**/*.ts"],
    plugins: { "office-addins": officeAddins },
    rules: {
      "office-addins/call-sync-after-load": "error",
      "office-addins/call-sync-before-read": "error",
      "office-addins/load-object-before-read": "error",
      "office-addins/no-context-sync-in-loop": "error",
      "office-addins/no-empty-load": "error",
      "office-addins/no-navigational-load": "error",
      "office-addins/no-office-initialize": "error",
      "office-addins/test-for-null-using-isNullObject": "error",
    },
  },
  {
    files: ["test/**/*.ts"],
    rules: { "no-restricted-syntax": ["error", extension, skipped], "max-lines": "off" },
  },
);
