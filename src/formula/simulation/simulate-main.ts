import { simulate } from "./simulate.js";
import { ownTerminal } from "./terminal.js";

process.stdout.on("error", () => process.exit(0));
process.exitCode = await simulate(process.argv.slice(2), ownTerminal());
