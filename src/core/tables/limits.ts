/** Largest file that is read as a table, bytes: what fits into one text with room to part it. */
export const MOST_BYTES = 2 ** 28;

/** Most columns of a table: far more than any sheet of taxa, few enough to part without harm. */
export const MOST_COLUMNS = 4096;

/** Most cells of a table, rows times columns: each takes a byte or more however short its line is. */
export const MOST_CELLS = 2 ** 26;

/** Most cells of a table that is read as a whole, cell by cell. */
export const MOST_CELLS_AT_ONCE = 2 ** 23;

/** A size in words. */
export const mebibytes = (bytes: number): string => `${Math.ceil(bytes / 2 ** 20)} MiB`;
