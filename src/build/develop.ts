import { createServer } from "node:net";
import { fileURLToPath } from "node:url";
import WebpackDevServer from "webpack-dev-server";
import { addInCompiler } from "./build-add-in.js";
import { certificateFor } from "./certificates.js";
import { DEVELOPMENT } from "./form.js";

const PORT = Number(new URL(DEVELOPMENT.base).port); // manifest.xml names it
const LIBRARY = fileURLToPath(new URL("../../node_modules/@microsoft/office-js/dist", import.meta.url));

/**
 * Serves the development add-in to an Excel on this machine or to a browser, and rebuilds it at every change.
 *
 * @returns whether the system trusts the certificate; the server then runs until the program ends
 * @throws {Error} the port that manifest.xml names is taken
 */
export async function develop(platform: string = process.platform): Promise<{ readonly trusted: boolean }> {
  if (!(await isFree(PORT))) throw new Error(`Port ${PORT} is in use by another program, and manifest.xml names this port; end that program (perhaps an earlier npm run develop), then try again.`);
  const { cert, key, trusted } = await certificateFor(platform);
  const server = new WebpackDevServer(
    {
      host: "localhost",
      port: PORT,
      hot: false,
      client: { overlay: false }, // it would draw with styles that the page's policy refuses
      server: { type: "https", options: { cert, key } },
      headers: { "Access-Control-Allow-Origin": "*" }, // Excel on the web reads functions.json from its own address
      static: { directory: LIBRARY, publicPath: `/${DEVELOPMENT.library.split("/")[0]}`, watch: false },
    },
    addInCompiler("development", DEVELOPMENT),
  );
  await server.start();
  return { trusted };
}

function isFree(port: number): Promise<boolean> {
  return new Promise((resolve) => {
    const probe = createServer();
    probe.once("error", () => resolve(false));
    probe.listen(port, "localhost", () => probe.close(() => resolve(true)));
  });
}
