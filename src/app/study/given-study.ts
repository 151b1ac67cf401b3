/** A study as a person gave it: a name, and its files as bytes. */
export interface GivenStudy {
  readonly name: string;
  readonly files: ReadonlyMap<string, Uint8Array>;
  /** Under which it is kept already; absent: told by its files. */
  readonly key?: string;
  /** True where its settings were changed here, so that the files as they are now have to be kept. */
  readonly isSettled?: boolean;
}

/** Said to the person who gave something that is no study. */
export class NotAStudy extends Error {}

/** Tables, or what tables are packed in. */
const isTable = (file: string) => /\.(?:csv|tsv|tab|zip|xlsx|xlsm)$/i.test(file);

/** Takes the study's own files: those of the top level, hidden ones and folders of results left alone. */
export function studyOf(name: string, files: ReadonlyMap<string, Uint8Array>): GivenStudy {
  if (![...files.keys()].some(isTable)) {
    const held =
      files.size === 0
        ? "is empty"
        : `holds ${files.size} ${files.size === 1 ? "file" : "files"}, none of them a table`;
    throw new NotAStudy(
      `${name} is not a study: it ${held}. A study is a folder of CSV tables, such as occurrences.csv and sections.csv, those files themselves, a workbook or a zip.`,
    );
  }
  return { name, files };
}
