import { template } from "./template.js";

process.stdout.on("error", () => process.exit(0));

const { out, err, code } = template(process.argv.slice(2));
process.exitCode = code;
process.stderr.write(err);
process.stdout.write(out);
