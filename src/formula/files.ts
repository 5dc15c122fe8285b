import { existsSync, readFileSync, realpathSync, renameSync, rmSync, statSync, writeFileSync } from "node:fs";
import { basename, dirname, extname, join } from "node:path";
import { misused, unreadable } from "./failure.js";

const MOST_BYTES = 200 * 2 ** 20;

/**
 * Reads a file that the person named.
 *
 * @throws {FormulaLineError} where there is none, or no ordinary file, or one that is far too large
 */
export function readNamedFile(path: string): Uint8Array {
  const found = statSync(path, { throwIfNoEntry: false });
  if (found === undefined) throw misused(`There is no file ${path}.`);
  if (!found.isFile()) throw misused(`${path} is not a file.`);
  if (found.size > MOST_BYTES) throw unreadable(`The file has ${Math.round(found.size / 2 ** 20)} MB; at most ${MOST_BYTES / 2 ** 20} MB are read.`);
  try {
    return readFileSync(path);
  } catch (reason) {
    throw misused(`The file ${path} cannot be opened: ${reasonOf(reason)}.`);
  }
}

/**
 * Refuses a place for a new file that would cost the person another file.
 *
 * @param book  the workbook that is read
 * @throws {FormulaLineError} for the workbook itself, a file that is there, or another kind of file
 */
export function checkPlace(out: string, book: string, overwrite: boolean): void {
  const [kind, wanted] = [extname(book).toLowerCase(), extname(out).toLowerCase()];
  if (kind !== wanted) throw misused(`--out writes a copy of ${basename(book)}, so its name must end with ${kind}, not ${wanted === "" ? "without an ending" : wanted}.`);
  if (!existsSync(dirname(out))) throw misused(`There is no folder ${dirname(out)} to write into.`);
  const there = statSync(out, { throwIfNoEntry: false });
  if (there === undefined) return;
  const source = statSync(book);
  if ((there.ino === source.ino && there.dev === source.dev) || realpathSync(out) === realpathSync(book)) throw misused("--out names the workbook itself; give the copy another name.");
  if (!there.isFile()) throw misused(`${out} is not a file.`);
  if (!overwrite) throw misused(`The file ${out} is there already; give another name, or add --overwrite to replace it.`);
}

/** Writes a file in one step, so that a failure half way leaves no broken file. */
export function writeNewFile(path: string, bytes: Uint8Array, overwrite: boolean): void {
  const draft = join(dirname(path), `.${basename(path)}.${process.pid}.tmp`);
  try {
    if (!overwrite) return writeFileSync(path, bytes, { flag: "wx" });
    writeFileSync(draft, bytes, { flag: "wx" });
    renameSync(draft, path);
  } catch (reason) {
    rmSync(draft, { force: true });
    throw misused(`The file ${path} cannot be written: ${reasonOf(reason)}.`);
  }
}

function reasonOf(reason: unknown): string {
  const code = (reason as { code?: unknown }).code;
  const words: Readonly<Record<string, string>> = { EACCES: "access is not allowed", EPERM: "access is not allowed", ENOSPC: "the disk is full", EROFS: "the disk cannot be written", EBUSY: "another program holds it", EEXIST: "it is there already" };
  return words[String(code)] ?? String(code ?? reason);
}
