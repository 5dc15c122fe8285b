import { readdirSync } from "node:fs";
import { readFile } from "node:fs/promises";
import { fileURLToPath } from "node:url";
import webpack from "webpack";

const at = (path) => fileURLToPath(new URL(path, import.meta.url));
const target = "es2021"; // what the oldest browser inside a supported Excel runs

/** Puts the drawn icons beside the pages. */
class IconsPlugin {
  apply(compiler) {
    compiler.hooks.thisCompilation.tap("icons", (compilation) => {
      compilation.hooks.processAssets.tapPromise({ name: "icons", stage: webpack.Compilation.PROCESS_ASSETS_STAGE_ADDITIONAL }, async () => {
        for (const name of readdirSync(at("assets"))) {
          if (/-\d+\.png$/.test(name)) compilation.emitAsset(`assets/${name}`, new webpack.sources.RawSource(await readFile(at(`assets/${name}`))));
        }
      });
    });
  }
}

// The practice page is not here: its grid must not reach the add-in, and src/build/practice-page.ts bundles it on its own.
export default {
  mode: "production",
  target: "web",
  context: at("."),
  // the pane's page is the shared runtime: it loads the functions first and then what the pane adds to them
  entry: { functions: at("src/functions/associate.ts"), pane: { import: [at("src/pane/page.css"), at("src/pane/main.ts")], dependOn: "functions" } },
  output: {
    path: at("dist"),
    filename: "[name].js",
    chunkFilename: "[name].js",
    cssFilename: "[name].css",
    assetModuleFilename: "files/[hash][ext]",
    clean: { keep: /^practice\// },
  },
  resolve: { extensionAlias: { ".js": [".ts", ".js"] }, extensions: [".ts", ".js"] },
  module: {
    rules: [
      { test: /\.ts$/, loader: "esbuild-loader", options: { target, tsconfig: at("tsconfig.json") } },
      { test: /\.(png|svg|woff2?)$/, type: "asset" },
    ],
  },
  experiments: { css: true },
  // the bundler's own minimiser, though slower: esbuild's leaves in what nobody uses inside a bundle, a fifth of all
  performance: { hints: false }, // size-limit holds the size
  plugins: [new IconsPlugin()], // pages, functions.json and the manifest depend on where the add-in is served: src/build/build-add-in.ts adds them
};
