import { readdirSync } from "node:fs";
import { readFile } from "node:fs/promises";
import { fileURLToPath } from "node:url";
import HtmlPlugin from "html-webpack-plugin";
import { EsbuildPlugin } from "esbuild-loader";
import webpack from "webpack";

const at = (path) => fileURLToPath(new URL(path, import.meta.url));
const target = "es2021"; // what the oldest browser inside a supported Excel runs

/** Puts the drawn icons beside the pages. */
class IconsPlugin {
  apply(compiler) {
    compiler.hooks.thisCompilation.tap("icons", (compilation) => {
      compilation.hooks.processAssets.tapPromise({ name: "icons", stage: webpack.Compilation.PROCESS_ASSETS_STAGE_ADDITIONAL }, async () => {
        for (const name of readdirSync(at("assets"))) {
          if (/\.(png|svg)$/.test(name)) compilation.emitAsset(`assets/${name}`, new webpack.sources.RawSource(await readFile(at(`assets/${name}`))));
        }
      });
    });
  }
}

/** What both bundles share; the practice page is a configuration of its own so that its grid cannot reach the add-in. */
const bundle = (name, entry, folder, plugins) => ({
  name,
  mode: "production",
  target: "web",
  context: at("."),
  entry,
  output: { path: at(folder), filename: "[name].js", cssFilename: "[name].css", assetModuleFilename: "files/[hash][ext]", clean: { keep: /^practice\// } },
  resolve: { extensionAlias: { ".js": [".ts", ".js"] }, extensions: [".ts", ".js"] },
  module: {
    rules: [
      { test: /\.ts$/, loader: "esbuild-loader", options: { target, tsconfig: at("tsconfig.json") } },
      { test: /\.(png|svg|woff2?)$/, type: "asset" },
    ],
  },
  experiments: { css: true },
  optimization: { minimizer: [new EsbuildPlugin({ target, css: true, legalComments: "none" })] }, // terser takes minutes over the grid
  performance: { hints: false }, // size-limit holds the add-in's size
  cache: { type: "filesystem", name },
  plugins: [new IconsPlugin(), ...plugins],
});

const addIn = bundle("add-in", { functions: at("src/functions/associate.ts"), pane: { import: at("src/pane/main.ts"), dependOn: "functions" } }, "dist", [
  new HtmlPlugin({ filename: "pane.html", template: at("src/pane/pane.html"), chunks: ["functions", "pane"], scriptLoading: "defer" }),
]);

const practice = bundle("practice", { practice: at("src/practice/main.ts") }, "dist/practice", [
  new HtmlPlugin({ filename: "index.html", template: at("src/practice/index.html"), scriptLoading: "defer" }),
]);

export default [addIn, practice];
