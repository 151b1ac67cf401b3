/** A defect of the input. An error: that row or file cannot be used. A caution: used, but look. */
export interface Problem {
  readonly severity: "error" | "caution";
  readonly code: string;
  readonly file: string;
  /** As a spreadsheet counts, the header being row 1. Absent where the whole file is meant. */
  readonly row?: number;
  readonly column?: string;
  /** What stands there. */
  readonly found: string;
  readonly expected: string;
  /** How to mend it. */
  readonly mend: string;
  /** The cell's new content, where there is one mend alone and it is safe. */
  readonly fix?: Fix;
}

/** One cell to be written anew. */
export interface Fix {
  readonly file: string;
  readonly row: number;
  readonly column: string;
  readonly now: string;
}
