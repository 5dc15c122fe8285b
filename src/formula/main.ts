import { formulaLine } from "./formula-line.js";

// a reader that has seen enough, such as head, closes the pipe
process.stdout.on("error", () => process.exit(0));

const { out, err, code } = formulaLine(process.argv.slice(2));
process.exitCode = code;
process.stderr.write(err);
process.stdout.write(out);
