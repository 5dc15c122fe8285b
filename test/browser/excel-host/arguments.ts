import { invalidArgument, notModelled } from "./host-error.js";
import type { Opened } from "./kind.js";
import type { KindName, Targets } from "./targets.js";

/** The arguments of one call. Whatever is given and not asked for is refused, so that no option is passed over in silence. */
export class Arguments {
  private readonly asked = new Set<number>();

  constructor(
    private readonly member: string,
    private readonly values: readonly unknown[],
  ) {}

  /** The argument as it came; undefined where it was left out. */
  any(index: number): unknown {
    this.asked.add(index);
    const value = this.values[index];
    return value === null ? undefined : value;
  }

  text(index: number): string {
    const value = this.any(index);
    if (typeof value !== "string") throw this.wrong(index, "a text");
    return value;
  }

  optionalText(index: number): string | undefined {
    return this.any(index) === undefined ? undefined : this.text(index);
  }

  integer(index: number, least = 0): number {
    const value = this.any(index);
    if (typeof value !== "number" || !Number.isInteger(value) || value < least) throw this.wrong(index, `a whole number of at least ${least}`);
    return value;
  }

  truth(index: number, otherwise: boolean): boolean {
    const value = this.any(index) ?? otherwise;
    if (typeof value !== "boolean") throw this.wrong(index, "true or false");
    return value;
  }

  /** One of the words of a list of the platform, whatever its case. */
  choice(index: number, words: readonly string[], otherwise: string): string {
    const value = this.optionalText(index) ?? otherwise;
    const word = words.find((each) => each.toLowerCase() === value.toLowerCase());
    if (word === undefined) throw this.wrong(index, words.join(", "));
    return word;
  }

  /** An object that the page passes on, if it is of this kind. */
  object<K extends KindName>(index: number, kind: K): Targets[K] | undefined {
    const value = this.any(index);
    if (!isOpened(value)) return undefined;
    if (value.kind !== kind) throw this.wrong(index, `a ${kind}`);
    return value.target as Targets[K];
  }

  /** Called when the member has taken what it knows. */
  refuseRest(): void {
    this.values.forEach((value, index) => {
      if (value !== null && value !== undefined && !this.asked.has(index)) throw notModelled(`argument ${index + 1} of ${this.member}, ${JSON.stringify(value)}`);
    });
  }

  private wrong(index: number, wanted: string): Error {
    return invalidArgument(`${this.member}, argument ${index + 1}: ${JSON.stringify(this.values[index] ?? null)}, wanted ${wanted}`);
  }
}

/** True for an object of the platform among the arguments. */
function isOpened(value: unknown): value is Opened {
  return typeof value === "object" && value !== null && "kind" in value && "target" in value;
}
