import type { Area } from "./addresses.js";
import type { Book } from "./book.js";
import type { Place } from "./table-references.js";

/** What the writer of plain formulas asks of the calculation around it. */
export interface Surroundings {
  readonly book: Book;
  /** the functions that can be calculated, in capitals */
  readonly functions: ReadonlySet<string>;
  /** rows and columns from the first on that hold something on any sheet, at least 1 */
  used(): { rows: number; columns: number };
  /** where the table went that the formula of this cell spilled; undefined without one */
  spillOf(place: Place): Area | undefined;
}
