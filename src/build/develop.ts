import { getHttpsServerOptions } from "office-addin-dev-certs";
import WebpackDevServer from "webpack-dev-server";
import { addInCompiler } from "./build-add-in.js";
import { DEVELOPMENT } from "./form.js";

const PORT = 3000; // manifest.xml names it

/** Serves the add-in to an Excel on this machine, rebuilt at every change, with a certificate that Excel trusts. */
export async function develop(): Promise<void> {
  const options = await getHttpsServerOptions();
  const server = new WebpackDevServer({ port: PORT, hot: false, server: { type: "https", options }, headers: { "Access-Control-Allow-Origin": "*" } }, addInCompiler("development", DEVELOPMENT));
  await server.start();
}
