/** Largest file that is read as a table, bytes: what fits into one text with room to part it. */
export const MOST_BYTES = 2 ** 28;

/** Most columns of a table: far more than any sheet of taxa, few enough to part without harm. */
export const MOST_COLUMNS = 4096;

/** A size in words. */
export const mebibytes = (bytes: number): string => `${Math.ceil(bytes / 2 ** 20)} MiB`;
