const FUTURE = /^(?:_xlfn\.|_xlws\.|_xludf\.)+/i;
const STORED = /^_xldudf_(PROBE(?:DEV)?)_(.+)$/i;

/** A function as a formula calls it. */
export interface FunctionName {
  /** in capitals, such as "SUM" or "PROBE.TOTALCOST" */
  readonly name: string;
  readonly isOurs: boolean;
}

/**
 * The function that a formula means, whatever a program made of its name: "_xlfn.XLOOKUP" for a function younger than the
 * format, "_xldudf_PROBE_TOTALCOST" for one of an add-in, either with the file of a lost add-in in front.
 *
 * @param written  the name before the bracket
 * @param prefix   what stands before "!", such as "[2]" or "C:\Tools\Some.xla"; undefined without one
 */
export function functionName(written: string, prefix?: string): FunctionName {
  const bare = written.replace(FUTURE, "");
  const stored = STORED.exec(bare);
  const name = (stored === null ? bare : `PROBE.${(stored[2] ?? "").replaceAll("_", ".")}`).toUpperCase().replace(/^PROBEDEV\./, "PROBE.");
  const isOurs = name.startsWith("PROBE.");
  return { name: isOurs || prefix === undefined ? name : `${prefix}!${name}`, isOurs };
}

/** Functions whose value changes from one calculation to the next. */
export const CHANGING: ReadonlySet<string> = new Set(["NOW", "TODAY", "RAND", "RANDARRAY", "RANDBETWEEN"]);

/** Functions that ask about the range itself, for which a whole column must keep its full length. */
export const ABOUT_RANGES: ReadonlySet<string> = new Set(["AREAS", "CELL", "COLUMN", "COLUMNS", "COUNTBLANK", "INDEX", "ISREF", "OFFSET", "ROW", "ROWS"]);

/** Functions that count days, which a workbook with dates from 1904 counts from another day. */
export const COUNTING_DAYS: ReadonlySet<string> = new Set([
  "DATE", "DATEDIF", "DATEVALUE", "DAY", "EDATE", "EOMONTH", "ISOWEEKNUM", "MONTH", "NETWORKDAYS", "NETWORKDAYS.INTL", "NOW", "TEXT", "TODAY", "WEEKDAY", "WEEKNUM",
  "WORKDAY", "WORKDAY.INTL", "YEAR", "YEARFRAC",
]);

/** Functions that look at formulas, files or other programs instead of values. */
export const OUT_OF_REACH: ReadonlySet<string> = new Set([
  "CALL", "CELL", "CUBEKPIMEMBER", "CUBEMEMBER", "CUBEMEMBERPROPERTY", "CUBERANKEDMEMBER", "CUBESET", "CUBESETCOUNT", "CUBEVALUE", "FORMULATEXT", "GETPIVOTDATA", "IMAGE",
  "INFO", "ISFORMULA", "REGISTER.ID", "RTD", "SHEET", "SHEETS", "WEBSERVICE",
]);

const NUMBERS = ["ABS", "ACOS", "ASIN", "ATAN", "ATAN2", "CEILING", "COS", "DEGREES", "EVEN", "EXP", "FLOOR", "INT", "LN", "LOG", "LOG10", "MOD", "MROUND", "ODD", "POWER", "QUOTIENT", "RADIANS", "ROUND", "ROUNDDOWN", "ROUNDUP", "SIGN", "SIN", "SQRT", "TAN", "TRUNC"];
const TEXTS = ["EXACT", "FIND", "LEFT", "LEN", "LOWER", "MID", "PROPER", "REPLACE", "REPT", "RIGHT", "SEARCH", "SUBSTITUTE", "TEXT", "TRIM", "UPPER", "VALUE"];
const TESTS = ["IF", "IFERROR", "IFNA", "ISBLANK", "ISERR", "ISERROR", "ISNA", "ISNUMBER", "ISTEXT", "NOT"];
const ONE_VALUE_EACH: ReadonlySet<string> = new Set([...NUMBERS, ...TEXTS, ...TESTS]);
const ONE_VALUE_FIRST: ReadonlySet<string> = new Set(["HLOOKUP", "MATCH", "VLOOKUP"]);

/**
 * True where an ordinary formula takes, of a whole range, the one cell in its own row or column.
 *
 * @param name      the function
 * @param argument  0 for its first
 */
export function wantsOneValue(name: string, argument: number): boolean {
  return ONE_VALUE_EACH.has(name) || (argument === 0 && ONE_VALUE_FIRST.has(name));
}
