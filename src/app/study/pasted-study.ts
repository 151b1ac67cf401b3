import { pastedFile } from "../../core/tables/sources/pasted.ts";
import { type History, heldEdits } from "../tables/history.ts";
import { desk } from "./desk.ts";
import { type GivenStudy, studyOf } from "./given-study.ts";
import type { ReadOut } from "./read-out.ts";

/** A study of one pasted table. */
export const pastedStudy = (text: string): GivenStudy => studyOf("Pasted table", new Map([pastedFile(text)]));

/** The open study with a pasted table more; the edits made so far are written into its tables. */
export async function withPasted(
  { given, tables }: ReadOut,
  history: History,
  text: string,
): Promise<GivenStudy> {
  const edits = heldEdits(history);
  const forms = tables.map(({ file, headers, dialect }) => ({ file, headers, dialect }));
  const files =
    edits.length === 0
      ? given.files
      : await desk().edited(given.files, edits, { forms, keepsRowNumbers: false });
  return { name: given.name, files: new Map([...files, pastedFile(text, files.keys())]) };
}
