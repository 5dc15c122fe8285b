import { readFile } from "node:fs/promises";
import { fileURLToPath } from "node:url";
import HtmlPlugin from "html-webpack-plugin";
import webpack, { type Configuration, type Compiler, type Module } from "webpack";
import configuration from "../../webpack.config.js";
import { PRODUCT_VERSION } from "../results/version.js";
import { panePolicy } from "./content-policy.js";
import type { Form } from "./form.js";
import { licences, packageOf } from "./licences.js";
import { manifestFor } from "./manifest.js";
import { textFiles } from "./text-files.js";

const at = (path: string): string => fileURLToPath(new URL(`../../${path}`, import.meta.url));

/** Puts beside the bundles what is made from the functions' own descriptions and from the address, so that none of it can disagree. */
class FormPlugin {
  constructor(private readonly form: Form) {}

  apply(compiler: Compiler): void {
    compiler.hooks.thisCompilation.tap("form", (compilation) => {
      compilation.hooks.processAssets.tapPromise({ name: "form", stage: webpack.Compilation.PROCESS_ASSETS_STAGE_ADDITIONAL }, async () => {
        const emit = (name: string, text: string): void => compilation.emitAsset(name, new webpack.sources.RawSource(text));
        for (const [name, text] of await textFiles(this.form)) emit(name, text);
        emit("licences.txt", licences([...compilation.modules].flatMap(filesOf).flatMap((file) => packageOf(file) ?? [])));
        emit("manifest.xml", manifestFor(await readFile(at("manifest.xml"), "utf8"), this.form));
      });
    });
  }
}

/** The source files of a module; the bundler joins several into one. */
function filesOf(module: Module): string[] {
  const { modules = [], resource } = module as Module & { readonly modules?: Iterable<Module>; readonly resource?: string };
  return [...(resource === undefined ? [] : [resource]), ...[...modules].flatMap(filesOf)];
}

/**
 * The add-in's bundler, ready to run or to serve.
 *
 * @param mode    "production" minifies; "development" keeps names and maps
 * @param form    which add-in, and where it is served
 * @param output  folder to write into; dist/ when omitted
 */
export function addInCompiler(mode: "production" | "development", form: Form, output?: string): Compiler {
  const settings = configuration as Configuration;
  const page = new HtmlPlugin({
    filename: "pane.html",
    template: at("src/pane/pane.html"),
    chunks: ["functions", "pane"],
    scriptLoading: "defer",
    hash: true, // a page never runs with an older functions.js out of a cache
    templateParameters: { policy: panePolicy(form), namespace: form.namespace, version: PRODUCT_VERSION, library: form.library },
  });
  return webpack({
    ...settings,
    mode,
    ...(output === undefined ? {} : { output: { ...settings.output, path: output } }),
    ...(mode === "development" ? { devtool: "source-map", stats: "errors-warnings", infrastructureLogging: { level: "warn" } } : { devtool: false }),
    plugins: [...(settings.plugins ?? []), page, new FormPlugin(form)],
  });
}

/** One asset of the build. */
export interface Asset {
  readonly name: string;
  readonly bytes: number;
}

/**
 * Builds the add-in.
 *
 * @param form    which add-in, and where it is served
 * @param output  folder to write into; dist/ when omitted
 * @returns       what was written
 * @throws {Error} with the bundler's own words when something does not build
 */
export function buildAddIn(form: Form, output?: string): Promise<Asset[]> {
  const compiler = addInCompiler("production", form, output);
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
