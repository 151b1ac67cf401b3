/** Where a value came from: the file's name and its row as a spreadsheet counts it (the header is row 1). */
export interface Origin {
  readonly file: string;
  readonly row: number;
}

/** Where a find of a wide sheet stands beside its row: its file, as sheets are joined, and the header of its column. */
export interface Stand {
  readonly file: string;
  /** Absent where its row is all there is to say. */
  readonly column?: string;
}
