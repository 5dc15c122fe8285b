import { merge } from "./merge.js";
import { ownTerminal } from "./terminal.js";

process.stdout.on("error", () => process.exit(0));
process.exitCode = await merge(process.argv.slice(2), ownTerminal());
