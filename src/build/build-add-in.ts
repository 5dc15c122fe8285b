import webpack, { type Configuration, type Compiler } from "webpack";
import configuration from "../../webpack.config.js";
import { helpPage } from "./help-page.js";
import { functionsMetadata } from "./metadata.js";

/** Puts functions.json and its help page beside the bundles, so that none of them can disagree about the functions. */
class FunctionsPlugin {
  apply(compiler: Compiler): void {
    compiler.hooks.thisCompilation.tap("functions", (compilation) => {
      compilation.hooks.processAssets.tapPromise({ name: "functions", stage: webpack.Compilation.PROCESS_ASSETS_STAGE_ADDITIONAL }, async () => {
        const json = await functionsMetadata();
        compilation.emitAsset("functions.json", new webpack.sources.RawSource(`${JSON.stringify(json, null, 2)}\n`));
        compilation.emitAsset("help.html", new webpack.sources.RawSource(helpPage(json)));
      });
    });
  }
}

/**
 * The add-in's bundler, ready to run or to serve.
 *
 * @param mode  "production" minifies; "development" keeps names and maps
 */
export function addInCompiler(mode: "production" | "development"): Compiler {
  const settings = configuration as Configuration;
  return webpack({
    ...settings,
    mode,
    devtool: mode === "development" ? "source-map" : false,
    plugins: [...(settings.plugins ?? []), new FunctionsPlugin()],
  });
}

/** One asset of the build. */
export interface Asset {
  readonly name: string;
  readonly bytes: number;
}

/**
 * Builds the add-in into dist/.
 *
 * @returns what was written
 * @throws {Error} with the bundler's own words when something does not build
 */
export function buildAddIn(): Promise<Asset[]> {
  const compiler = addInCompiler("production");
  return new Promise((resolve, reject) => {
    compiler.run((error, stats) => {
      compiler.close(() => {
        if (error) reject(error);
        else if (stats === undefined || stats.hasErrors()) reject(new Error(stats?.toString({ all: false, errors: true }) ?? "The bundler said nothing."));
        else resolve((stats.toJson({ all: false, assets: true }).assets ?? []).map(({ name, size }) => ({ name, bytes: size })));
      });
    });
  });
}
