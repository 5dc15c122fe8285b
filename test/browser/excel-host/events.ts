import { areaAddress } from "../../../src/formula/addresses.js";
import type { ModelEvent } from "./model/workbook-model.js";

/** The events that a page can ask for: by which hidden member, and under which number they come. */
export const EVENTS = [
  { member: "DataChangedEvent", type: 10, what: "changed" },
  { member: "ActivatedEvent", type: 11, what: "activated" },
  { member: "DeactivatedEvent", type: 12, what: "deactivated" },
  { member: "AddedEvent", type: 13, what: "added" },
  { member: "SelectionChangedEvent", type: 14, what: "selected" },
  { member: "DeletedEvent", type: 15, what: "deleted" },
  { member: "CalculatedEvent", type: 16, what: "calculated" },
  { member: "EventNameChanged", type: 25, what: "renamed" },
] as const;

/** One message to the page as the wire carries it: category, type, target, message, number. */
export type Message = readonly [category: number, type: number, target: string, message: string, id: number];

const CATEGORY = 65_536;

/** Which events the page wants, and the messages that tell it of them. */
export class Events {
  private readonly wanted = new Map<string, number>();
  private sent = 0;

  register(type: number, target: string): void {
    this.wanted.set(`${type} ${target}`, (this.wanted.get(`${type} ${target}`) ?? 0) + 1);
  }

  unregister(type: number, target: string): void {
    this.wanted.set(`${type} ${target}`, Math.max(0, (this.wanted.get(`${type} ${target}`) ?? 0) - 1));
  }

  /** The page is gone, and what it wanted with it. */
  pageGone(): void {
    this.wanted.clear();
  }

  /** How many events the page listens to. */
  get count(): number {
    return [...this.wanted.values()].filter((count) => count > 0).length;
  }

  /** The messages for something that happened; none where nobody asked. */
  messagesFor(event: ModelEvent): Message[] {
    const known = EVENTS.find(({ what }) => what === event.what);
    if (known === undefined) return [];
    return ["Workbook", event.sheet.id]
      .filter((target) => (this.wanted.get(`${known.type} ${target}`) ?? 0) > 0)
      .map((target) => [CATEGORY, known.type, target, JSON.stringify(content(event)), ++this.sent]);
  }
}

function content(event: ModelEvent): Record<string, unknown> {
  const base = { worksheetId: event.sheet.id, source: "Local" };
  switch (event.what) {
    case "changed":
      return { ...base, changeType: "RangeEdited", address: areaAddress(event.area), triggerSource: event.author === "addin" ? "ThisLocalAddin" : "Unknown", shiftDirection: "None" };
    case "selected":
      return { ...base, address: areaAddress(event.area) };
    case "renamed":
      return { ...base, nameBefore: event.before, nameAfter: event.sheet.name };
    case "calculated":
      return { ...base, address: "" };
    default:
      return base;
  }
}
