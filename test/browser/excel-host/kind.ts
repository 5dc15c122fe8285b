import type { Arguments } from "./arguments.js";
import type { ExcelHost } from "./excel-host.js";
import type { KindName, Targets } from "./targets.js";

/** An object of the platform: the name of its class in office.js, and what of the workbook it stands for. */
export interface Opened {
  readonly kind: KindName;
  readonly target: unknown;
}

/**
 * What one class of the platform can do here. Every member is named as in the platform's own documentation; a member
 * that is not named does not exist for the page.
 */
export interface Kind<T> {
  /** by what a collection finds it again */
  id?(target: T): string | number;
  readonly get?: Readonly<Record<string, (target: T, host: ExcelHost) => unknown>>;
  readonly set?: Readonly<Record<string, (target: T, value: unknown, host: ExcelHost) => void>>;
  /** properties and methods that give an object; null is a null object */
  readonly open?: Readonly<Record<string, (target: T, given: Arguments, host: ExcelHost) => Opened | null>>;
  readonly call?: Readonly<Record<string, (target: T, given: Arguments, host: ExcelHost) => unknown>>;
  /** a collection's items */
  items?(target: T, host: ExcelHost): readonly Opened[];
  /** a collection's item by its id or name */
  item?(target: T, key: unknown, host: ExcelHost): Opened;
}

/** An object of this class. */
export function opened<K extends KindName>(kind: K, target: Targets[K]): Opened {
  return { kind, target };
}
