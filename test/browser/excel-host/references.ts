import { HostError } from "./host-error.js";
import type { Opened } from "./kind.js";

/** Objects that the page keeps from one synchronisation to the next, until it lets go of them. */
export class References {
  private readonly kept = new Map<string, Opened>();
  private readonly ids = new Map<Opened, string>();
  private made = 0;

  keep(object: Opened): void {
    if (this.ids.has(object)) return;
    const id = `ref-${++this.made}`;
    this.kept.set(id, object);
    this.ids.set(object, id);
  }

  idOf(object: Opened): string | undefined {
    return this.ids.get(object);
  }

  /** @throws {HostError} for one that was let go */
  get(id: string): Opened {
    const object = this.kept.get(id);
    if (object === undefined) throw new HostError("InvalidReference", `This reference is not valid for the current operation (${id}).`);
    return object;
  }

  release(id: string): void {
    const object = this.kept.get(id);
    if (object !== undefined) this.ids.delete(object);
    this.kept.delete(id);
  }

  /** How many the page has not let go. */
  get count(): number {
    return this.kept.size;
  }
}
