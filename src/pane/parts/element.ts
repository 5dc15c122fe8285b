/** What may stand inside an element: other nodes, and text that is never read as markup. */
export type Child = Node | string | undefined;

/** Attributes by name; true writes an empty one, false and undefined leave it out. */
export type Attributes = Readonly<Record<string, string | number | boolean | undefined>>;

/**
 * Makes an element. Cell text comes from anybody's workbook, so strings only ever become text nodes.
 *
 * @param tag         name of the element
 * @param attributes  attributes; "text" is not among them, give text as a child
 * @param children    contents in order
 */
export function element<K extends keyof HTMLElementTagNameMap>(tag: K, attributes?: Attributes, ...children: Child[]): HTMLElementTagNameMap[K];
export function element(tag: string, attributes?: Attributes, ...children: Child[]): HTMLElement;
export function element(tag: string, attributes: Attributes = {}, ...children: Child[]): HTMLElement {
  const made = document.createElement(tag);
  for (const [name, value] of Object.entries(attributes)) {
    if (value !== undefined && value !== false) made.setAttribute(name, value === true ? "" : String(value));
  }
  made.append(...children.filter((child): child is Node | string => child !== undefined && child !== ""));
  return made;
}

/**
 * Makes an element of a drawing.
 *
 * @param tag         name within SVG
 * @param attributes  as in element()
 * @param children    contents in order
 */
export function drawn(tag: string, attributes: Attributes = {}, ...children: Child[]): SVGElement {
  const made = document.createElementNS("http://www.w3.org/2000/svg", tag);
  for (const [name, value] of Object.entries(attributes)) {
    if (value !== undefined && value !== false) made.setAttribute(name, value === true ? "" : String(value));
  }
  made.append(...children.filter((child): child is Node | string => child !== undefined && child !== ""));
  return made;
}

let lastId = 0;

/** An id that no other element of the page has, for labels and descriptions. */
export const freshId = (purpose: string): string => `probeworth-${purpose}-${++lastId}`;
