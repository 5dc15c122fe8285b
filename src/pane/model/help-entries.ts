/** The part of functions.json that the help view shows. */
export interface FunctionMetadata {
  readonly id: string;
  readonly name: string;
  readonly description?: string;
  readonly parameters: readonly ParameterMetadata[];
}

/** One argument in functions.json. */
export interface ParameterMetadata {
  readonly name: string;
  readonly description?: string;
  readonly optional?: boolean;
  readonly repeating?: boolean;
}

/** One function as the help view shows it. */
export interface HelpEntry {
  readonly id: string;
  readonly description: string;
  /** the call with all its arguments, optional ones in brackets */
  readonly call: string;
  readonly parameters: readonly { readonly name: string; readonly description: string; readonly need: string }[];
  /** a formula that can be typed as it stands, given the name of a site block; undefined where no sample value is known */
  readonly example: (siteName: string) => string | undefined;
}

/**
 * Makes the help entries from the metadata that Excel itself reads, so that the two cannot disagree.
 *
 * @param functions  the list in functions.json
 * @param namespace  what stands before the full stop, such as "PROBE"
 * @returns          entries in the order of the alphabet
 */
export function helpEntries(functions: readonly FunctionMetadata[], namespace: string): HelpEntry[] {
  return functions.map((entry) => describe(entry, namespace)).sort((a, b) => a.id.localeCompare(b.id, "en"));
}

/**
 * Keeps the entries that hold every word of a search in name, description or arguments.
 *
 * @param entries  the entries
 * @param search   words in any case; empty: all entries
 */
export function searchHelp(entries: readonly HelpEntry[], search: string): HelpEntry[] {
  const words = search.toLowerCase().split(/\s+/).filter((word) => word !== "");
  return entries.filter((entry) => {
    const text = [entry.id, entry.description, ...entry.parameters.flatMap((parameter) => [parameter.name, parameter.description])].join(" ").toLowerCase();
    return words.every((word) => text.includes(word));
  });
}

function describe(entry: FunctionMetadata, namespace: string): HelpEntry {
  const call = entry.parameters.map((parameter) => {
    const name = parameter.repeating ? `${parameter.name}, \u2026` : parameter.name;
    return parameter.optional || parameter.repeating ? `[${name}]` : name;
  });
  return {
    id: entry.id,
    description: entry.description ?? "",
    call: `${namespace}.${entry.name}(${call.join(", ")})`,
    parameters: entry.parameters.map((parameter) => ({
      name: parameter.name,
      description: parameter.description ?? "",
      need: parameter.repeating ? "optional, may be repeated" : parameter.optional ? "optional" : "required",
    })),
    example: (siteName) => example(entry, namespace, siteName),
  };
}

function example(entry: FunctionMetadata, namespace: string, siteName: string): string | undefined {
  const needed = entry.parameters.filter((parameter) => !parameter.optional && !parameter.repeating);
  const samples = needed.map((parameter) => (parameter.name === "site" ? siteName : (SAMPLES[`${entry.id}.${parameter.name}`] ?? SAMPLES[parameter.name])));
  if (samples.some((sample) => sample === undefined)) return undefined;
  return `=${namespace}.${entry.name}(${samples.join(", ")})`;
}

/** Values that make a sensible first call: an argument's name, or function and argument where the same name means different things. */
const SAMPLES: Record<string, string> = {
  count: "4",
  counts: "8",
  largest_count: "8",
  counts_or_largest: "8",
  from: "2",
  to: "4",
  percentile: "90",
  lag_m: "2",
  scale_m: "8",
  length_m: "10",
  load_kN: "900",
  diameter_m: "0.6",
  soil_MPa: "25",
  pile_GPa: "30",
  allowable_mm: "25",
};
