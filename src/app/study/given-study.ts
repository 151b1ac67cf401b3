/** A study as a person gave it: a name, and its files as bytes. */
export interface GivenStudy {
  readonly name: string;
  readonly files: ReadonlyMap<string, Uint8Array>;
}

/** Said to the person who gave something that is no study. */
export class NotAStudy extends Error {}

const isTable = (file: string) => /\.csv$/i.test(file);

/** Takes the study's own files: those of the top level, hidden ones and folders of results left alone. */
export function studyOf(name: string, files: ReadonlyMap<string, Uint8Array>): GivenStudy {
  if (![...files.keys()].some(isTable)) {
    const held =
      files.size === 0
        ? "is empty"
        : `holds ${files.size} ${files.size === 1 ? "file" : "files"}, none of them CSV`;
    throw new NotAStudy(
      `${name} is not a study: it ${held}. A study is a folder of CSV tables, such as occurrences.csv and sections.csv, or those files themselves.`,
    );
  }
  return { name, files };
}
