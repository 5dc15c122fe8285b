/** A cell cannot be used. The message is one or two sentences for the person: which input, where, what was found, what is accepted. */
export class InputError extends Error {
  override readonly name = "InputError";

  /**
   * @param message  the sentence
   * @param row      row of the site block, 1 for its first, where one is to blame
   * @param id       the input of the catalogue, where one is to blame
   */
  constructor(message: string, readonly row?: number, readonly id?: string) {
    super(message);
  }
}
