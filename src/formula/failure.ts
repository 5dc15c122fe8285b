/** Something that the person who called the formula line can put right; the message is for them. */
export class FormulaLineError extends Error {
  override readonly name = "FormulaLineError";
  constructor(
    message: string,
    /** 2: the call itself cannot be carried out as given; 1: the workbook or the formula gives no value */
    readonly exitCode: 1 | 2,
  ) {
    super(message);
  }
}

/** A workbook that cannot be read, said in a sentence. */
export function unreadable(sentence: string): FormulaLineError {
  return new FormulaLineError(sentence, 1);
}

/** A call that cannot be carried out as given, said in a sentence. */
export function misused(sentence: string): FormulaLineError {
  return new FormulaLineError(sentence, 2);
}
