/** The program's version, written into every repeat sheet. */
export const VERSION = "0.1.0";

/** Version of the files we write: their names, columns and meaning. */
export const SCHEMA_VERSION = 1;

/** Version of the layout of random blocks; a released layout never changes. */
export const BLOCK_LAYOUT_VERSION = 1;
