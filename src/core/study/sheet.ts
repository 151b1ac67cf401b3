import type { Dialect } from "./dialect.ts";
import type { Recognition, WideReading } from "./recognised.ts";
import type { SheetRows } from "./sheet-rows.ts";
import type { TableName } from "./tables/index.ts";

/** A table as it was read: every cell as text, nothing dropped. */
export interface Sheet {
  readonly file: string;
  readonly table: TableName;
  readonly dialect: Dialect;
  /** Header cells as written, and the declared column each was taken to be (undefined: kept, not used). */
  readonly headers: readonly string[];
  readonly columns: readonly (string | undefined)[];
  /** What each column was taken to be and why, in the order of the headers. */
  readonly recognised: readonly Recognition[];
  /** Absent for a table of one row a find, sample, value ... */
  readonly wide?: WideReading;
  /** The section that a file without a column for it was taken to be about. */
  readonly section?: { readonly name: string; readonly by: "chosen" | "sections" | "name" };
  readonly rows: SheetRows;
  readonly rowNumbers: readonly number[] | Int32Array;
}
