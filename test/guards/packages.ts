import { satisfies } from "semver";

interface Manifest {
  engines?: { node?: string };
  dependencies?: Record<string, string>;
  devDependencies?: Record<string, string>;
}

interface Lock {
  packages: Record<string, Locked>;
}

interface Locked {
  version?: string;
  license?: string;
  resolved?: string;
  engines?: { node?: string } | string[];
  dependencies?: Record<string, string>;
  optionalDependencies?: Record<string, string>;
}

/** Code that only a browser runs: what it wants of Node concerns its own build, not ours. */
const BROWSER_ONLY = ["node_modules/@fluentui/web-components"];

/** Oldest Node that the project promises to run on, as far as its packages go. */
const NODE = "20.20.0";

/**
 * What is wrong with the packages.
 *
 * @param manifest  text of package.json
 * @param lock      text of package-lock.json
 * @returns         one sentence a fault
 */
export function packageFaults(manifest: string, lock: string): string[] {
  const asked = JSON.parse(manifest) as Manifest;
  const { packages } = JSON.parse(lock) as Lock;
  const faults: string[] = [];
  if (asked.engines?.node !== ">=20") faults.push("package.json does not promise node >=20.");
  for (const kind of ["dependencies", "devDependencies"] as const) {
    const names = Object.keys(asked[kind] ?? {});
    if (names.join() !== [...names].sort().join()) faults.push(`${kind} are not sorted.`);
    for (const [name, version] of Object.entries(asked[kind] ?? {})) {
      if (!/^\d+\.\d+\.\d+(-[\w.]+)?$/.test(version)) faults.push(`${name} is asked for as "${version}"; an exact version is accepted.`);
      if (name === "xlsx") faults.push("xlsx is frozen with known faults; exceljs reads workbooks.");
      if (packages[`node_modules/${name}`]?.version !== version) faults.push(`${name} ${version} is not what the lock file holds.`);
    }
  }
  for (const [path, { resolved, engines, license, dependencies, optionalDependencies }] of Object.entries(packages)) {
    for (const name of Object.keys({ ...dependencies, ...optionalDependencies })) {
      // npm ci refuses the whole lock file, even where the missing package is for another system
      if (!reaches(packages, path, name)) faults.push(`${path} wants ${name}, which the lock file lacks.`);
    }
    if (/univerjs-pro/.test(path + Object.keys(dependencies ?? {}).join())) faults.push(`${path} brings a proprietary package of the grid.`);
    if (license !== undefined && /^(UNLICENSED|SEE LICENSE)/.test(license) && !BROWSER_ONLY.includes(path)) faults.push(`${path} has no open licence.`);
    if (resolved !== undefined) faults.push(`${path} names the machine that it came from.`);
    const node = Array.isArray(engines) ? undefined : engines?.node;
    if (path !== "" && node !== undefined && !satisfies(NODE, node) && !BROWSER_ONLY.includes(path)) faults.push(`${path} wants Node ${node}.`);
  }
  return faults;
}

/** Whether a package finds another from where it stands, in its own node_modules or in one above. */
function reaches(packages: Lock["packages"], path: string, name: string): boolean {
  for (let from = path; ; from = from.slice(0, Math.max(from.lastIndexOf("/node_modules/"), 0))) {
    if (`${from === "" ? "" : `${from}/`}node_modules/${name}` in packages) return true;
    if (from === "") return false;
  }
}
