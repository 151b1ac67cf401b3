import type { Sheet, Study } from "../../core/study/model.ts";
import type { Problem } from "../../core/study/problem.ts";
import { receivedSheets } from "../../run/received-study.ts";
import { keptFiles, keptHistory, studyKey } from "../keeping/kept-studies.ts";
import { type GivenTable, givenTable, leavingSheets, unreadFiles } from "../tables/given-table.ts";
import { type History, heldEdits, NO_HISTORY } from "../tables/history.ts";
import { desk } from "./desk.ts";
import type { GivenStudy } from "./given-study.ts";
import { inSlices } from "./in-slices.ts";

/** A study that is read: as it was given, its tables before any edit, and what its last reading found. */
export interface ReadOut {
  readonly given: GivenStudy;
  /** Under which its edits are kept; undefined where this browser keeps nothing. */
  readonly key: string | undefined;
  /** The edits that were kept when it was opened. */
  readonly opened: History;
  readonly sheets: readonly Sheet[];
  /** The same with what their reading left out. */
  readonly tables: readonly GivenTable[];
  /** The edits that the last reading rests on. */
  readonly history: History;
  readonly study: Study;
}

/** A study to be read: its tables before any edit where they are known already. */
export type Unread = Pick<ReadOut, "given" | "key" | "opened" | "history"> &
  Partial<Pick<ReadOut, "sheets" | "tables">>;

/** The files to read, and the tables before any edit as far as they have to be known before. */
export async function prepared(unread: Unread): Promise<{ unread: Unread; files: GivenStudy["files"] }> {
  const { given, history } = unread;
  if (heldEdits(history).length === 0) return { unread, files: given.files };
  const known = unread.tables === undefined ? await unedited(given) : { tables: unread.tables };
  return { unread: { ...unread, ...known }, files: await editedFiles(given, known.tables, history) };
}

/** What a reading of the prepared files comes to. */
export async function readOutOf(unread: Unread, study: Study): Promise<ReadOut> {
  const { sheets = study.sheets, tables = await givenTables(unread.given, study) } = unread;
  return { ...unread, sheets, tables, study };
}

async function unedited(given: GivenStudy): Promise<Pick<ReadOut, "sheets" | "tables">> {
  const { problems, ...read } = await desk().read(given.files);
  const sheets = receivedSheets(read.sheets);
  return { sheets, tables: await givenTables(given, { sheets, problems }) };
}

/** A study with what this browser kept of it; a browser that keeps nothing is no hindrance. */
export async function keptWork(given: GivenStudy): Promise<Pick<ReadOut, "given" | "key" | "history">> {
  try {
    const key = given.key ?? (await studyKey(given));
    const history = (key && (await keptHistory(key))) || NO_HISTORY;
    const kept = key === undefined ? undefined : await keptFiles(key);
    return { given: kept === undefined ? given : { ...given, files: kept }, key, history };
  } catch {
    return { given, key: undefined, history: NO_HISTORY };
  }
}

/** The tables with what their reading left out: rows that could not be parted, and whole tables. */
async function givenTables(
  { files }: GivenStudy,
  { sheets, problems }: Pick<Study, "sheets" | "problems">,
): Promise<readonly GivenTable[]> {
  const leaving = leavingSheets(sheets, problems);
  const unread = unreadFiles(sheets, problems);
  const isWhole = leaving.length === 0 && unread.length === 0;
  const left = isWhole ? undefined : await desk().leftOut(files, leaving, unread);
  const tables: GivenTable[] = [];
  for (const sheet of sheets)
    tables.push(givenTable(sheet, await inSlices(sheet.rows), left?.rows.get(sheet.file)));
  return [...tables, ...(left?.tables ?? [])];
}

/** The files to work out: the edits made, each row counted as the page counts it. */
export function editedFiles({ files }: GivenStudy, tables: readonly GivenTable[], history: History) {
  const edits = heldEdits(history);
  if (edits.length === 0) return files;
  const forms = tables.map(({ file, headers, dialect }) => ({ file, headers, dialect }));
  return desk().edited(files, edits, { forms, keepsRowNumbers: true });
}

export function nothingRead(name: string, problems: readonly Problem[]): string {
  const [first] = problems;
  const reason = first === undefined ? "" : ` ${first.file}: expected ${first.expected}. ${first.mend}`;
  return `${name} is not a study: none of its files could be read as a table.${reason}`;
}
