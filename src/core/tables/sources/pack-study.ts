import { type ZipOptions, zipSync } from "fflate";

/** The same bytes whenever and wherever they are packed: the parts of this day are written, in no time zone. */
const withoutDate: ZipOptions = { mtime: "1980-01-01T12:00:00" };

/** A study's files as one zip archive, in the order of their names; reading it gives the study again. */
export const packStudy = (files: ReadonlyMap<string, Uint8Array>): Uint8Array =>
  zipSync(Object.fromEntries([...files].toSorted(([a], [b]) => (a < b ? -1 : 1))), {
    ...withoutDate,
    level: 6,
  });

/** The parts of a workbook as one file, in the order given. */
export const packParts = (parts: ReadonlyMap<string, Uint8Array>): Uint8Array =>
  zipSync(Object.fromEntries(parts), { ...withoutDate, level: 6 });

/** Files as a zip archive without compression. */
export const storeFiles = (files: ReadonlyMap<string, Uint8Array>) =>
  zipSync(Object.fromEntries(files), { ...withoutDate, level: 0 });
