/** A refusal as Excel gives it: the code that a program may test, and words that it may not. */
export class HostError extends Error {
  override readonly name = "HostError";
  constructor(
    readonly code: string,
    message: string,
  ) {
    super(message);
  }
}

/** The model of Excel does not know this; Excel itself may. Nothing may pass that was not thought about. */
export function notModelled(what: string): HostError {
  return new HostError("ApiNotImplemented", `The model of Excel does not know ${what}.`);
}

/** Excel's own words for an argument that it cannot use. */
export function invalidArgument(what: string): HostError {
  return new HostError("InvalidArgument", `The argument is invalid or missing or has an incorrect format (${what}).`);
}

/** Nothing of that name or number exists. */
export function itemNotFound(what: string): HostError {
  return new HostError("ItemNotFound", `The requested resource doesn't exist (${what}).`);
}

/** Something of that name exists. */
export function itemAlreadyExists(what: string): HostError {
  return new HostError("ItemAlreadyExists", `A resource with the same name already exists (${what}).`);
}

/** The workbook or the sheet is protected. */
export function accessDenied(what: string): HostError {
  return new HostError("AccessDenied", `You cannot perform the requested operation (${what}).`);
}
