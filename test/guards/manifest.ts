/** What the add-in may ask of Excel at most: a higher floor shuts out perpetual Excel 2021. */
const FLOOR: Readonly<Record<string, string>> = { SharedRuntime: "1.1", CustomFunctionsRuntime: "1.3", ExcelApi: "1.9" };

/**
 * What is wrong with the manifest, as far as that can be told without asking a server.
 *
 * @param xml      text of the manifest
 * @param version  release in package.json
 * @param built    files of the build, relative to the address that the manifest names
 * @returns        one sentence a fault
 */
export function manifestFaults(xml: string, version: string, built: readonly string[]): string[] {
  const page = new DOMParser().parseFromString(xml, "application/xml");
  const faults: string[] = [];
  if (page.getElementsByTagName("parsererror").length > 0) return ["The manifest is not well-formed XML."];
  const all = [...page.getElementsByTagName("*")];
  const named = (name: string): Element[] => all.filter(({ localName }) => localName === name);
  const only = (name: string): string => named(name)[0]?.textContent?.trim() ?? "";

  if (!/^[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}$/.test(only("Id"))) faults.push("Id is not a UUID.");
  if (only("Version") !== `${version}.0`) faults.push(`Version is ${only("Version")}; the release is ${version}.0.`);
  if (only("Permissions") !== "ReadWriteDocument") faults.push("Permissions is not ReadWriteDocument.");

  const sets = Object.fromEntries(named("Set").map((set) => [set.getAttribute("Name"), set.getAttribute("MinVersion")]));
  if (JSON.stringify(sets) !== JSON.stringify(FLOOR)) faults.push(`The requirement sets are ${JSON.stringify(sets)}, not the floor.`);

  faults.push(...residFaults(all, named));
  faults.push(...lengthFaults(named));
  for (const address of all.map((element) => element.getAttribute("DefaultValue") ?? "").filter((value) => value.startsWith("https://"))) {
    const file = new URL(address).pathname.slice(1);
    if (!built.includes(file)) faults.push(`${address} is not in the build.`);
  }
  return faults;
}

function residFaults(all: readonly Element[], named: (name: string) => Element[]): string[] {
  const faults: string[] = [];
  const resources = all.filter(({ namespaceURI, parentElement }) => namespaceURI?.includes("officeappbasictypes") && parentElement?.parentElement?.localName === "Resources");
  const ids = resources.map((resource) => resource.getAttribute("id") ?? "");
  const used = all.map((element) => element.getAttribute("resid")).filter((resid) => resid !== null);
  for (const resid of used) if (!ids.includes(resid)) faults.push(`${resid} is used and nowhere defined.`);
  for (const id of ids) {
    if (!used.includes(id)) faults.push(`${id} is defined and nowhere used.`);
    if (id.length > 32) faults.push(`${id} is longer than 32 characters.`);
    if (ids.indexOf(id) !== ids.lastIndexOf(id)) faults.push(`${id} is defined twice.`);
  }
  const runtime = named("Runtime")[0]?.getAttribute("resid");
  if (named("Runtime")[0]?.getAttribute("lifetime") !== "long") faults.push("The runtime is not a long one, so it is not shared.");
  const pages = [...named("Page").map((element) => element.firstElementChild), ...named("Action").map((element) => element.lastElementChild), named("FunctionFile")[0]];
  if (pages.some((element) => element?.getAttribute("resid") !== runtime)) faults.push("Functions, pane and commands do not all name the runtime's page.");
  const space = named("Namespace")[0]?.getAttribute("resid");
  const namespace = resources.find((resource) => resource.getAttribute("id") === space)?.getAttribute("DefaultValue") ?? "";
  const local = all.some((element) => element.getAttribute("DefaultValue")?.startsWith("https://localhost"));
  if (namespace !== (local ? "PROBEDEV" : "PROBE")) faults.push(`The namespace is ${namespace}; a build served by this machine is PROBEDEV, a released one PROBE.`);
  return faults;
}

function lengthFaults(named: (name: string) => Element[]): string[] {
  const limits: readonly [string, number][] = [["DisplayName", 125], ["Description", 250], ["String", 250]];
  return limits.flatMap(([name, limit]) =>
    named(name)
      .map((element) => element.getAttribute("DefaultValue") ?? "")
      .filter((text) => text.length > limit)
      .map((text) => `"${text.slice(0, 30)}..." is longer than ${limit} characters.`),
  );
}
