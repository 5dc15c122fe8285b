/** Which of the two add-ins is built, and where it will be served. */
export interface Form {
  /** address of the folder that holds pane.html, with the slash at its end */
  readonly base: string;
  /** what stands before the functions' names in a cell */
  readonly namespace: "PROBE" | "PROBEDEV";
  /** where the pane's page finds the platform's library */
  readonly library: string;
}

/** The add-in that a developer's machine serves; manifest.xml names the same address. Its library is the npm package, so nothing is asked of the network. */
export const DEVELOPMENT: Form = { base: "https://localhost:3000/", namespace: "PROBEDEV", library: "office-js/office.js" };

/** The platform wants every released page to take its library from there, so that it fits the Excel that opens the page. */
const LIBRARY = "https://appsforoffice.microsoft.com/lib/1/hosted/office.js";

const EXAMPLE = "for example --base https://tools.example.org/probeworth/";

/**
 * Reads what follows "build" on the command line.
 *
 * @param words  the words, such as ["--base", "https://tools.example.org/probeworth/"]; none: the development form
 * @throws {Error} with a sentence about what was found and what is accepted
 */
export function formFrom(words: readonly string[]): Form {
  const [first, second, ...rest] = words;
  if (first === undefined) return DEVELOPMENT;
  const [option, joined] = first.startsWith("--base=") ? ["--base", first.slice("--base=".length)] : [first, undefined];
  if (option !== "--base") throw new Error(`"${first}" is not an option of build; accepted: --base and an address, ${EXAMPLE}.`);
  const surplus = joined === undefined ? rest : words.slice(1);
  if (surplus.length > 0) throw new Error(`"${surplus[0]}" follows the address, and build takes one address only; an address holds no spaces.`);
  return { base: baseAddress(joined ?? second ?? ""), namespace: "PROBE", library: LIBRARY };
}

/**
 * The address of a folder, from what a person typed.
 *
 * @param text  with or without the slash at its end
 * @throws {Error} when Excel could not load an add-in from there
 */
function baseAddress(text: string): string {
  const typed = text.trim();
  if (typed === "" || typed.startsWith("--")) throw new Error(`--base names no address; give the one under which dist/ will be served, ${EXAMPLE}.`);
  if (/\s/.test(typed)) throw new Error(`"${typed}" holds a space; an address holds none. Rename the folder on the server.`);
  let url: URL;
  try {
    url = new URL(typed);
  } catch {
    throw new Error(`"${typed}" is not a full address; it begins with https:// and a server's name, ${EXAMPLE}.`);
  }
  if (url.protocol === "http:" && url.hostname !== "localhost") throw new Error(`"${typed}" begins with http://; Excel loads add-ins over https:// only, except from localhost.`);
  if (url.protocol !== "https:" && url.protocol !== "http:") throw new Error(`"${typed}" begins with ${url.protocol}; accepted is an address that begins with https://.`);
  if (url.search !== "" || url.hash !== "" || /[?#]/.test(typed)) throw new Error(`"${typed}" holds a ? or a #; give the address of the folder alone, without what follows these signs.`);
  if (url.username !== "" || url.password !== "") throw new Error(`"${typed}" holds a user name or password, which everybody who installs the add-in would see; leave it out.`);
  if (/\.html?\/?$/i.test(url.pathname)) throw new Error(`"${typed}" names a page; give the folder that holds it.`);
  if (url.href.length > 1000) throw new Error(`The address is ${url.href.length} characters long; accepted are 1,000.`);
  return url.href.endsWith("/") ? url.href : `${url.href}/`;
}
