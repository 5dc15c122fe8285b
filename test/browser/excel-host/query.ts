import { Arguments } from "./arguments.js";
import type { ExcelHost } from "./excel-host.js";
import { HostError, notModelled } from "./host-error.js";
import type { Opened } from "./kind.js";
import { kindOf } from "./kinds/index.js";
import { isSupported } from "./requirement-sets.js";
import type { WireQuery } from "./wire.js";

type Answer = Record<string, unknown>;

/** Reads the properties that a load names; a load that names none reads all that the model knows. */
export function query(object: Opened, { Select = [], Expand = [], Top, Skip }: WireQuery, host: ExcelHost): Answer {
  const paths = [...Select, ...Expand].map((path) => path.split("/").filter((step) => step !== "items"));
  const kind = kindOf(object);
  if (kind.items === undefined) {
    if (Top !== undefined || Skip !== undefined) throw notModelled(`$top and $skip of ${object.kind}`);
    return answer(object, paths, host);
  }
  const onCollection = paths.filter(([first]) => kind.get?.[first ?? ""] !== undefined);
  const onItems = paths.filter((path) => !onCollection.includes(path));
  const own = onCollection.length > 0 ? answer(object, onCollection, host) : {};
  if (onItems.length === 0 && onCollection.length > 0) return own;
  const items = kind.items(object.target, host).slice(Skip ?? 0, Top === undefined ? undefined : (Skip ?? 0) + Top);
  return { ...own, _Items: items.map((item) => ({ ...identity(item), ...answer(item, onItems, host) })) };
}

function answer(object: Opened, paths: readonly (readonly string[])[], host: ExcelHost): Answer {
  const { target } = object;
  const kind = kindOf(object);
  const result: Answer = {};
  const deeper = new Map<string, string[][]>();
  const all = paths.length === 0 || paths.some(([first]) => first === undefined || first === "*");
  const names = all ? Object.keys(kind.get ?? {}).filter((name) => isSupported(`${object.kind}.${name}`, host.sets)) : [];
  for (const [first, ...rest] of paths) {
    if (first === undefined || first === "*" || first === "isNullObject") continue;
    if (kind.get?.[first] !== undefined && rest.length === 0) names.push(first);
    else if (kind.open?.[first] !== undefined) deeper.set(first, [...(deeper.get(first) ?? []), rest]);
    else throw notModelled(`${object.kind}.${first}`);
    if (!isSupported(`${object.kind}.${first}`, host.sets)) throw new HostError("ApiNotFound", `The property ${object.kind}.${first} is not in this version of Excel.`);
  }
  for (const name of new Set(names)) result[upperFirst(name)] = kind.get?.[name]?.(target, host);
  for (const [name, rest] of deeper) {
    const child = kind.open?.[name]?.(target, new Arguments(`${object.kind}.${name}`, []), host) ?? null;
    const select = rest.some((path) => path.length === 0) ? [] : rest.map((path) => path.join("/"));
    result[upperFirst(name)] = child === null ? null : { ...identity(child), ...query(child, { Select: select }, host) };
  }
  return result;
}

function identity(object: Opened): Answer {
  const id = kindOf(object).id?.(object.target);
  return id === undefined ? {} : { _Id: id };
}

function upperFirst(name: string): string {
  return name.slice(0, 1).toUpperCase() + name.slice(1);
}
