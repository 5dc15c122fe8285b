import { accessDenied, notModelled } from "../host-error.js";
import type { Kind } from "../kind.js";
import type { Place } from "../model/chart-model.js";
import { isUnbounded } from "./places.js";
import { checked, type Wanted } from "./properties.js";

const MOST_CELLS = 200_000;

/** A property of a look: what it takes, and what it is before anybody sets it. */
export type Look = readonly [Wanted, unknown];

/**
 * A class whose properties are looks of cells; reading gives null where the cells differ.
 *
 * @param name    of the class, for messages
 * @param placeOf  the cells that an object of it is about
 * @param prefix  where the properties are kept, such as "font/"
 */
export function looks<T>(name: string, placeOf: (target: T) => Place, prefix: (target: T) => string, properties: Readonly<Record<string, Look>>): Pick<Required<Kind<T>>, "get" | "set"> {
  const entries = Object.entries(properties);
  return {
    get: Object.fromEntries(entries.map(([property, [, usual]]) => [property, (target: T) => common(placeOf(target), prefix(target) + property, usual)])),
    set: Object.fromEntries(
      entries.map(([property, [wanted]]) => [property, (target: T, value: unknown) => paint(placeOf(target), prefix(target) + property, checked(`${name}.${property}`, wanted, value))]),
    ),
  };
}

/** Gives cells a look; undefined takes it away. */
export function paint(place: Place, property: string, value: unknown): void {
  const { sheet, area } = place;
  refuseLook(place);
  if ((area.bottom - area.top + 1) * (area.right - area.left + 1) > MOST_CELLS) throw notModelled(`looks of more than ${MOST_CELLS} cells`);
  for (let row = area.top; row <= area.bottom; row++) for (let column = area.left; column <= area.right; column++) sheet.setLook(row, column, property, value);
}

/** @throws {HostError} where the sheet's protection keeps looks as they are */
export function refuseLook({ sheet, area }: Place): void {
  if (sheet.protection !== undefined && sheet.protection.allowFormatCells !== true && (isUnbounded(area) || sheet.isLocked(area))) throw accessDenied(`${sheet.name} is protected`);
}

function common({ sheet, area }: Place, property: string, usual: unknown): unknown {
  if (isUnbounded(area)) return null;
  const first = sheet.lookAt(area.top, area.left, property) ?? usual;
  for (let row = area.top; row <= area.bottom; row++) for (let column = area.left; column <= area.right; column++) if ((sheet.lookAt(row, column, property) ?? usual) !== first) return null;
  return first;
}
