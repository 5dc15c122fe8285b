/** The formula uses something that the formula line cannot calculate, or cannot be read; the message says what. */
export class UnsupportedFormula extends Error {
  override readonly name = "UnsupportedFormula";
  constructor(
    message: string,
    /** the error value that stands for it where no stored value does */
    readonly code = "#NAME?",
    /** true where a spreadsheet program may well know how: the value it stored is better than none */
    readonly keepStored = true,
  ) {
    super(message);
  }
}
