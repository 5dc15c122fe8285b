import { rm } from "node:fs/promises";
import { demonstrationTable } from "../practice/demonstration-table.js";
import { buildPractice } from "./practice-page.js";
import { servePractice } from "./practice-server.js";

const PORT = 3100;

/**
 * The tool without Excel: prices the demonstration bid in the terminal, then serves the practice workbook until stopped.
 *
 * @param folder  where the page is built
 */
export async function start(folder: string): Promise<void> {
  await rm(folder, { recursive: true, force: true });
  await buildPractice(folder);
  process.stdout.write(`The demonstration bid, expected costs by number of holes\n\n${demonstrationTable()}\n\n`);
  const { address, close } = await servePractice(folder, PORT);
  for (const signal of ["SIGINT", "SIGTERM"] as const) process.once(signal, () => void close());
  process.stdout.write(`The practice workbook is at ${address} (stop with Ctrl+C). Nothing leaves this machine.\n`);
}
