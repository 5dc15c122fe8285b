/**
 * A store of the most recently used values by text key. The engine's functions stay pure: what is remembered is only what they
 * would compute again.
 */
export class Remembered<Value> {
  private readonly values = new Map<string, Value>();

  /** @param capacity  values kept; the one unused for longest is dropped first */
  constructor(private readonly capacity: number) {}

  /** The value of a key, made where it is not known. */
  get(key: string, make: () => Value): Value {
    const known = this.values.get(key);
    if (known !== undefined) {
      this.values.delete(key);
      this.values.set(key, known);
      return known;
    }
    const value = make();
    this.values.set(key, value);
    if (this.values.size > this.capacity) this.values.delete(this.values.keys().next().value as string);
    return value;
  }
}
