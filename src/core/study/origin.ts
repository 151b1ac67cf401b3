/** Where a value came from: the file's name and its row as a spreadsheet counts it (the header is row 1). */
export interface Origin {
  readonly file: string;
  readonly row: number;
}
