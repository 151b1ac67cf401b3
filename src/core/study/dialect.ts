export type Encoding = "UTF-8" | "UTF-16LE" | "UTF-16BE" | "Windows-1252";
export type Delimiter = "," | ";" | "\t" | "|";
export type Decimal = "point" | "comma";

/** How a file writes its table, decided once for the whole file. */
export interface Dialect {
  readonly encoding: Encoding;
  readonly delimiter: Delimiter;
  readonly decimal: Decimal;
  /** Cells that its data package declares to mean "no value". */
  readonly missing: readonly string[];
  /** Rows that the header takes, as a spreadsheet counts; none where a data package names the columns. */
  readonly headerRows: readonly number[];
  /** Rows above the header: kept, not used. */
  readonly notes: readonly { readonly row: number; readonly cells: readonly string[] }[];
}
